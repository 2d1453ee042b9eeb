import { performedEnd, referencesOf, type Country } from './country.ts';
import { dayText } from './days.ts';
import { buoyancySensitivity, localU } from './local-part.ts';
import { KILOGRAM, PIECES } from './pieces.ts';
import { line, NULL, type CountryTable } from './table.ts';
import { estimateOf, revisionId } from './tables-of-calibrations.ts';
import { columns } from './tables-of-network.ts';
import { parentLinks } from './value-links.ts';
import type { Work } from './work-list.ts';

/** Correlation of the local parts of two pieces of one design. Common practice, no source. */
const CORRELATION = 0.2;
const DEGREES_OF_FREEDOM = 13;

/** Tables of what leans on what. */
export const LINK_TABLES: readonly CountryTable[] = [
  {
    table: 'value_link',
    columns: columns(
      'child_id parent_id role sensitivity used_begin used_end used_as used_deviation used_expanded_u used_k',
    ),
    *rows(country) {
      for (const work of country.works) {
        const use = [dayText(work.day), dayText(performedEnd(work)), 'certificate', NULL, NULL, NULL];
        for (const [at, links] of parentLinks(country, work).entries()) {
          for (const { value, sensitivity } of links.toSorted((a, b) => a.value - b.value)) {
            yield line(work.firstValue + at + 1, value + 1, 'reference', sensitivity, ...use);
          }
        }
      }
    },
  },
  {
    table: 'source_link',
    columns: columns('child_id source_id sensitivity'),
    *rows(country) {
      for (const work of country.works) yield* sourceLinks(country, work);
    },
  },
  {
    table: 'value_group',
    columns: columns('id revision_id degrees_of_freedom estimate'),
    *rows(country) {
      for (const [n, work] of designs(country).entries()) {
        yield line(n + 1, revisionId(country, work), DEGREES_OF_FREEDOM, estimateOf(work));
      }
    },
  },
  {
    table: 'group_covariance',
    columns: columns('group_id row_id column_id covariance'),
    *rows(country) {
      for (const [n, work] of designs(country).entries()) {
        const locals = Array.from({ length: work.set.count }, (_, at) =>
          localU(country, work, work.set.from + at),
        );
        for (const [row, u] of locals.entries()) {
          for (const [column, other] of locals.entries()) {
            if (column < row) continue;
            const covariance = u * other * (row === column ? 1 : CORRELATION);
            yield line(n + 1, work.firstValue + row + 1, work.firstValue + column + 1, covariance);
          }
        }
      }
    },
  },
];

function designs(country: Country): Work[] {
  return country.works.filter((work) => work.set.isSubdivision);
}

/** The weight's own volume, and those of the references the other way round. */
function* sourceLinks(country: Country, work: Work): Iterable<string> {
  const buoyancy = buoyancySensitivity(country, work);
  if (buoyancy === null) return;
  const { set } = work;
  // Two revisions of one reference set are one weight with one volume.
  const sets = [...new Set(referencesOf(country, work).map((reference) => reference.set))];
  for (let at = 0; at < set.count; at += 1) {
    const piece = set.from + at;
    const part = set.isSubdivision ? Number(PIECES[piece]!.nominal) / 1000 : 1;
    const used = set.isSubdivision ? KILOGRAM : piece;
    const links = sets.map((reference) => ({
      source: reference.firstStandard + used - reference.from,
      sensitivity: (-buoyancy * part) / sets.length,
    }));
    links.push({ source: set.firstStandard + at, sensitivity: buoyancy });
    for (const { source, sensitivity } of links.sort((a, b) => a.source - b.source)) {
      yield line(work.firstValue + at + 1, source + 1, sensitivity);
    }
  }
}

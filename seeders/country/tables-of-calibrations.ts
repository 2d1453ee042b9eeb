import { ENGINE_VERSION } from '#shared/engine/version.ts';
import { performedEnd, type Country } from './country.ts';
import { actOf, dayText, instantText } from './days.ts';
import { mixed, PURPOSE } from './draws.ts';
import { FIGURES, GRADES, type Figures } from './grades.ts';
import { identifier } from './identifiers.ts';
import { localU } from './local-part.ts';
import { PIECES } from './pieces.ts';
import { line, NULL, type CountryTable } from './table.ts';
import { columns, laboratoryId, scaleVersionId, signatoryId } from './tables-of-network.ts';
import { standardRowId } from './tables-of-standards.ts';
import type { Work } from './work-list.ts';

/** Part of the class limit within which true values lie, either side. */
const TRUE_PART = 0.3;
/** Part of U by which results scatter, either side: two results of one weight agree. */
const SCATTER = 0.3;
const REASONS = {
  text: 'The address of the customer was corrected; value and U are the same.',
  value: 'A reading had been entered wrongly; the value was worked out anew.',
  withdrawn: 'The weight was found damaged after the calibration.',
} as const;

/** Tables of certificates and what they state. */
export const CALIBRATION_TABLES: readonly CountryTable[] = [
  {
    table: 'calibration',
    columns: columns('id laboratory_id certificate_no registered_by_id recorded_at act_seq'),
    *rows(country) {
      for (const work of country.works) {
        if (work.revisionN !== 1) continue;
        const issuer = laboratoryId(country, work.set.issuer);
        const code = country.laboratories[work.set.issuer]!.code;
        const number = `${code}-${dayText(work.issuedOn).slice(2, 4)}-${String(work.certificate).padStart(6, '0')}`;
        yield line(calibrationId(country, work), issuer, number, issuer, ...recorded(work.issuedOn));
      }
    },
  },
  {
    table: 'revision',
    columns: columns(
      'id calibration_id n reason issued_on performed_begin performed_end date_precision method decision_rule signatory_id document_id content_sha256 recorded_at act_seq',
    ),
    *rows(country) {
      for (const [place, work] of country.works.entries()) {
        const rule = GRADES[work.set.level]!.class === null ? NULL : 'guarded';
        yield line(
          ...[revisionId(country, work), calibrationId(country, work), work.revisionN],
          ...[
            work.changed === 'new' ? NULL : REASONS[work.changed],
            dayText(work.issuedOn),
            dayText(work.day),
          ],
          ...[dayText(performedEnd(work)), 'day', 'Substitution weighing', rule],
          ...[
            signatoryId(country, work.set.issuer),
            NULL,
            sheetHash(country.seed, place),
            ...recorded(work.issuedOn),
          ],
        );
      }
    },
  },
  { table: 'assigned_value', columns: columns(valueColumns()), rows: valueRows },
  {
    table: 'component',
    columns: columns('value_id n name evaluation distribution u sensitivity degrees_of_freedom estimate'),
    *rows(country) {
      for (const work of country.works) {
        if (originOf(country, work) !== 'components') continue;
        for (let at = 0; at < work.set.count; at += 1) {
          const local = localU(country, work, work.set.from + at);
          yield line(
            work.firstValue + at + 1,
            1,
            'Weighing and balance',
            'A',
            'normal',
            local,
            1,
            NULL,
            NULL,
          );
        }
      }
    },
  },
  {
    table: 'value_end',
    columns: columns(
      'value_id recorded_at kind effective_on made_known_on replaced_by changed reason act_seq',
    ),
    *rows(country) {
      for (const work of country.works) if (work.ending !== 'none') yield* endRows(country, work);
    },
  },
];

function valueColumns(): string {
  return (
    'id uid revision_id line standard_id epoch_id quantity medium stage nominal deviation reported_unit reported_decimals ' +
    'expanded_u reported_u_decimals k coverage nu_eff u local_u local_origin local_degrees_of_freedom local_estimate ' +
    'root_kind scale_version_id class under_accreditation unit_confirmed changed performed_end date_precision ' +
    'effective_from recorded_at act_seq issuer_id holder_id decade engine_version'
  );
}

function* valueRows(country: Country): Iterable<string> {
  const scale = scaleVersionId(country);
  for (const work of country.works) {
    const { set } = work;
    const grade = GRADES[set.level]!;
    const isRoot = set.level === 0;
    const isClaimed = set.holder !== set.issuer ? 1 : 0;
    const origin = originOf(country, work);
    const revision = revisionId(country, work);
    const parties = [laboratoryId(country, set.issuer), laboratoryId(country, set.holder)];
    const isGroup = origin === 'group';
    for (let at = 0; at < set.count; at += 1) {
      const piece = PIECES[set.from + at]!;
      const figures = FIGURES[set.level]![set.from + at]!;
      const value = work.firstValue + at;
      const standard = set.firstStandard + at;
      yield line(
        ...[value + 1, identifier(country.seed, 'value', value, work.issuedOn), revision, at + 1],
        ...[
          standardRowId(country, 'standard', set, standard),
          standardRowId(country, 'epoch', set, standard),
        ],
        ...[grade.quantity, isRoot ? 'vacuum' : 'air', NULL, piece.column],
        ...[deviationText(country, work, standard, figures), 'mg', figures.decimals],
        ...[figures.expandedUText, figures.decimals, 2, 0.9545, NULL, figures.u],
        ...[
          localU(country, work, set.from + at),
          origin,
          isGroup ? 13 : NULL,
          isGroup ? estimateOf(work) : NULL,
        ],
        ...[isRoot ? 'realization run' : NULL, scale, grade.class ?? NULL, isClaimed, 0, work.changed],
        ...[dayText(performedEnd(work)), 'day', dayText(work.issuedOn), ...recorded(work.issuedOn)],
        ...[...parties, piece.decade, ENGINE_VERSION],
      );
    }
  }
}

/** Where the local part comes from: a design, the laboratory's own components, or what U leaves. */
function originOf(_country: Country, { set }: Work): 'group' | 'components' | 'inferred' {
  if (set.isSubdivision) return 'group';
  return set.holder === set.issuer ? 'components' : 'inferred';
}

/** The name of what a design's residuals estimate: all of its values share its degrees of freedom. */
export function estimateOf(work: Work): string {
  return `design of certificate ${work.certificate}`;
}

/** A weight's true deviation and this result's scatter, rounded as printed. A text correction repeats the result. */
function deviationText(country: Country, work: Work, standard: number, figures: Figures): string {
  const { draw } = country;
  const trueDeviation = 2 * (draw(PURPOSE.trueValue, standard) - 0.5) * TRUE_PART * figures.limit;
  const result =
    work.certificate * 64 + (standard - work.set.firstStandard) + (work.changed === 'value' ? 32 : 0);
  const scatter = 2 * (draw(PURPOSE.noise, result) - 0.5) * SCATTER * figures.expandedU;
  const step = 10 ** (-figures.decimals - 3);
  return (Math.round((trueDeviation + scatter) / step) * step).toFixed(12);
}

function* endRows(country: Country, work: Work): Iterable<string> {
  const successor = country.works[work.replacedBy];
  const changed = work.ending === 'superseded: text' ? 'text' : 'value';
  const kind = work.ending === 'withdrawn' ? 'withdrawn' : 'superseded';
  const reason = work.ending === 'withdrawn' ? REASONS.withdrawn : REASONS[changed];
  const day = dayText(work.endsOn);
  for (let at = 0; at < work.set.count; at += 1) {
    const next = successor ? successor.firstValue + at + 1 : NULL;
    yield line(
      work.firstValue + at + 1,
      instantText(work.endsOn),
      kind,
      day,
      day,
      next,
      changed,
      reason,
      actOf(work.endsOn),
    );
  }
}

/** Identifier of the certificate: that of its first issue. */
function calibrationId(country: Country, work: Work): string {
  return identifier(country.seed, 'calibration', work.certificate, performedEnd(work));
}

/** Identifier of a revision. */
export function revisionId(country: Country, work: Work): string {
  return identifier(country.seed, 'revision', work.certificate * 2 + work.revisionN - 1, work.issuedOn);
}

/** Sheets were not written: any hash stands for them. */
function sheetHash(seed: number, place: number): string {
  return Array.from({ length: 8 }, (_, n) =>
    mixed(seed, 500 + n, place)
      .toString(16)
      .padStart(8, '0'),
  ).join('');
}

function recorded(day: number): [string, number] {
  return [instantText(day), actOf(day)];
}

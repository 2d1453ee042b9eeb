import type { Country } from './country.ts';
import { referencesOf } from './country.ts';
import { KILOGRAM, PIECES } from './pieces.ts';
import type { Work } from './work-list.ts';

/** A reference of a value: the value's number and the sensitivity to it. */
export interface ParentLink {
  value: number;
  sensitivity: number;
}

/**
 * What each piece of a revision leaned on, piece by piece. A piece weighed against pieces of its own nominal leans on
 * their mean; a subdivided one on the kilograms, by its part of a kilogram.
 */
export function parentLinks(country: Country, work: Work): ParentLink[][] {
  const references = referencesOf(country, work);
  return Array.from({ length: work.set.count }, (_, at) => {
    const piece = work.set.from + at;
    const used = work.set.isSubdivision ? KILOGRAM : piece;
    const part = work.set.isSubdivision ? Number(PIECES[piece]!.nominal) / 1000 : 1;
    return references.map((reference) => ({
      value: reference.firstValue + used - reference.set.from,
      sensitivity: part / references.length,
    }));
  });
}

/** Parents of every value, as one table: those of value `v` lie from `start[v]` to `start[v + 1]`. */
export interface ParentTable {
  start: Int32Array;
  parent: Int32Array;
}

/** Works out the parents of all values. */
export function parentTable(country: Country): ParentTable {
  const start = new Int32Array(country.valueCount + 1);
  const parent = new Int32Array(country.linkCount);
  let filled = 0;
  for (const work of country.works) {
    for (const [at, links] of parentLinks(country, work).entries()) {
      start[work.firstValue + at] = filled;
      for (const link of links) parent[filled++] = link.value;
    }
  }
  start[country.valueCount] = filled;
  return { start, parent };
}

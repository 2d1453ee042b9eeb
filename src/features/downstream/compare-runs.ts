import type { WhatIfGroup, WhatIfResponse } from '#shared/contracts/downstream.ts';

/** What two dry runs are compared by. */
export const MEASURES = ['verdict changes', 'material', 'largest shift', 'largest shift/U'] as const;
export type Measure = (typeof MEASURES)[number];

type Counted = Pick<WhatIfGroup, 'words' | 'largestShift' | 'largestRatio'>;

/** A measure of a group or of the whole; null where there is none. Shifts in grams. */
export function measured(of: Counted, measure: Measure): number | null {
  if (measure === 'verdict changes') return of.words.verdictChanges;
  if (measure === 'material') return of.words.material;
  return measure === 'largest shift' ? of.largestShift : of.largestRatio;
}

/** The whole of an answer as if it were one group. */
export function wholeOf({ total, groups }: Pick<WhatIfResponse, 'total' | 'groups'>): Counted {
  return {
    words: total.words,
    largestShift: largest(groups.map((group) => group.largestShift)),
    largestRatio: largest(groups.map((group) => group.largestRatio)),
  };
}

function largest(values: readonly (number | null)[]): number | null {
  return values.reduce<number | null>(
    (most, value) => (value === null ? most : Math.max(most ?? 0, value)),
    null,
  );
}

/** The measure that two answers are compared by where none is asked: the first that tells them apart. */
export function tellingMeasure(
  one: Pick<WhatIfResponse, 'total' | 'groups'>,
  other: Pick<WhatIfResponse, 'total' | 'groups'>,
): Measure {
  const pairs = [{ one: wholeOf(one), other: wholeOf(other) }, ...pairGroups(one.groups, other.groups)];
  const differs = (measure: Measure) =>
    pairs.some(
      (pair) => (pair.one && measured(pair.one, measure)) !== (pair.other && measured(pair.other, measure)),
    );
  return MEASURES.find(differs) ?? MEASURES[0];
}

/** One group in both answers; null where one of them has none of it. */
export interface GroupPair {
  key: string;
  laboratory: WhatIfGroup['laboratory'];
  one: WhatIfGroup | null;
  other: WhatIfGroup | null;
}

/** Groups of two answers side by side, in the order of the first; those of the second alone follow. */
export function pairGroups(one: readonly WhatIfGroup[], other: readonly WhatIfGroup[]): GroupPair[] {
  const ofOther = new Map(other.map((group) => [group.key, group]));
  const known = new Set(one.map(({ key }) => key));
  return [
    ...one.map((group) => ({
      key: group.key,
      laboratory: group.laboratory,
      one: group,
      other: ofOther.get(group.key) ?? null,
    })),
    ...other
      .filter(({ key }) => !known.has(key))
      .map((group) => ({ key: group.key, laboratory: group.laboratory, one: null, other: group })),
  ];
}

/** The second less the first; a group that one of them lacks counts as nothing there. Null where neither tells. */
export function differenceOf(one: number | null, other: number | null): number | null {
  return one === null && other === null ? null : (other ?? 0) - (one ?? 0);
}

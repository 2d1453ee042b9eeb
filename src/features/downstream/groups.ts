import type { DownstreamBy, WhatIfGroup, WhatIfSort } from '#shared/contracts/downstream.ts';
import { Decimal } from '#shared/decimal.ts';
import type { DecimalMark } from '#shared/engine/quantity/read-number.ts';
import { nominalText } from '#shared/numbers/nominal.ts';

/** How a grouping is called at the head of its column. */
export const GROUPED_BY: Record<DownstreamBy, string> = {
  laboratory: 'Laboratory',
  class: 'Class',
  nominal: 'Nominal',
  year: 'Year of calibration',
};

/** The groupings to choose from. */
export const GROUPINGS = [
  { value: 'laboratory', label: 'Laboratory' },
  { value: 'class', label: 'Class' },
  { value: 'nominal', label: 'Nominal' },
  { value: 'year', label: 'Year' },
] as const satisfies readonly { value: DownstreamBy; label: string }[];

/** What a group is called: a laboratory's name, a class, a decade of nominals, a year. */
export function groupName(
  { key, laboratory }: { key: string; laboratory: { name: string } | null },
  by: DownstreamBy,
  mark: DecimalMark = '.',
): string {
  if (by === 'laboratory') return laboratory?.name ?? key;
  if (by === 'class') return key === 'none' ? 'No class stated' : key;
  if (by === 'year') return key === 'withheld' ? 'Not told: weights of others' : key;
  const decade = (exponent: number) => nominalText(new Decimal(10).pow(exponent).toFixed(), mark);
  return `${decade(Number(key))} to under ${decade(Number(key) + 1)}`;
}

/** Groups in the order asked for, the worst first; equals stay as they came. */
export function inOrder(groups: readonly WhatIfGroup[], sort: WhatIfSort): WhatIfGroup[] {
  const size = (group: WhatIfGroup): number[] => {
    // What cannot be computed stands first: it is what needs somebody.
    if (sort === 'shift') return [group.largestShift ?? Infinity];
    if (sort === 'ratio') return [group.largestRatio ?? -1];
    return [group.words.verdictChanges, group.words.material];
  };
  return groups.toSorted((a, b) => {
    const [ofA, ofB] = [size(a), size(b)];
    const at = ofA.findIndex((value, index) => value !== ofB[index]);
    return at < 0 ? 0 : ofB[at]! - ofA[at]!;
  });
}

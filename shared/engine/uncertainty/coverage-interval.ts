import { item } from '../linear/entries.ts';

/** Which of the intervals with the coverage probability is taken. */
export const INTERVAL_KINDS = ['symmetric', 'shortest'] as const;

/** Equal probability in both tails, or the shortest interval. */
export type IntervalKind = (typeof INTERVAL_KINDS)[number];

/**
 * A coverage interval from model values in rising order.
 *
 * Source: JCGM 101:2008, 7.7.
 *
 * @param sorted model values in rising order, enough of them for the probability
 * @param probability coverage probability, between 0 and 1
 * @param kind which interval
 */
export function coverageInterval(
  sorted: Float64Array,
  probability: number,
  kind: IntervalKind,
): [number, number] {
  const trials = sorted.length;
  const inside = Math.min(trials - 1, Math.floor(probability * trials + 0.5));
  const at = (index: number): number => item(sorted, index);
  // The document counts from 1; here the first value has index 0.
  let first = Math.max(0, Math.floor((trials - inside + 1) / 2) - 1);
  if (kind === 'shortest') {
    for (let candidate = 0; candidate + inside < trials; candidate += 1) {
      if (at(candidate + inside) - at(candidate) < at(first + inside) - at(first)) first = candidate;
    }
  }
  return [at(first), at(first + inside)];
}

import type { CheckedResults } from './results.ts';
import { type WeightedMean, weightedMean, weightMatrix } from './weighted-mean.ts';

type Covariance = readonly (readonly number[])[];

/**
 * Between-laboratory variance after DerSimonian and Laird, before truncation at 0:
 * `(Q - (n - 1)) / (tr W - 1' W^2 1 / 1' W 1)`, which for uncorrelated results is the usual
 * `(Q - (n - 1)) / (sum w - sum w^2 / sum w)`. Negative where the results agree better than their uncertainties say.
 */
export function derSimonianLaird(checked: CheckedResults, covariance: Covariance): number {
  const weights = weightMatrix(checked.independent, covariance, checked.members, 0);
  const sums = weights.map((row) => row.reduce((sum, value) => sum + value, 0));
  const total = sums.reduce((sum, value) => sum + value, 0);
  const squares = sums.reduce((sum, value) => sum + value * value, 0);
  const trace = weights.reduce((sum, row, i) => sum + (checked.independent ? row[0]! : row[i]!), 0);
  const { chiSquared } = weightedMean(checked, covariance, checked.members);
  return (chiSquared - (checked.members.length - 1)) / (trace - squares / total);
}

/**
 * Between-laboratory variance after Paule and Mandel (1982 J. Res. NBS 87 377): the root of
 * `Q(tau^2) = n - 1`, 0 where already `Q(0) <= n - 1`. Q falls steadily, so halving an interval finds the root to the
 * last digits; a loose stop would not.
 */
export function pauleMandel(checked: CheckedResults, covariance: Covariance): number {
  const excess = (added: number) =>
    weightedMean(checked, covariance, checked.members, added).chiSquared - (checked.members.length - 1);
  if (excess(0) <= 0) return 0;
  let low = 0;
  let high = Math.max(...checked.members.map((i) => covariance[i]![i]!));
  while (excess(high) > 0) {
    low = high;
    high *= 4;
  }
  while (high - low > 1e-16 * high) {
    const middle = (low + high) / 2;
    if (middle <= low || middle >= high) break;
    if (excess(middle) > 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** The mean with a between-laboratory variance on every member: weights `1 / (u^2 + tau^2)`, or their GLS form. */
export function randomEffectsMean(
  checked: CheckedResults,
  covariance: Covariance,
  betweenVariance: number,
): WeightedMean {
  return weightedMean(checked, covariance, checked.members, betweenVariance);
}

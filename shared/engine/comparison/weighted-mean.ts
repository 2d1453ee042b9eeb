import { inverseSymmetric } from '../linear/matrix.ts';
import type { CheckedResults } from './results.ts';

/** A weighted mean over members, and the chi-squared of the members about it. */
export type WeightedMean = {
  value: number;
  variance: number;
  /** By place among all results; 0 outside the members. Sums to 1. */
  coefficients: number[];
  chiSquared: number;
};

/**
 * The generalised least squares mean of the members: `w = W 1 / (1' W 1)`, `u^2 = 1 / (1' W 1)`, `W` the inverse of
 * their covariance with `added` on the diagonal. For uncorrelated results this is the inverse-variance weighted
 * mean of procedure A (Cox 2002 Metrologia 39 589). Weights may be negative for correlated results.
 * @throws EngineError `singular` where correlations are complete
 */
export function weightedMean(
  checked: Pick<CheckedResults, 'values' | 'independent'>,
  covariance: readonly (readonly number[])[],
  members: readonly number[],
  added = 0,
): WeightedMean {
  const weights = weightMatrix(checked.independent, covariance, members, added);
  const sums = weights.map((row) => row.reduce((sum, value) => sum + value, 0));
  const total = sums.reduce((sum, value) => sum + value, 0);
  // Differences from one member keep the digits that large values would lose.
  const origin = checked.values[members[0]!]!;
  const offsets = members.map((i) => checked.values[i]! - origin);
  const mean = offsets.reduce((sum, offset, i) => sum + (sums[i]! / total) * offset, 0);
  const residuals = offsets.map((offset) => offset - mean);
  const coefficients = checked.values.map(() => 0);
  members.forEach((place, i) => (coefficients[place] = sums[i]! / total));
  return {
    value: origin + mean,
    variance: 1 / total,
    coefficients,
    chiSquared: quadratic(weights, residuals),
  };
}

/** The inverse covariance of the members; a diagonal is inverted as such, and its rows are one entry wide. */
export function weightMatrix(
  independent: boolean,
  covariance: readonly (readonly number[])[],
  members: readonly number[],
  added: number,
): number[][] {
  if (independent) return members.map((i) => [1 / (covariance[i]![i]! + added)]);
  const sub = members.map((i) => members.map((j) => covariance[i]![j]! + (i === j ? added : 0)));
  return inverseSymmetric(sub, 'covariance');
}

function quadratic(weights: readonly (readonly number[])[], x: readonly number[]): number {
  const isDiagonal = weights[0]!.length === 1 && x.length > 1;
  return weights.reduce((total, row, i) => {
    const pulled = isDiagonal ? row[0]! * x[i]! : row.reduce((sum, value, j) => sum + value * x[j]!, 0);
    return total + pulled * x[i]!;
  }, 0);
}

import { quadraticForm } from '../linear/matrix.ts';
import { requireSize } from '../quantity/domain.ts';
import type { ReferenceValue } from './reference-value.ts';
import { checkedResults, type Results, statedCovariance } from './results.ts';

/** A result's difference from the reference value, with U at k = 2 and their ratio. */
export type DegreeOfEquivalence = {
  difference: number;
  expandedUncertainty: number;
  /** `d / U(d)`: a normalised error that knows whether the result counts in the reference value. */
  en: number;
  /** Where the reference value is a simulated median: 95 % interval of the difference, not symmetric. */
  interval?: [number, number];
};

/**
 * Unilateral degrees of equivalence of all results, members or not, by the one formula for any linear reference
 * value: `u^2(d_i) = k' V k`, `k` the sensitivities of `x_i - sum c_j x_j`. The minus sign of members of an
 * inverse-variance mean and the plus sign of outsiders (Cox 2002 Metrologia 39 589) both follow from it.
 * Written with `1 - c_i = sum of the other c`, so that one dominant laboratory does not come out with U = 0.
 * @param options.includeBetweenVariance count the variance between laboratories as part of each result's own
 * @throws EngineError `missing-uncertainties`, `size-mismatch`, those of `checkedResults`
 */
export function degreesOfEquivalence(
  r: Results,
  ref: Pick<ReferenceValue, 'value' | 'coefficients'> & Partial<ReferenceValue>,
  options: { includeBetweenVariance?: boolean } = {},
): DegreeOfEquivalence[] {
  const checked = checkedResults(r);
  const covariance = statedCovariance(checked);
  requireSize(ref.coefficients.length, checked.values.length, 'ref.coefficients', 'results');
  const added = options.includeBetweenVariance ? (ref.betweenVariance ?? 0) : 0;
  const widened = covariance.map((row, i) => row.map((value, j) => (i === j ? value + added : value)));
  return checked.values.map((x, i) => {
    const simulated = ref.differences?.[i];
    const variance = simulated
      ? simulated.standardUncertainty ** 2
      : quadraticForm(widened, differenceFrom(ref.coefficients, i));
    const degree = equivalence(x - ref.value, variance);
    return simulated ? { ...degree, interval: simulated.interval } : degree;
  });
}

/** Sensitivities of `x_i - sum c_j x_j`. */
function differenceFrom(coefficients: readonly number[], i: number): number[] {
  const others = coefficients.reduce((sum, c, j) => (j === i ? sum : sum + c), 0);
  return coefficients.map((c, j) => (j === i ? others : -c));
}

/** Difference, U at k = 2, and ratio; a difference of 0 with U = 0 (the reference value is the result) has ratio 0. */
export function equivalence(difference: number, variance: number): DegreeOfEquivalence {
  const expandedUncertainty = 2 * Math.sqrt(Math.max(0, variance));
  return { difference, expandedUncertainty, en: difference === 0 ? 0 : difference / expandedUncertainty };
}

/**
 * Every pair of results: the difference and its U at k = 2, `u^2 = V_ii + V_jj - 2 V_ij`. The reference value cancels,
 * so a pair may disagree in a comparison that is consistent as a whole. Source: Cox 2002 Metrologia 39 589.
 * @throws EngineError `missing-uncertainties`, those of `checkedResults`
 */
export function pairwise(
  r: Results,
): { i: number; j: number; difference: number; expandedUncertainty: number }[] {
  const checked = checkedResults(r);
  const covariance = statedCovariance(checked);
  return checked.values.flatMap((x, i) =>
    checked.values.slice(i + 1).map((other, offset) => {
      const j = i + 1 + offset;
      const variance = covariance[i]![i]! + covariance[j]![j]! - 2 * covariance[i]![j]!;
      return { i, j, difference: x - other, expandedUncertainty: 2 * Math.sqrt(Math.max(0, variance)) };
    }),
  );
}

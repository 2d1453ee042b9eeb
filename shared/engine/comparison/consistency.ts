import { inverseSymmetric } from '../linear/matrix.ts';
import { requireLevel, requireNumber } from '../quantity/domain.ts';
import { chiSquaredUpperPoint, chiSquaredUpperTail } from './chi-squared.ts';
import { checkedResults, requireMembers, type Results, statedCovariance } from './results.ts';
import { weightedMean } from './weighted-mean.ts';

/** Whether results agree with one another within their stated uncertainties. */
export type Consistency = {
  chiSquared: number;
  degreesOfFreedom: number;
  pValue: number;
  /** Upper point of chi-squared at the level, above which the results are called inconsistent. */
  critical: number;
  consistent: boolean;
  /** `sqrt(chi^2 / nu)`; 0 for a single result. */
  birgeRatio: number;
  /** `sqrt(1 + sqrt(2 / nu))`: one standard deviation of chi-squared; and two, `sqrt(1 + sqrt(8 / nu))`. */
  birgeLimits: { one: number; two: number };
};

/**
 * Chi-squared test of the results that count about their own weighted mean, with the full covariance; the upper
 * point counts (one-sided). It passes or fails the set as a whole and says nothing about single pairs.
 * @param level probability of calling consistent results inconsistent; 0.05 by custom
 * @throws EngineError `missing-uncertainties`, `out-of-range`, those of `checkedResults`; `too-few-values` for fewer than two
 */
export function consistency(r: Results, level = 0.05): Consistency {
  requireLevel(level);
  const checked = checkedResults(r);
  // One result cannot be consistent or not.
  requireMembers(checked, 2);
  const { chiSquared } = weightedMean(checked, statedCovariance(checked), checked.members);
  const degreesOfFreedom = checked.members.length - 1;
  const critical = chiSquaredUpperPoint(level, degreesOfFreedom);
  return {
    ...observed(chiSquared, degreesOfFreedom),
    critical,
    consistent: chiSquared <= critical,
    birgeLimits: {
      one: Math.sqrt(1 + Math.sqrt(2 / degreesOfFreedom)),
      two: Math.sqrt(1 + Math.sqrt(8 / degreesOfFreedom)),
    },
  };
}

/** Chi-squared with its probability and Birge ratio (Birge 1932 Phys. Rev. 40 207). */
export function observed(
  chiSquared: number,
  degreesOfFreedom: number,
): Pick<Consistency, 'chiSquared' | 'degreesOfFreedom' | 'pValue' | 'birgeRatio'> {
  return {
    chiSquared,
    degreesOfFreedom,
    pValue: chiSquaredUpperTail(chiSquared, degreesOfFreedom),
    birgeRatio: degreesOfFreedom === 0 ? 0 : Math.sqrt(chiSquared / degreesOfFreedom),
  };
}

/**
 * Chi-squared of all results, members or not, about a given value: some reports sum over more participants than
 * define the reference value, and then state their own degrees of freedom.
 * Source: JCGM 102:2011, quadratic form of the residuals (from memory).
 * @throws EngineError `not-finite`, `missing-uncertainties`, `singular`, those of `checkedResults`
 */
export function chiSquaredAbout(r: Results, value: number): number {
  requireNumber(value, 'value');
  const checked = checkedResults(r);
  const weights = inverseSymmetric(statedCovariance(checked), 'covariance');
  const residuals = checked.values.map((x) => x - value);
  return weights.reduce(
    (total, row, i) =>
      total + residuals[i]! * row.reduce((sum, weight, j) => sum + weight * residuals[j]!, 0),
    0,
  );
}

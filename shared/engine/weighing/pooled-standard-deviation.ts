import { EngineError } from '../errors.ts';
import { requireNumber } from '../quantity/domain.ts';

/** An estimate of a standard deviation with the degrees of freedom behind it. */
export type PrecisionEstimate = { standardDeviation: number; degreesOfFreedom: number };

/**
 * One standard deviation out of several series under the same conditions: variances averaged with their
 * degrees of freedom as weights. Any unit, the same throughout. Source: JCGM 100:2008, 4.2.4 and H.3.6 note.
 * @throws EngineError `too-few-values` without estimates; `out-of-range`, `not-finite`
 */
export function pooledStandardDeviation(estimates: readonly PrecisionEstimate[]): PrecisionEstimate {
  if (estimates.length === 0) {
    throw new EngineError('too-few-values', 'estimates', 'no standard deviation', 'At least one is needed.');
  }
  let degreesOfFreedom = 0;
  let sum = 0;
  estimates.forEach((estimate, i) => {
    requireNumber(estimate.standardDeviation, `estimates[${i}].standardDeviation`, { min: 0 });
    requireNumber(estimate.degreesOfFreedom, `estimates[${i}].degreesOfFreedom`, { above: 0 });
    degreesOfFreedom += estimate.degreesOfFreedom;
    sum += estimate.degreesOfFreedom * estimate.standardDeviation ** 2;
  });
  return { standardDeviation: Math.sqrt(sum / degreesOfFreedom), degreesOfFreedom };
}

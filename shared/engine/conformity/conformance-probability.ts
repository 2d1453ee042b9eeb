import { EngineError } from '../errors.ts';
import { requireNumber } from '../quantity/domain.ts';
import { normalBetween } from '../uncertainty/normal-distribution.ts';

/**
 * Checks a pair of limits of which at least one is given; a missing one becomes infinite.
 *
 * @param lower lower limit
 * @param upper upper limit, more than the lower one
 * @param names names of the two arguments, for messages
 * @throws EngineError `missing-limit`, `not-finite` or `out-of-range`
 */
export function requireLimits(
  lower: number | undefined,
  upper: number | undefined,
  names: readonly [string, string] = ['lower', 'upper'],
): { lower: number; upper: number } {
  if (lower === undefined && upper === undefined) {
    throw new EngineError(
      'missing-limit',
      names[0],
      'nothing',
      `Give ${names[0]}, ${names[1]} or both: there is no limit.`,
    );
  }
  const checkedLower = lower === undefined ? -Infinity : requireNumber(lower, names[0]);
  if (upper === undefined) return { lower: checkedLower, upper: Infinity };
  const bounds = lower === undefined ? {} : { above: checkedLower };
  return { lower: checkedLower, upper: requireNumber(upper, names[1], bounds) };
}

/**
 * The probability that a quantity lies within its tolerance, for a normal distribution about the measured value.
 *
 * Source: JCGM 106:2012, 7.3.1 and 7.4, equations for one-sided and two-sided tolerance intervals.
 *
 * @param a.value measured value
 * @param a.standardUncertainty its standard uncertainty, not negative; zero gives 0 or 1
 * @param a.lower lower tolerance limit; none when left out
 * @param a.upper upper tolerance limit; none when left out
 * @returns 0 to 1
 * @throws EngineError `missing-limit`, `not-finite` or `out-of-range`
 */
export function conformanceProbability(a: {
  value: number;
  standardUncertainty: number;
  lower?: number;
  upper?: number;
}): number {
  const value = requireNumber(a.value, 'value');
  const u = requireNumber(a.standardUncertainty, 'standardUncertainty', { min: 0 });
  const { lower, upper } = requireLimits(a.lower, a.upper);
  if (u === 0) return value >= lower && value <= upper ? 1 : 0;
  return normalBetween((lower - value) / u, (upper - value) / u);
}

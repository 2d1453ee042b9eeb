import { EngineError } from '../errors.ts';
import { requireNumber } from '../quantity/domain.ts';
import { requireLimits } from './conformance-probability.ts';

/**
 * Acceptance limits inside (or, with a negative multiplier, outside) tolerance limits by a guard band of
 * `multiplier * U`.
 *
 * Source: JCGM 106:2012, 8.3.2 (guarded acceptance, w = r U) and 8.3.3 (guarded rejection).
 *
 * @param a.lower lower tolerance limit; none when left out
 * @param a.upper upper tolerance limit; none when left out
 * @param a.expandedUncertainty U in the unit of the limits, not negative
 * @param a.multiplier r, -10 to 10
 * @returns the acceptance limits for the limits given
 * @throws EngineError `missing-limit`, `not-finite`, `out-of-range`, or `empty-acceptance` where the guard bands
 *   leave nothing between them
 */
export function guardBandedAcceptance(a: {
  lower?: number;
  upper?: number;
  expandedUncertainty: number;
  multiplier: number;
}): { lower?: number; upper?: number } {
  requireLimits(a.lower, a.upper);
  const expanded = requireNumber(a.expandedUncertainty, 'expandedUncertainty', { min: 0 });
  const guard = expanded * requireNumber(a.multiplier, 'multiplier', { min: -10, max: 10 });
  const lower = a.lower === undefined ? undefined : a.lower + guard;
  const upper = a.upper === undefined ? undefined : a.upper - guard;
  if (lower !== undefined && upper !== undefined && lower > upper) {
    throw new EngineError(
      'empty-acceptance',
      'expandedUncertainty',
      a.expandedUncertainty,
      `Guard bands of ${guard} leave nothing between ${a.lower} and ${a.upper}. A smaller uncertainty is needed.`,
    );
  }
  return { ...(lower === undefined ? {} : { lower }), ...(upper === undefined ? {} : { upper }) };
}

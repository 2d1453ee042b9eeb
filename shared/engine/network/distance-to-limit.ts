import { type Decimal } from '#shared/decimal.ts';
import { EngineError } from '../errors.ts';
import { requireNumber } from '../quantity/domain.ts';

/** How far something may move either way; null: without limit. */
export type DistanceToLimit = { upwards: number | null; downwards: number | null };

/**
 * How wrong what a value leans on may be before the value itself passes a limit: the room left on each side over the
 * sensitivity, in a linear network. A limit on |deviation|, both in one unit; the answer in that unit over the
 * sensitivity's.
 * Source: the linear model of JCGM 102:2011, 6.2.
 * @param a.largest the largest |deviation| that is still within the limit
 * @param a.sensitivity change of the value per change of what it leans on; 0 moves nothing, however wrong
 * @throws EngineError `out-of-range` where the value is beyond the limit already, `not-finite` for the sensitivity
 */
export function distanceToLimit(a: {
  deviation: Decimal;
  largest: Decimal;
  sensitivity: number;
}): DistanceToLimit {
  requireNumber(a.sensitivity, 'sensitivity');
  if (a.deviation.abs().gt(a.largest)) {
    throw new EngineError(
      'out-of-range',
      'deviation',
      a.deviation.toFixed(),
      `At most ${a.largest.toFixed()} either way is expected: beyond it no distance is left.`,
    );
  }
  if (a.sensitivity === 0) return { upwards: null, downwards: null };
  const size = Math.abs(a.sensitivity);
  const above = a.largest.minus(a.deviation).div(size).toNumber();
  const below = a.largest.plus(a.deviation).div(size).toNumber();
  return a.sensitivity > 0 ? { upwards: above, downwards: below } : { upwards: below, downwards: above };
}

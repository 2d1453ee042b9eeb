import type { Decimal } from '#shared/decimal.ts';
import { requireChoice, requireDecimal, requireNumber } from '../quantity/domain.ts';
import { DENSITY_TABLE, WEIGHT_CLASSES, type DensityInterval, type WeightClass } from './r111-2004.ts';

/** From this nominal value up, in g, one row of the table holds. */
const LARGEST_ROW = 100;

/** Density of the reference weights of the convention, kg/m3 (OIML D 28:2004, 4). */
const REFERENCE_DENSITY = 8000;

/** Ten per cent of the reference air density of 1.2 kg/m3. */
const AIR_DENSITY_CHANGE = 0.12;

/**
 * The density limits of a class, in kg/m3.
 *
 * Source: OIML R 111-1:2004, 10, Table 5, from memory: say so wherever it is shown.
 *
 * @param weightClass accuracy class
 * @param nominal nominal value in g, more than zero
 * @returns lower and upper limit (null: no upper limit), or null where the table has no limit
 * @throws EngineError `unknown-choice`, `not-finite` or `out-of-range`
 */
export function densityLimits(weightClass: WeightClass, nominal: Decimal): DensityInterval | null {
  requireChoice(weightClass, 'class', WEIGHT_CLASSES);
  const checked = requireDecimal(nominal, 'nominal', 'positive');
  const row = checked.gte(LARGEST_ROW) ? String(LARGEST_ROW) : checked.toFixed();
  return DENSITY_TABLE[row]?.[weightClass] ?? null;
}

/**
 * The densities at which a change of 10 % in the air density moves the result by a quarter of the maximum
 * permissible error: `1/rho = 1/8000 -+ (MPE/m) / (4 * 0.12)`.
 *
 * Source: OIML R 111-1:2004, 10.1 (from memory).
 *
 * @param mpe maximum permissible error in mg, more than zero
 * @param nominal nominal value in g, more than zero
 * @returns lower and upper limit in kg/m3; null: no upper limit
 * @throws EngineError `not-finite` or `out-of-range`
 */
export function densityLimitsByRule(mpe: Decimal, nominal: Decimal): DensityInterval {
  const limit = requireDecimal(mpe, 'mpe', 'positive');
  // mg per g is 1e-3 of the ratio of masses.
  const relative = limit.div(requireDecimal(nominal, 'nominal', 'positive')).times('1e-3');
  const halfWidth = requireNumber(relative.div(AIR_DENSITY_CHANGE).div(4).toNumber(), 'mpe');
  const lower = 1 / (1 / REFERENCE_DENSITY + halfWidth);
  const inverseUpper = 1 / REFERENCE_DENSITY - halfWidth;
  return [lower, inverseUpper > 0 ? 1 / inverseUpper : null];
}

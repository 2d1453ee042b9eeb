import type { Decimal } from '#shared/decimal.ts';
import { requireChoice, requireDecimal } from '../quantity/domain.ts';
import { POLARIZATION_TABLE, SUSCEPTIBILITY_TABLE, WEIGHT_CLASSES, type WeightClass } from './r111-2004.ts';

/**
 * The largest magnetic polarization of a class, in microtesla.
 *
 * Source: OIML R 111-1:2004, 9.1, Table 3 (read in a reproduction of the table).
 *
 * @throws EngineError `unknown-choice`
 */
export function polarizationLimit(weightClass: WeightClass): number {
  return POLARIZATION_TABLE[requireChoice(weightClass, 'class', WEIGHT_CLASSES)];
}

/**
 * The largest magnetic susceptibility of a class, a pure number.
 *
 * Source: OIML R 111-1:2004, 9.1, Table 4 (read in a reproduction of the table).
 *
 * @param weightClass accuracy class
 * @param nominal nominal value in g, more than zero
 * @returns null where the table has no limit
 * @throws EngineError `unknown-choice`, `not-finite` or `out-of-range`
 */
export function susceptibilityLimit(weightClass: WeightClass, nominal: Decimal): number | null {
  requireChoice(weightClass, 'class', WEIGHT_CLASSES);
  const checked = requireDecimal(nominal, 'nominal', 'positive');
  const range = SUSCEPTIBILITY_TABLE.find(({ upTo }) => checked.lte(upTo));
  return range?.limits[weightClass] ?? null;
}

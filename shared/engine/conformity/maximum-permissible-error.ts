import { Decimal } from '#shared/decimal.ts';
import { requireChoice, requireDecimal } from '../quantity/domain.ts';
import { MPE_TABLE, WEIGHT_CLASSES, type WeightClass } from './r111-2004.ts';

/**
 * The maximum permissible error of a weight's conventional mass, in mg, without sign.
 *
 * Source: OIML R 111-1:2004, 5.1, Table 1 (read in a reproduction of the table).
 *
 * @param weightClass accuracy class
 * @param nominal nominal value in g, more than zero
 * @returns null where the class is not defined at that nominal value; only 1, 2 and 5 times a power of ten are
 * @throws EngineError `unknown-choice` for the class; `not-finite` or `out-of-range` for the nominal
 */
export function maximumPermissibleError(weightClass: WeightClass, nominal: Decimal): Decimal | null {
  requireChoice(weightClass, 'class', WEIGHT_CLASSES);
  const row = MPE_TABLE[requireDecimal(nominal, 'nominal', 'positive').toFixed()];
  const limit = row?.[weightClass];
  return limit === undefined ? null : new Decimal(limit);
}

import { Decimal } from '#shared/decimal.ts';
import { requireNumber } from '../quantity/domain.ts';
import { isWithinThird } from './class-conformity.ts';
import { maximumPermissibleError } from './maximum-permissible-error.ts';
import { WEIGHT_CLASSES, type WeightClass } from './r111-2004.ts';

/**
 * The classes that a weight with this uncertainty can be shown to keep: U <= MPE/3, finest first. A weight calibrated
 * against a reference cannot do better than the reference's own U.
 *
 * Source: OIML R 111-1:2004, 5.2 (second-hand).
 *
 * @param nominal in g
 * @param expandedUncertainty in mg, k = 2
 * @throws EngineError `not-finite` or `out-of-range`, naming the argument
 */
export function reachableClasses(nominal: Decimal, expandedUncertainty: number): WeightClass[] {
  const held = new Decimal(requireNumber(expandedUncertainty, 'expandedUncertainty', { min: 0, unit: 'mg' }));
  return WEIGHT_CLASSES.filter((weightClass) => {
    const mpe = maximumPermissibleError(weightClass, nominal);
    return mpe !== null && isWithinThird(held, mpe);
  });
}

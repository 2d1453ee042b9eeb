import type { AsNowKnown } from '#shared/contracts/chains.ts';
import { Decimal } from '#shared/decimal.ts';
import { classConformity } from '#shared/engine/conformity/class-conformity.ts';
import type { WeightClass } from '#shared/engine/conformity/r111-2004.ts';
import type { Chain } from './chain.service.ts';
import type { Move } from './moves.ts';

const MILLIGRAMS_PER_GRAM = 1000;
/** The coverage factor that OIML R 111-1, 5.2 and 5.3 speak of. */
const K = 2;

/**
 * Whether the declared rule accepts the class stated for the focus, as certified and as now known: its certificate's
 * U, and that U with what its chain has gained since. Classes speak of conventional mass.
 */
export function keepsClass({ focus, now }: Chain, move: Move): AsNowKnown['keepsClass'] {
  const { class: name, quantity, uStated } = focus;
  if (!now || name === null || quantity !== 'conventional mass' || uStated === null) return null;
  if (move.shift === null || now.addedVariance === null) return null;
  const accepts = (deviation: Decimal, u: number): boolean | null => {
    const found = classConformity({
      class: name as WeightClass,
      nominal: new Decimal(focus.nominal),
      deviation: deviation.times(MILLIGRAMS_PER_GRAM),
      expandedUncertainty: K * u * MILLIGRAMS_PER_GRAM,
      decisionRule: focus.decisionRule ?? 'guarded',
    });
    return found.conforms === null ? null : found.conforms && found.uncertaintyAllowed !== false;
  };
  const stated = new Decimal(focus.deviation);
  const certified = accepts(stated, uStated);
  const after = accepts(stated.plus(move.shift), Math.sqrt(Math.max(0, uStated ** 2 + now.addedVariance)));
  return certified === null || after === null ? null : { certified, now: after };
}

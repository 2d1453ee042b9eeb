import type { DistanceResponse } from '#shared/contracts/distance.ts';
import { Decimal } from '#shared/decimal.ts';
import { classConformity } from '#shared/engine/conformity/class-conformity.ts';
import type { WeightClass } from '#shared/engine/conformity/r111-2004.ts';
import { distanceToLimit } from '#shared/engine/network/distance-to-limit.ts';
import { today, type Context } from '#server/http/context.ts';
import {
  chainNumbers,
  closureOn,
  storeOf,
  type ChainSubject,
  type StoredValue,
} from '#server/modules/chains/index.ts';
import { reachOf } from './reach.service.ts';
import { withdrawnAbove } from './withdrawn-above.queries.ts';
import { shortText } from './short-text.ts';

const MILLIGRAMS_PER_GRAM = 1000;
/** The coverage factor that OIML R 111-1, 5.2 and 5.3 speak of. */
const K = 2;

/** The largest |deviation| that the declared rule accepts for a value's class, g, and the rule; or why there is none. */
type Limit = { because: string } | { because: null; largest: Decimal; rule: string };

/**
 * How wrong each ancestor may be before the value leaves its class, and what the value can still carry as a
 * reference. Distances rest on the certificate: its deviation, its U, its class and the rule it declares.
 * @param isHistorySeen whether this person sees the weight's other calibrations, of which its drift tells
 */
export async function distanceOf(
  context: Context,
  subject: ChainSubject,
  isHistorySeen: boolean,
): Promise<DistanceResponse> {
  const store = storeOf(context.database);
  await store.catchUp();
  const closure = await closureOn(store, [subject.id], today(context));
  const focus = closure.values.find((value) => value.id === subject.id)!;
  const numbers = chainNumbers(closure, focus.uid);
  const limit = limitOf(focus);
  const deviation = new Decimal(focus.deviation);
  const room = limit.because === null ? limit.largest.minus(deviation.abs()) : null;
  const isBeyond = room !== null && room.lt(0);
  const ancestors =
    limit.because !== null || isBeyond
      ? []
      : closure.values
          .filter((value) => value.id !== focus.id)
          .reverse()
          .map((value) => {
            const sensitivity = numbers.propagation.sensitivities[value.uid] ?? 0;
            return ancestorDistance(value, sensitivity, { deviation, largest: limit.largest });
          });
  const variance = numbers.variance(focus.uid);
  return {
    focusUid: focus.uid,
    registryNo: focus.registryNo,
    class: focus.class as WeightClass | null,
    because: isBeyond ? 'By the declared rule it does not keep its class as it stands.' : limit.because,
    rule: limit.because === null ? limit.rule : null,
    room: room?.toNumber() ?? null,
    ancestors,
    reach: await reachOf(context, focus, {
      u: variance === null ? focus.uStated : Math.sqrt(variance),
      isHistorySeen,
      reserves: await withdrawnAbove(context, focus, closure.values),
    }),
  };
}

function ancestorDistance(
  value: StoredValue,
  sensitivity: number,
  focus: { deviation: Decimal; largest: Decimal },
): DistanceResponse['ancestors'][number] {
  const { upwards, downwards } = distanceToLimit({ ...focus, sensitivity });
  const isLimited = upwards !== null && downwards !== null;
  return {
    uid: value.uid,
    registryNo: value.registryNo,
    nominal: value.nominal,
    sensitivity,
    upwards,
    downwards,
    text: isLimited ? shortText(Math.min(upwards, downwards), 'down') : null,
  };
}

function limitOf(value: StoredValue): Limit {
  if (value.class === null) return { because: 'Its certificate states no class.' };
  if (value.quantity === 'mass')
    return { because: 'The classes limit conventional mass; its certificate states mass.' };
  if (value.expandedU === null || value.k === null)
    return { because: 'Its certificate states no U with its k.' };
  const expandedU = new Decimal(value.expandedU).times(K).div(value.k);
  const decisionRule = value.decisionRule ?? 'guarded';
  const { mpe, rule } = classConformity({
    class: value.class as WeightClass,
    nominal: new Decimal(value.nominal),
    deviation: new Decimal(value.deviation).times(MILLIGRAMS_PER_GRAM),
    expandedUncertainty: expandedU.times(MILLIGRAMS_PER_GRAM).toNumber(),
    decisionRule,
  });
  if (mpe === null) return { because: 'Its class has no maximum permissible error at this nominal value.' };
  const limit = mpe.div(MILLIGRAMS_PER_GRAM);
  return { because: null, rule, largest: decisionRule === 'guarded' ? limit.minus(expandedU) : limit };
}

import type { DistanceResponse } from '#shared/contracts/distance.ts';
import { Decimal } from '#shared/decimal.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import { reachableClasses } from '#shared/engine/conformity/reachable-classes.ts';
import { dayNumber } from '#shared/engine/time/calendar.ts';
import { today, type Context } from '#server/http/context.ts';
import type { StoredValue } from '#server/modules/chains/index.ts';
import { driftOf } from './drift.service.ts';
import { expandedUAfter, lastDayWithin, type Ageing } from './reach-until.ts';
import { shortText } from './short-text.ts';

const MILLIGRAMS_PER_GRAM = 1000;
const MILLISECONDS_PER_DAY = 86_400_000;
/** The coverage factor that OIML R 111-1, 5.2 speaks of. */
const K = 2;

type Reach = DistanceResponse['reach'];

/**
 * What a value can still carry as a reference: a weight of the same nominal, weighed against it without any
 * uncertainty of its own, on the day of its calibration and, where its drift is known, on later ones.
 * @param u standard uncertainty of the value, g; null where unknown
 * @param reserves what is known against what it rests on, in sentences
 * @param isHistorySeen whether this person sees the weight's other calibrations
 */
export async function reachOf(
  context: Context,
  focus: StoredValue,
  { u, isHistorySeen, reserves }: { u: number | null; isHistorySeen: boolean; reserves: string[] },
): Promise<Reach> {
  const nothing = {
    ...{ bestExpandedU: null, bestText: null, classes: [], expandedUToday: null, textToday: null },
    reserves,
  };
  if (u === null) {
    return { ...nothing, drift: null, driftBecause: 'Its uncertainty is not known.', until: [] };
  }
  const best = K * u;
  const nominal = new Decimal(focus.nominal);
  const classes = reachableClasses(nominal, best * MILLIGRAMS_PER_GRAM);
  const atCalibration = { bestExpandedU: best, bestText: shortText(best, 'up'), classes };
  // A drift tells of the weight's other calibrations: those are its holder's.
  const { drift, because, doubted } = isHistorySeen
    ? await driftOf(context, focus)
    : { drift: null, because: 'Its drift is told to its holder.', doubted: [] };
  if (!drift) {
    return { ...nothing, ...atCalibration, drift: null, driftBecause: because, until: [] };
  }
  const ageing: Ageing = { u, rate: drift.perYear, rateU: drift.u };
  const begin = dayNumber(focus.performedEnd, 'performedEnd');
  const now = expandedUAfter(ageing, Math.max(0, dayNumber(today(context), 'day') - begin));
  const day = today(context);
  return {
    ...atCalibration,
    reserves: [...reserves, ...doubtWords(doubted)],
    drift,
    driftBecause: null,
    expandedUToday: now,
    textToday: shortText(now, 'up'),
    until: classes.map((each) => {
      const third = maximumPermissibleError(each, nominal)!
        .div(3 * MILLIGRAMS_PER_GRAM)
        .toNumber();
      const days = lastDayWithin(ageing, third);
      const last = days === null ? null : dayText(begin + days);
      return { class: each, last, isPast: last !== null && last < day };
    }),
  };
}

function doubtWords(doubted: readonly string[]): string[] {
  if (doubted.length === 0) return [];
  const certificates = doubted.join(', ');
  return [
    `Its drift counts the value of certificate ${certificates}, whose sign does not fit the others (B-17): it may be far less.`,
  ];
}

function dayText(day: number): string {
  return new Date(day * MILLISECONDS_PER_DAY).toISOString().slice(0, 10);
}

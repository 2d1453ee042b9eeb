import { Decimal, decimalText } from '#shared/decimal.ts';
import { noticesInForce } from '#shared/notices/in-force.ts';
import type { ChainStore } from './chain-store.ts';
import { entriesOf, handedDown, passes, usedByNotice } from './noticed-closure.ts';
import type { StoredLink, StoredValue } from './stored.ts';

/** A value as corrected by notices, as a link keeps what was used. Grams; U and k null where none is stated. */
export interface CorrectedValue {
  usedDeviation: string;
  usedExpandedU: string | null;
  usedK: string | null;
}

/** Places of a gram that the register keeps. */
const PLACES = 12;
/** Everything recorded counts here: what matters is what was made known by the day of use. */
const FOREVER = '9999-12-31';

/**
 * Values as corrected by the notices in force on a day and made known by then. What a value's own references had counted
 * stands in its certificate already, and is not brought a second time.
 * @param ids values of the register
 * @param day last day of use, ISO
 */
export async function correctedByNotices(
  store: ChainStore,
  ids: readonly number[],
  day: string,
): Promise<Map<number, CorrectedValue>> {
  await store.catchUp();
  const known = store.notices.filter(({ madeKnownOn }) => madeKnownOn <= day);
  const closure = await store.closure(ids);
  const sums = new Map(ids.map((id) => [id, { shift: 0, u: 0 }]));
  for (const [notice, entries] of entriesOf(closure, noticesInForce(known, day, FOREVER))) {
    const isLeftOut = (link: StoredLink) => passes(link) && !usedByNotice(link, notice);
    const shifts = handedDown(closure, entries, 'shift', isLeftOut);
    const us = handedDown(closure, entries, 'u', isLeftOut);
    for (const [id, sum] of sums) {
      sum.shift += shifts.get(id) ?? 0;
      sum.u = Math.hypot(sum.u, us.get(id) ?? 0);
    }
  }
  const byId = new Map(closure.values.map((value) => [value.id, value]));
  return new Map([...sums].map(([id, sum]) => [id, corrected(byId.get(id)!, sum)]));
}

function corrected(
  { deviation, uStated, expandedU, k }: StoredValue,
  { shift, u }: { shift: number; u: number },
): CorrectedValue {
  const isUKnown = uStated !== null && expandedU !== null && k !== null;
  return {
    usedDeviation: rounded(new Decimal(deviation).plus(shift)),
    usedExpandedU: isUKnown
      ? u === 0
        ? expandedU
        : rounded(new Decimal(k).times(Math.hypot(uStated, u)))
      : null,
    usedK: isUKnown ? k : null,
  };
}

function rounded(grams: Decimal): string {
  return decimalText(grams.toDecimalPlaces(PLACES));
}

import { deviationOf, statedU, uOfDifference } from './numbers.ts';
import type { DatesFacts, DuplicateFacts, HistoryFacts, ResultFacts, ValueFacts } from './facts.ts';

/*
 * Which of several values of one weight is the odd one? A single comparison cannot say: the value after a slip
 * differs from it just as much. So a value is only asked about when more of the other values contradict it in the
 * given way than agree with it, and a value that was there first is only asked about when two later ones do.
 */

/** How another value stands to the one asked about. */
export type Likeness = 'agrees' | 'contradicts' | 'undecided';

/**
 * Whether the value is the odd one. Common practice, no source.
 * @param earlier likeness to each earlier value
 * @param later likeness to each later value
 */
export function isOddOne(earlier: readonly Likeness[], later: readonly Likeness[]): boolean {
  const count = (list: readonly Likeness[], what: Likeness) => list.filter((one) => one === what).length;
  const contradictions = count(earlier, 'contradicts') + count(later, 'contradicts');
  const agreements = count(earlier, 'agrees') + count(later, 'agrees');
  const needed = count(earlier, 'contradicts') > 0 ? 1 : 2;
  return contradictions >= needed && contradictions > agreements;
}

/** A value's history before and after it, by the end of the weighing. */
export function splitHistory(value: ValueFacts): { earlier: HistoryFacts[]; later: HistoryFacts[] } {
  return {
    earlier: value.history.filter((other) => other.performedEnd <= value.performedEnd),
    later: value.history.filter((other) => other.performedEnd > value.performedEnd),
  };
}

/** Beyond this many U, a change is no chance: 3 standard uncertainties of the difference. */
export const CLEAR_CHANGE = 1.5;

/** Smallest |deviation| in U at which a changed sign can be told. */
export const SIGN_VISIBLE = 1.5;

/**
 * Whether two values agree, or agree only when one sign is turned. Covariances are left out: that makes agreement
 * wider and contradiction rarer.
 */
export function signLikeness(value: ResultFacts, other: ResultFacts): Likeness {
  const u = uOfDifference(value, other, null);
  if (u === null) return 'undecided';
  const [a, b] = [deviationOf(value), deviationOf(other)];
  if (Math.abs(a - b) <= CLEAR_CHANGE * 2 * u) return 'agrees';
  return a * b < 0 && Math.abs(a + b) <= 2 * u ? 'contradicts' : 'undecided';
}

/** Whether the size of a deviation lets a changed sign be told. Null where U is not stated. */
export function isSignVisible(value: ResultFacts): boolean | null {
  const u = statedU(value);
  return u === null ? null : Math.abs(deviationOf(value)) >= SIGN_VISIBLE * 2 * u;
}

/** Whether the sign of a value is the odd one in the weight's history (B-17). */
export function isSignOdd(
  value: ResultFacts,
  earlier: readonly ResultFacts[],
  later: readonly ResultFacts[],
): boolean {
  const likeness = (other: ResultFacts) => signLikeness(value, other);
  return isSignVisible(value) === true && isOddOne(earlier.map(likeness), later.map(likeness));
}

const THOUSAND = 1000;
/** Half a decade to both sides: near a factor of 1000 is 316 to 3162; a change of U within 31.6 is ordinary. */
const HALF_DECADE = Math.sqrt(10);
const ORDINARY = THOUSAND / HALF_DECADE ** 3;

/**
 * Whether U and deviation both stand a factor of 1000 from another value, up or down. Upwards the deviation does if
 * its ratio is near 1000, or if it fits the other only after the factor is taken out; downwards, where a deviation
 * near zero fits anything, if less than a hundredth of the other is left.
 */
export function unitLikeness(value: ResultFacts, other: ResultFacts): Likeness {
  const [u, uOther] = [statedU(value), statedU(other)];
  if (u === null || uOther === null) return 'undecided';
  if (u / uOther < ORDINARY && uOther / u < ORDINARY) return 'agrees';
  const isUp = u > uOther;
  if (!isNear(isUp ? u / uOther / THOUSAND : uOther / u / THOUSAND)) return 'undecided';
  const [a, b] = [deviationOf(value), deviationOf(other)];
  if (!isUp) return Math.abs(a) * 100 < Math.abs(b) ? 'contradicts' : 'undecided';
  const room = CLEAR_CHANGE * 2 * Math.hypot(u / THOUSAND, uOther);
  const fitsOnlyAfter = Math.abs(a / THOUSAND - b) <= room && Math.abs(a - b) > room;
  return isNear(a / b / THOUSAND) || fitsOnlyAfter ? 'contradicts' : 'undecided';
}

/** Whether the unit of a value is the odd one in the weight's history (B-18). */
export function isUnitOdd(
  value: ResultFacts,
  earlier: readonly ResultFacts[],
  later: readonly ResultFacts[],
): boolean {
  const likeness = (other: ResultFacts) => unitLikeness(value, other);
  return isOddOne(earlier.map(likeness), later.map(likeness));
}

/** Two weights are told apart by their values from this many U on. */
export const SWAP_VISIBLE = 3;

/** Whether two values agree within U of their difference; null where U is not stated. */
function fits(a: ResultFacts, b: ResultFacts): boolean | null {
  const u = uOfDifference(a, b, null);
  return u === null ? null : Math.abs(deviationOf(a) - deviationOf(b)) <= CLEAR_CHANGE * 2 * u;
}

/** Whether the difference of a value and its duplicate's is large enough to tell them apart; null without U. */
export function isSwapVisible(value: ResultFacts, duplicate: ResultFacts): boolean | null {
  const [u, uDuplicate] = [statedU(value), statedU(duplicate)];
  if (u === null || uDuplicate === null) return null;
  const apart = Math.abs(deviationOf(value) - deviationOf(duplicate));
  return apart >= SWAP_VISIBLE * 2 * Math.max(u, uDuplicate);
}

/** A result with its day, its weight's other values, and the same of the duplicate on the same certificate. */
interface Pair {
  own: { result: ResultFacts; others: readonly HistoryFacts[] };
  duplicate: { result: ResultFacts; others: readonly HistoryFacts[] };
  performedEnd: string;
}

/**
 * Whether the results of two duplicates are the odd ones because each fits the other's history and neither its own
 * . Both crossings have to show.
 */
export function isSwapOdd({ own, duplicate, performedEnd }: Pair): boolean {
  if (isSwapVisible(own.result, duplicate.result) !== true) return false;
  const isEarlier = (past: HistoryFacts) => past.performedEnd <= performedEnd;
  const crosses = (
    result: ResultFacts,
    others: readonly HistoryFacts[],
    crossed: readonly HistoryFacts[],
  ) => {
    const fitting = (list: readonly HistoryFacts[], as: Likeness) =>
      list.filter((past) => fits(result, past) === true).map(() => as);
    const earlier = crossed.filter(isEarlier);
    const later = crossed.filter((past) => !isEarlier(past));
    return isOddOne(
      [...fitting(others, 'agrees'), ...fitting(earlier, 'contradicts')],
      fitting(later, 'contradicts'),
    );
  };
  return (
    crosses(own.result, own.others, duplicate.others) &&
    crosses(duplicate.result, duplicate.others, own.others)
  );
}

/** Whether a value and one of its duplicates were exchanged. */
export function isExchanged(value: ValueFacts, duplicate: DuplicateFacts): boolean {
  return isSwapOdd({
    own: { result: value, others: value.history },
    duplicate: { result: duplicate.result, others: duplicate.history },
    performedEnd: value.performedEnd,
  });
}

/** Whether an earlier or later value of the weight was exchanged with a duplicate's on its own certificate. */
export function wasExchanged(value: ValueFacts, past: HistoryFacts): boolean {
  return value.duplicates.some(({ result, history }) => {
    const partner = history.find((other) => other.certificateNo === past.certificateNo);
    if (!partner) return false;
    const others = value.history.filter((other) => other.uid !== past.uid);
    const partners = history.filter((other) => other.uid !== partner.uid);
    return isSwapOdd({
      own: { result: past, others: [...others, { ...value, covariance: null }] },
      duplicate: {
        result: partner,
        others: [...partners, { ...datesOf(value), ...result, covariance: null }],
      },
      performedEnd: past.performedEnd,
    });
  });
}

function datesOf(value: ValueFacts): DatesFacts {
  const { performedBegin, performedEnd, issuedOn, datePrecision } = value;
  return { performedBegin, performedEnd, issuedOn, datePrecision };
}

function isNear(ratio: number): boolean {
  return ratio > 1 / HALF_DECADE && ratio < HALF_DECADE;
}

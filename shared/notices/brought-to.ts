import { Decimal } from '#shared/decimal.ts';
import type { Notice, NoticeTermFacts } from './notice.ts';

const GRAMS_PER_KILOGRAM = 1000;
const MILLISECONDS_PER_DAY = 86_400_000;

/** What decides whether a notice covers a value. */
export interface Coverable {
  issuerId: string;
  quantity: 'mass' | 'conventional mass';
  /** Grams, decimal text. */
  nominal: string;
  performedEnd: string;
  /** Name of the scale version it is stated on; null: its certificate does not say. */
  scaleVersion: string | null;
}

/** A notice on a value that it covers. */
export interface Brought<N extends Notice = Notice> {
  notice: N;
  /** Grams: the shift of its day of calibration, in proportion to its mass. */
  shift: Decimal;
  /** Standard uncertainty, grams, in proportion to its mass. */
  addedU: number;
}

/**
 * The notices that cover a value, one after the other: each takes it from the scale version it then stands on to the
 * next. A value whose certificate names no scale version stands on the one that the first notice starts from.
 * @param inForce in the order in which they take effect
 */
export function broughtTo<N extends Notice>(value: Coverable, inForce: readonly N[]): Brought<N>[] {
  const kilograms = new Decimal(value.nominal).div(GRAMS_PER_KILOGRAM);
  let scale = value.scaleVersion;
  return inForce.flatMap((notice) => {
    if (notice.issuerId !== value.issuerId || (scale !== null && scale !== notice.fromScale)) return [];
    const term = notice.terms.find((each) => covers(each, value));
    if (!term) return [];
    scale = notice.toScale ?? notice.fromScale;
    const shift = kilograms.times(shiftOn(term.shifts, value.performedEnd));
    return [{ notice, shift, addedU: kilograms.times(term.addedU).toNumber() }];
  });
}

/** Whether a term covers a value, whatever its issuer and scale. Both ends of a range belong to it. */
export function covers(term: NoticeTermFacts, value: Omit<Coverable, 'issuerId' | 'scaleVersion'>): boolean {
  const nominal = new Decimal(value.nominal);
  return (
    (term.quantity === null || term.quantity === value.quantity) &&
    (term.performedFrom === null || term.performedFrom <= value.performedEnd) &&
    (term.performedTo === null || value.performedEnd <= term.performedTo) &&
    (term.nominalFrom === null || nominal.gte(term.nominalFrom)) &&
    (term.nominalTo === null || nominal.lte(term.nominalTo))
  );
}

/**
 * Shift per kilogram of a day of calibration, grams: linear between the days given, constant before the first and
 * after the last.
 * @param points at least one, in the order of their days
 */
export function shiftOn(points: NoticeTermFacts['shifts'], day: string): Decimal {
  const next = points.findIndex((point) => point.on >= day);
  if (next === -1) return new Decimal(points.at(-1)!.shift);
  const after = points[next]!;
  const before = points[next - 1];
  if (!before || after.on === day) return new Decimal(after.shift);
  const step = new Decimal(after.shift).minus(before.shift);
  return step.times(daysBetween(before.on, day)).div(daysBetween(before.on, after.on)).plus(before.shift);
}

function daysBetween(from: string, to: string): number {
  return (Date.parse(to) - Date.parse(from)) / MILLISECONDS_PER_DAY;
}

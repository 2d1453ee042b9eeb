import { between, drawsFor } from './draws.ts';
import { daysAfter, daysBetween, monthsAfter, workday } from './days.ts';
import type { Omission } from './omissions.ts';
import type { DemoValue } from './value.ts';
import { newestValue } from './value.ts';
import type { Quantity, Weight } from './weight.ts';

/** The last days on which the network has worked. */
export const LAST_BEGIN = '2026-11-06';
export const LAST_DAY = '2026-11-27';

/** A reference that a line asks for: which weight, and how it is used. */
export interface Wish {
  weight: Weight;
  sensitivity: number;
  usedAs?: 'certificate' | 'class limit';
  /** Kind of the reference value where it differs from that of the result. */
  quantity?: Quantity;
}

/** The same weights calibrated again and again by one laboratory in one way. */
export interface Series {
  id: string;
  issuer: string;
  weights: readonly Weight[];
  quantities: readonly Quantity[];
  method: string;
  how: 'comparison' | 'subdivision' | 'build-up' | 'recognized certificate';
  /** Own u as a share of the class limit. */
  ownShare: number;
  /** For weights without class limit: own u, g. */
  ownU?: number;
  isAccredited: boolean;
  hasBudget: boolean;
  wishesFor(weight: Weight, day: string): Wish[];
  /** First days of the work. */
  begins: readonly string[];
  workDays: number;
  /** Days from the end of the work to the certificate. */
  issueDays: number;
  /** Picks the reference value itself, rightly or wrongly. */
  picks?(): DemoValue;
  /** Says of each round what was special. */
  after?(round: number, values: readonly DemoValue[]): void;
  /** Keeps its days, weekends or not: a story hangs on them. */
  keepsDays?: boolean;
  /** Works while its scope rests. */
  ignoresScope?: boolean;
  /** What its first line leaves out on purpose, by round. */
  omits?(round: number): Omission | null;
  /** Values that nobody leans on: they may hold slips without harm to others. */
  isLeaf?(weight: Weight): boolean;
}

/**
 * First days of work: again each interval, earlier by a lead of some weeks so that the new certificate is there
 * before the old one is due.
 */
export function roundsFrom(id: string, first: string, intervalMonths: number, last = LAST_BEGIN): string[] {
  const draws = drawsFor(`${id} rounds`);
  const days = [workday(first)];
  for (;;) {
    const lead = Math.round(between(draws, 45, 75));
    const next = workday(daysAfter(monthsAfter(days.at(-1)!, intervalMonths), -lead));
    if (next > last) return days;
    days.push(next);
  }
}

/** One weight of a pool for each weight, by marking; the first of two where the pool has no second. */
export function fromPool(pool: readonly Weight[], usedAs?: Wish['usedAs']): Series['wishesFor'] {
  return (weight) => {
    const same = pool.find((other) => other.marking === weight.marking);
    const alike = same ?? pool.find((other) => other.nominal === weight.nominal);
    if (!alike) throw new Error(`No reference for ${weight.registryNo}, ${weight.marking}`);
    return [{ weight: alike, sensitivity: 1, ...(usedAs && { usedAs }) }];
  };
}

/** The value that answers a wish for work between two days; null where none stands, is known and is in date. */
export function answer(wish: Wish, quantity: Quantity, begin: string, end: string): DemoValue | null {
  const value = newestValue(wish.weight, wish.quantity ?? quantity, begin);
  if (!value) return null;
  const { intervalMonths } = wish.weight;
  if (intervalMonths !== null && monthsAfter(value.performedEnd, intervalMonths) < end) return null;
  return daysBetween(value.issuedOn, begin) < 0 ? null : value;
}

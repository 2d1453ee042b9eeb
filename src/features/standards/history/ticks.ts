import { Decimal } from '#shared/decimal.ts';
import { dayOf, dayOfMonth } from './days.ts';

/** A place on an axis and what stands beside it. */
export interface Tick {
  at: number;
  label: string;
}

/**
 * Round numbers (1, 2 or 5 times a power of ten) that cover a stretch of values, exact in decimal.
 * @param count about how many are wanted
 */
export function valueTicks(low: number, high: number, count: number): number[] {
  if (!(high > low)) return [low];
  const rough = (high - low) / Math.max(1, count);
  const power = new Decimal(10).pow(Math.floor(Math.log10(rough)));
  const step = [1, 2, 5, 10]
    .map((digit) => power.times(digit))
    .find((candidate) => candidate.toNumber() >= rough * (1 - 1e-9))!;
  const first = new Decimal(low).div(step).ceil();
  const last = new Decimal(high).div(step).floor();
  const steps = last.minus(first).toNumber();
  return Array.from({ length: steps + 1 }, (_, index) => first.plus(index).times(step).toNumber());
}

const YEAR_STEPS = [1, 2, 5, 10, 20, 50, 100, 200];
const MONTH_STEPS = [1, 3, 6];
const DAYS_OF_YEAR = 365.25;

/**
 * The turns of years or, over a short stretch, of months, labelled as ISO 8601 writes them.
 * @param low, high day numbers
 * @param count at most how many there is room for
 */
export function timeTicks(low: number, high: number, count: number): Tick[] {
  const years = (high - low) / DAYS_OF_YEAR;
  const monthStep = MONTH_STEPS.find((step) => (years * 12) / step <= count);
  if (years < 3 && monthStep !== undefined) return monthTicks(low, high, monthStep);
  const step = YEAR_STEPS.find((candidate) => years / candidate <= count) ?? 500;
  const first = Math.ceil(yearOf(low) / step) * step;
  const ticks: Tick[] = [];
  for (let year = first; dayOfMonth(year, 1) <= high; year += step) {
    if (dayOfMonth(year, 1) >= low) ticks.push({ at: dayOfMonth(year, 1), label: String(year) });
  }
  return ticks;
}

function monthTicks(low: number, high: number, step: number): Tick[] {
  const ticks: Tick[] = [];
  const year = yearOf(low);
  for (let month = 1; dayOfMonth(year, month) <= high; month += step) {
    const at = dayOfMonth(year, month);
    if (at >= low) ticks.push({ at, label: dayOf(at).slice(0, 7) });
  }
  return ticks;
}

function yearOf(day: number): number {
  return Number(dayOf(day).slice(0, 4));
}

import type { HistoryValue } from '#shared/contracts/standards.ts';
import type { z } from 'zod';

const DAY_MS = 86_400_000;

/** A calendar day as a count of days, for distances and for the time axis. */
export function dayNumber(day: string): number {
  return Math.round(Date.parse(`${day}T00:00:00Z`) / DAY_MS);
}

/** The calendar day of a count of days. */
export function dayOf(number: number): string {
  return new Date(number * DAY_MS).toISOString().slice(0, 10);
}

type Dated = Pick<z.infer<typeof HistoryValue>, 'performedEnd' | 'datePrecision'>;

/** First and last day on which a value may have been determined, by how exactly its date is known. */
export function possibleDays({ performedEnd, datePrecision }: Dated): { first: number; last: number } {
  const year = Number(performedEnd.slice(0, 4));
  const month = Number(performedEnd.slice(5, 7));
  if (datePrecision === 'day') return { first: dayNumber(performedEnd), last: dayNumber(performedEnd) };
  if (datePrecision === 'month')
    return { first: dayOfMonth(year, month), last: dayOfMonth(year, month + 1) - 1 };
  return { first: dayOfMonth(year, 1), last: dayOfMonth(year + 1, 1) - 1 };
}

/** A date as exactly as it is known: "2024-09-12", "2024-09", "1948". */
export function dateAsKnown({ performedEnd, datePrecision }: Dated): string {
  return performedEnd.slice(0, { day: 10, month: 7, year: 4 }[datePrecision]);
}

/** Number of the first day of a month; the thirteenth month is the next January. */
export function dayOfMonth(year: number, month: number): number {
  return Math.round(Date.UTC(year, month - 1, 1) / DAY_MS);
}

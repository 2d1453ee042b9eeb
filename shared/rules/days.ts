import type { DatesFacts } from './facts.ts';

type Precision = DatesFacts['datePrecision'];

/** The first and the last day a date may mean: one day, or the whole month or year it stands for. */
export interface Period {
  first: string;
  last: string;
}

/** A day with its precision, as a period. */
export function periodOf(day: string, precision: Precision): Period {
  if (precision === 'day') return { first: day, last: day };
  if (precision === 'year') return { first: `${day.slice(0, 4)}-01-01`, last: `${day.slice(0, 4)}-12-31` };
  const month = day.slice(0, 7);
  return { first: `${month}-01`, last: `${month}-${lastOfMonth(month)}` };
}

/** Whether `a` is on or before `b` by calendar day; null where the precision cannot decide. */
export function isNotAfter(a: Period, b: Period): boolean | null {
  if (a.last <= b.first) return true;
  if (a.first > b.last) return false;
  return null;
}

/** Whether `a` is before `b` by calendar day; null where the precision cannot decide. */
export function isBefore(a: Period, b: Period): boolean | null {
  const reversed = isNotAfter(b, a);
  return reversed === null ? null : !reversed;
}

/** The period `months` later; a day that the month does not have becomes its last. */
export function addMonths(period: Period, months: number): Period {
  return { first: dayLater(period.first, months), last: dayLater(period.last, months) };
}

/** A date as it is known: "1948", "2019-05" or "2025-02-20". */
export function dateText(day: string, precision: Precision): string {
  return day.slice(0, { year: 4, month: 7, day: 10 }[precision]);
}

/** When the weighing ended. */
export function performed(value: DatesFacts): Period {
  return periodOf(value.performedEnd, value.datePrecision);
}

/** When the certificate was issued, and so made known. */
export function issued(value: DatesFacts): Period {
  return periodOf(value.issuedOn, value.datePrecision);
}

function dayLater(day: string, months: number): string {
  const [year, month] = day.split('-').map(Number) as [number, number, number];
  const index = year * 12 + month - 1 + months;
  const later = `${String(Math.floor(index / 12)).padStart(4, '0')}-${String((index % 12) + 1).padStart(2, '0')}`;
  const last = lastOfMonth(later);
  return `${later}-${day.slice(8) < last ? day.slice(8) : last}`;
}

function lastOfMonth(month: string): string {
  const [year, number] = month.split('-').map(Number) as [number, number];
  return String(new Date(Date.UTC(year, number, 0)).getUTCDate()).padStart(2, '0');
}

import { EngineError } from '../errors.ts';

const DAY = 86_400_000;

/** Length of a year in days for rates: the Julian year, so that a rate does not depend on leap years. */
export const DAYS_PER_YEAR = 365.25;

const DATE_TEXT = /^(\d{4})-(\d{2})-(\d{2})$/;

/**
 * The day number of a date written as YYYY-MM-DD (ISO 8601), counted from 1970-01-01.
 * @throws EngineError `not-a-date`
 */
export function dayNumber(date: string, field: string): number {
  const parts = DATE_TEXT.exec(date);
  const milliseconds = parts
    ? Date.UTC(Number(parts[1]), Number(parts[2]) - 1, Number(parts[3]))
    : Number.NaN;
  // Date.UTC takes 30 February as 1 or 2 March; a date that does not come back unchanged does not exist.
  if (!Number.isFinite(milliseconds) || new Date(milliseconds).toISOString().slice(0, 10) !== date) {
    throw new EngineError('not-a-date', field, `"${date}"`, 'A date such as 2026-03-01 is expected.');
  }
  return milliseconds / DAY;
}

/** Years of 365.25 days from one day number to another. */
export function yearsBetween(from: number, to: number): number {
  return (to - from) / DAYS_PER_YEAR;
}

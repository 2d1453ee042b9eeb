const MILLISECONDS_PER_DAY = 86_400_000;
/** What MariaDB's TO_DAYS gives for 1970-01-01. */
const EPOCH = 719_528;

/** A day (ISO 8601) as MariaDB's TO_DAYS numbers it, so that days compare as numbers. */
export function dayNumber(day: string): number {
  return Date.parse(`${day}T00:00:00Z`) / MILLISECONDS_PER_DAY + EPOCH;
}

/** The calendar year of a numbered day. */
export function yearOf(number: number): number {
  return new Date((number - EPOCH) * MILLISECONDS_PER_DAY).getUTCFullYear();
}

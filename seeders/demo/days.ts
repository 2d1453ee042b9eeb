const MILLISECONDS_PER_DAY = 86_400_000;

/** A day so many days later (earlier where negative); days are ISO text. */
export function daysAfter(day: string, days: number): string {
  return new Date(Date.parse(day) + days * MILLISECONDS_PER_DAY).toISOString().slice(0, 10);
}

/** The same day of the month so many months later; a day that the month does not have becomes its last. */
export function monthsAfter(day: string, months: number): string {
  const [year, month, date] = day.split('-').map(Number) as [number, number, number];
  const last = new Date(Date.UTC(year, month - 1 + months + 1, 0)).getUTCDate();
  return new Date(Date.UTC(year, month - 1 + months, Math.min(date, last))).toISOString().slice(0, 10);
}

/** Days from `a` to `b`. */
export function daysBetween(a: string, b: string): number {
  return (Date.parse(b) - Date.parse(a)) / MILLISECONDS_PER_DAY;
}

/** Years since the turn of 2016, in which true masses drift. */
export function yearsOf(day: string): number {
  return daysBetween('2016-01-01', day) / 365.25;
}

/** The day itself, or the Monday after a weekend: laboratories rest. */
export function workday(day: string): string {
  const weekday = new Date(Date.parse(day)).getUTCDay();
  return weekday === 6 ? daysAfter(day, 2) : weekday === 0 ? daysAfter(day, 1) : day;
}

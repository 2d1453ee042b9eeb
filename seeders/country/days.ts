/** Days are whole days since 1970-01-01; the register's life in them. */
export const FIRST_DAY = dayOf('2004-01-05');
/** Nothing is issued after it. */
export const LAST_DAY = dayOf('2026-05-29');

const FIRST_YEAR = 2004;
const MILLISECONDS = 86_400_000;
const texts = new Map<number, string>();

/** The day of an ISO date. */
export function dayOf(text: string): number {
  return Date.parse(`${text}T00:00:00Z`) / 86_400_000;
}

/** The ISO date of a day. */
export function dayText(day: number): string {
  const known = texts.get(day);
  if (known !== undefined) return known;
  const text = new Date(day * MILLISECONDS).toISOString().slice(0, 10);
  texts.set(day, text);
  return text;
}

/** When the register takes in what belongs to a day. */
export function instantText(day: number): string {
  return `${dayText(day)} 08:00:00.000000`;
}

/** The same instant, milliseconds since 1970. */
export function instantOf(day: number): number {
  return day * MILLISECONDS + 8 * 3_600_000;
}

/** The act that takes in a day's rows: the network is act 1, then one act a month. */
export function actOf(day: number): number {
  const [year, month] = dayText(day).split('-').map(Number) as [number, number];
  return (year - FIRST_YEAR) * 12 + month + 1;
}

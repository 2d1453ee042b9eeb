import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import type { State } from '#shared/states.ts';
import { dayNumber } from './history/days.ts';

/** From so many days before on the next calibration counts as near, as in the list's filter. */
const NEAR_DAYS = 60;

/**
 * How a due date stands: near is a caution, past is broken; null while it is far.
 * @param today day in UTC, as the register counts
 */
export function dueState(
  dueOn: string,
  today: string = todayText(),
): Extract<State, 'caution' | 'broken'> | null {
  const days = daysUntil(dueOn, today);
  if (days < 0) return 'broken';
  return days <= NEAR_DAYS ? 'caution' : null;
}

/** How far away a due date is: "in 41 days", "80 days ago". */
export function dueDistance(dueOn: string, today: string = todayText()): string {
  const days = daysUntil(dueOn, today);
  if (days === 0) return 'today';
  const count = Math.abs(days) === 1 ? '1 day' : `${formatDecimal(String(Math.abs(days)))} days`;
  return days > 0 ? `in ${count}` : `${count} ago`;
}

function daysUntil(day: string, today: string): number {
  return dayNumber(day) - dayNumber(today);
}

function todayText(): string {
  return new Date().toISOString().slice(0, 10);
}

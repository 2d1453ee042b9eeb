import { endOfDay } from '#shared/state-at.ts';
import type { Notice } from './notice.ts';

type Dated = Pick<Notice, 'id' | 'effectiveOn' | 'recordedAt' | 'replacesId'>;

/** How a notice stands on a day as known on a day; `unknown`: recorded later. */
export type NoticeState = 'unknown' | 'not yet in force' | 'in force' | 'replaced';

/**
 * How a notice stands on `day`, as the register knew it at the end of `known` (UTC): in force from its effective day
 * until the day on which the notice that replaces it takes effect. Nothing else ends one.
 * @param all every notice recorded, in any order
 */
export function noticeOn(notice: Dated, all: readonly Dated[], day: string, known: string): NoticeState {
  const horizon = endOfDay(known);
  const counts = (one: Dated) => one.recordedAt <= horizon && one.effectiveOn <= day;
  if (notice.recordedAt > horizon) return 'unknown';
  if (!counts(notice)) return 'not yet in force';
  return all.some((other) => other.replacesId === notice.id && counts(other)) ? 'replaced' : 'in force';
}

/** The notices in force on `day` as known on `known`, in the order in which they take effect. */
export function noticesInForce<N extends Dated>(all: readonly N[], day: string, known: string): N[] {
  return all
    .filter((notice) => noticeOn(notice, all, day, known) === 'in force')
    .sort((a, b) => compare(a.effectiveOn, b.effectiveOn) || compare(a.recordedAt, b.recordedAt));
}

function compare(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

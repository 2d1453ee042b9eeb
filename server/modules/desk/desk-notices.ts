import type { DeskResponse } from '#shared/contracts/desk.ts';
import { AppError } from '#server/http/app-error.ts';
import { today, type Context } from '#server/http/context.ts';
import { noticesSince, ownWordsOf } from '#server/modules/notices/index.ts';
import type { User } from '#server/policy/user.ts';

type DeskNotice = DeskResponse['notices'][number];

const DAYS_BACK = 60;
/** The newest ones: each is worked out over all that it reaches. */
const MOST = 3;
const DAY_MS = 86_400_000;

/**
 * Notices in force, or to come, of the last 60 days that move values held by the person's laboratories materially
 * or change a verdict.
 */
export async function deskNotices(context: Context, user: User): Promise<DeskNotice[]> {
  if (user.memberships.length === 0) return [];
  const since = new Date(Date.parse(today(context)) - DAYS_BACK * DAY_MS).toISOString().slice(0, 10);
  const found: DeskNotice[] = [];
  for (const { id, number, effectiveOn } of (await noticesSince(context, since)).slice(0, MOST)) {
    const words = await ownWordsOf({ ...context, user }, id).catch(untilRead);
    if (words === null) continue;
    const [, material, verdictChanges] = words;
    if (material + verdictChanges > 0) found.push({ id, number, effectiveOn, material, verdictChanges });
  }
  return found;
}

/** Just after a start the register is still being read: the desk comes without, and tells it the next time. */
function untilRead(error: unknown): null {
  if (error instanceof AppError && error.id === 'unavailable') return null;
  throw error;
}

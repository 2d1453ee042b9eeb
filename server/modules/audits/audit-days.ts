import { readRow } from '#server/db/read.ts';
import { fieldError } from '#server/http/app-error.ts';
import { today, type Context } from '#server/http/context.ts';

/** How far ahead a day may be asked about, years: programmes end within a few (common practice, no source). */
const YEARS_AHEAD = 50;

/** The day on which the Metre Convention was signed: no certificate of these units is older. */
const METRE_CONVENTION = '1875-05-20';

/**
 * Days of which the register can say nothing are a slip of the hand: before its earliest certificate, or far ahead.
 * @throws AppError `unprocessable` on `day` or `known`
 */
export async function refuseFarDays(context: Context, days: { day: string; known: string }): Promise<void> {
  const earliest = await earliestDay(context);
  const now = today(context);
  const latest = `${Number(now.slice(0, 4)) + YEARS_AHEAD}${now.slice(4)}`;
  for (const field of ['day', 'known'] as const) {
    const received = days[field];
    const expected = `${earliest} to ${latest}`;
    if (received < earliest) {
      const message = `The earliest certificate of the register is of ${earliest}: before that day there is nothing to audit.`;
      throw fieldError(field, { message, received, expected });
    }
    if (received > latest) {
      throw fieldError(field, {
        message: `That is more than ${YEARS_AHEAD} years ahead; nothing of the register reaches so far.`,
        ...{ received, expected },
      });
    }
  }
}

/** The day of the earliest certificate; a register without one has no bound of its own. */
async function earliestDay({ database }: Context): Promise<string> {
  const row = await readRow<{ day: string | null }>(database, 'SELECT MIN(issued_on) AS day FROM revision');
  return row?.day ?? METRE_CONVENTION;
}

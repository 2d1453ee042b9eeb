import { today, type Context } from '#server/http/context.ts';
import { dayNumber } from './day-number.ts';

/** The two clocks of a question, as days and as the graph numbers them. */
export interface AskedDays {
  day: string;
  known: string;
  dayNumber: number;
  knownNumber: number;
}

/** Both days default to today. */
export function askedDays(
  context: Context,
  asked: { day?: string | undefined; known?: string | undefined },
): AskedDays {
  const day = asked.day ?? today(context);
  const known = asked.known ?? today(context);
  return { day, known, dayNumber: dayNumber(day), knownNumber: dayNumber(known) };
}

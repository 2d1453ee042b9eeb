import { Day } from '#shared/contracts/common.ts';

/** What is amiss with a typed day; undefined where nothing is. */
export function dayProblem(text: string): string | undefined {
  if (text === '') return 'Name a day, written as 2025-02-20.';
  return Day.safeParse(text).success ? undefined : `"${text}" is no day. Write it as 2025-02-20.`;
}

import { groupBy } from '#shared/group-by.ts';
import { endOfDay } from '#shared/state-at.ts';
import type { Period } from './days.ts';
import type { Assertion, EndFacts, RecognitionFacts } from './facts.ts';

/**
 * The assertion that held on `day`, as known at the end of `knownBy`: of the rows that cover the day the latest
 * recorded by then. Where none was recorded by then, the history was entered later and counts as it was first
 * entered: of the rows recorded on the first such day, the last. A change entered later still, over something that
 * was already on record, does not reach back into the conduct.
 * @param rows all rows of one subject; rows recorded at one instant in the order of their acts
 */
export function rowInForce<T extends Assertion>(rows: readonly T[], day: string, knownBy: string): T | null {
  const horizon = endOfDay(knownBy);
  const covering = rows.filter((row) => row.validFrom <= day && (row.validTo === null || day <= row.validTo));
  const knownThen = lastRecorded(covering.filter((row) => row.recordedAt <= horizon));
  if (knownThen) return knownThen;
  const entered = (row: T) => row.recordedAt.slice(0, 10);
  const [firstEntered] = covering.map(entered).sort();
  return lastRecorded(covering.filter((row) => entered(row) === firstEntered));
}

/** Of rows recorded at one instant the last; null without rows. */
function lastRecorded<T extends Assertion>(rows: readonly T[]): T | null {
  let last: T | null = null;
  for (const row of rows) if (last === null || row.recordedAt >= last.recordedAt) last = row;
  return last;
}

/** How a laboratory's recognition stood: `not recorded` where nothing was asserted for that day. */
export type RecognitionStanding =
  | { state: 'granted' | 'suspended' | 'withdrawn'; row: RecognitionFacts }
  | { state: 'not recorded'; row: null };

/** The best standing of a laboratory's recognitions on a day, each judged by its own rows. */
export function recognitionOn(
  rows: readonly RecognitionFacts[],
  day: string,
  knownBy: string,
): RecognitionStanding {
  const subjectOf = (row: RecognitionFacts) => `${row.kind} ${row.body} ${row.number}`;
  const held = [...groupBy(rows, subjectOf).values()].map((ofSubject) => rowInForce(ofSubject, day, knownBy));
  const best = (['granted', 'suspended', 'withdrawn'] as const)
    .map((state) => held.find((row) => row?.state === state))
    .find((row) => row !== undefined);
  return best ? { state: best.state, row: best } : { state: 'not recorded', row: null };
}

/** The standing over a period; null where it differs between the ends, so that the precision decides. */
export function recognitionOver(
  rows: readonly RecognitionFacts[],
  period: Period,
): RecognitionStanding | null {
  const first = recognitionOn(rows, period.first, period.first);
  const last = recognitionOn(rows, period.last, period.last);
  return first.state === last.state ? last : null;
}

/** What became of a value: its withdrawal, its replacement by a changed one, or by one that is the same. */
export interface Ending {
  how: 'withdrawn' | 'changed' | 'unchanged';
  end: EndFacts;
}

/**
 * The gravest of a value's ends that count. A replacement in words only is followed to the replacement's own ends,
 * so that a correction of an address does not hide a withdrawal that came after it.
 */
export function endingOf(ends: readonly EndFacts[], counts: (end: EndFacts) => boolean): Ending | null {
  const counting = ends.filter(counts);
  const withdrawal = counting.find((end) => end.kind === 'withdrawn');
  if (withdrawal) return { how: 'withdrawn', end: withdrawal };
  const changed = counting.find((end) => end.changed === 'value');
  if (changed) return { how: 'changed', end: changed };
  const worded = counting[0];
  if (!worded) return null;
  return endingOf(worded.replacedBy?.ends ?? [], counts) ?? { how: 'unchanged', end: worded };
}

/** Whether an end had taken effect and was made known before a day; work of the same day could not know it. */
export function knownBefore(day: string): (end: EndFacts) => boolean {
  return (end) => end.effectiveOn < day && end.madeKnownOn < day;
}

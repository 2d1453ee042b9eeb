/** The dates of an assigned value that decide how it stands. Days are ISO 8601; instants are UTC. */
export interface ValueDates {
  /** Issued on: in force, and made known, from this day. */
  effectiveFrom: string;
  /** When the register learnt of it. */
  recordedAt: string;
}

/** The end of a value: superseded by a later revision, or withdrawn. */
export interface ValueEnd {
  kind: 'superseded' | 'withdrawn';
  effectiveOn: string;
  recordedAt: string;
}

export type ValueStanding =
  | { state: 'unknown' | 'not yet in force' | 'in force'; since: null }
  | { state: 'superseded' | 'withdrawn'; since: string };

/**
 * How a value stands on `day`, as the register knew it at the end of `known` (UTC). A withdrawal speaks
 * louder than a supersession; of several ends of one kind the earliest effective one counts. Its SQL form
 * is `IN_FORCE` in `server/db/in-force.ts`; a test holds the two equal on the truth table.
 * @param ends every recorded end of the value, in any order
 */
export function stateAt(
  value: ValueDates,
  ends: readonly ValueEnd[],
  day: string,
  known: string,
): ValueStanding {
  const horizon = endOfDay(known);
  if (value.recordedAt > horizon) return { state: 'unknown', since: null };
  if (value.effectiveFrom > day) return { state: 'not yet in force', since: null };
  const effective = ends.filter((end) => end.recordedAt <= horizon && end.effectiveOn <= day);
  const first = effective.sort(byWeight)[0];
  return first ? { state: first.kind, since: first.effectiveOn } : { state: 'in force', since: null };
}

/**
 * The last instant of a day, UTC, in the register's resolution of a microsecond. An instant stands for itself: what is
 * asked again later, as known at that instant, is not changed by what the same day brought afterwards.
 */
export function endOfDay(known: string): string {
  return known.length > 10 ? known : `${known}T23:59:59.999999Z`;
}

function byWeight(a: ValueEnd, b: ValueEnd): number {
  if (a.kind !== b.kind) return a.kind === 'withdrawn' ? -1 : 1;
  return a.effectiveOn < b.effectiveOn ? -1 : 1;
}

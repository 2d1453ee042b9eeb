import { LAST_DAY } from './days.ts';
import { PURPOSE, type Draw } from './draws.ts';
import { LONGEST_ISSUE_DAYS, PERFORMANCE_DAYS, type WeightSet } from './weight-sets.ts';

/** How a revision came to an end. */
export type Ending = 'none' | 'superseded: text' | 'superseded: value' | 'withdrawn';

/** One revision of a certificate: a set calibrated, or the same issued anew. */
export interface Work {
  set: WeightSet;
  /** First day of the weighings. */
  day: number;
  issuedOn: number;
  /** Number of the certificate. */
  certificate: number;
  revisionN: 1 | 2;
  changed: 'new' | 'text' | 'value';
  ending: Ending;
  /** Day of the ending; 0 for none. */
  endsOn: number;
  /** The revision that took its place; -1 for none. */
  replacedBy: number;
  /** Number of its first value, from 0. */
  firstValue: number;
  /** How many of the set's references it used, and the first of them in the set's list. */
  referenceCount: number;
  firstReference: number;
}

/** Parts of all first issues. Common practice, no source. */
const WITHDRAWN_PART = 0.003;
const VALUE_PART_OF_REISSUES = 0.2;
/** Above this step nothing is withdrawn and no value is changed: the country stands. */
const FIRST_STEP_WITH_FAULTS = 7;

/**
 * Every revision in the order of issue, so that what leans on a value comes after it. Re-issues bring the number of
 * values to the one asked for, exactly.
 * @throws RangeError where no re-issue fits what is missing
 */
export function workListOf(sets: readonly WeightSet[], draw: Draw, valueCount: number): Work[] {
  const first = sets.flatMap((set) => set.days.map((day) => firstIssue(set, day)));
  first.sort((a, b) => a.issuedOn - b.issuedOn || a.set.index - b.set.index);
  for (const [n, work] of first.entries()) {
    work.certificate = n;
    work.issuedOn =
      work.day + PERFORMANCE_DAYS + Math.floor((LONGEST_ISSUE_DAYS - 2) * draw(PURPOSE.issue, n));
  }
  const again = reissues(first, draw, valueCount);
  withdraw(first, draw);
  const all = [...first, ...again.map(({ work }) => work)];
  all.sort((a, b) => a.issuedOn - b.issuedOn || a.certificate - b.certificate);
  const places = new Map(all.map((work, place) => [work, place]));
  for (const { work, of } of again) of.replacedBy = places.get(work)!;
  let value = 0;
  for (const work of all) {
    work.firstValue = value;
    value += work.set.count;
  }
  return all;
}

function firstIssue(set: WeightSet, day: number): Work {
  const none = { certificate: -1, replacedBy: -1, firstValue: -1, referenceCount: 0, firstReference: 0 };
  return { set, day, issuedOn: day, revisionN: 1, changed: 'new', ending: 'none', endsOn: 0, ...none };
}

function reissues(first: readonly Work[], draw: Draw, valueCount: number): { work: Work; of: Work }[] {
  let missing = valueCount - first.reduce((sum, work) => sum + work.set.count, 0);
  const keys = Float64Array.from(first, (_, n) => draw(PURPOSE.ending, n));
  const order = Uint32Array.from(first, (_, n) => n).sort((a, b) => keys[a]! - keys[b]!);
  const made: { work: Work; of: Work }[] = [];
  for (const n of order) {
    if (missing === 0) break;
    const of = first[n]!;
    const day = of.issuedOn + 20 + Math.floor(180 * draw(PURPOSE.endingDay, n));
    if (of.set.count > missing || day > LAST_DAY || of.set.level === 0) continue;
    missing -= of.set.count;
    const isText =
      of.set.level < FIRST_STEP_WITH_FAULTS || draw(PURPOSE.ending, n + 50_000_000) > VALUE_PART_OF_REISSUES;
    of.ending = isText ? 'superseded: text' : 'superseded: value';
    of.endsOn = day;
    const work = { ...of, issuedOn: day, revisionN: 2, ending: 'none', endsOn: 0 } as const;
    made.push({ work: { ...work, changed: isText ? 'text' : 'value' }, of });
  }
  if (missing !== 0) throw new RangeError(`${missing} values could not be planned.`);
  return made;
}

function withdraw(first: readonly Work[], draw: Draw): void {
  for (const [n, work] of first.entries()) {
    const isChosen = draw(PURPOSE.ending, n + 100_000_000) < WITHDRAWN_PART;
    if (!isChosen || work.ending !== 'none' || work.set.level < FIRST_STEP_WITH_FAULTS) continue;
    const day = work.issuedOn + 60 + Math.floor(600 * draw(PURPOSE.endingDay, n + 50_000_000));
    if (day > LAST_DAY) continue;
    work.ending = 'withdrawn';
    work.endsOn = day;
  }
}

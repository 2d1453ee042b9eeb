import type { CatalogueEntry } from './catalogue.ts';
import type { Entry } from './certificate.ts';
import { drawsFor } from './draws.ts';
import type { ReadyJob } from './perform.ts';
import { printed, printedInWrongUnit, printedWithOtherSign } from './printed.ts';
import type { Result } from './result.ts';
import type { World } from './world.ts';

/** A slip of the pen on a line, before the certificate has its number. */
type Slip = Omit<CatalogueEntry, 'certificateNo' | 'revision'>;

interface Spoilt {
  entries: Entry[];
  slips: Slip[];
}

/** How often each slip is made in the network; an exchange spoils two lines. */
const SLIPS = [
  { kind: 'unit slip, too large', times: 3, make: unitTooLarge },
  { kind: 'sign flip', times: 5, make: signFlip },
  { kind: 'U below what is carried', times: 4, make: uBelowCarried },
  { kind: 'unit slip, too small', times: 3, make: unitTooSmall },
] as const;

/** Pairs that are far enough apart are rare: an exchange has the first try. */
const EXCHANGES = 3;

/** How likely a certificate that could hold a slip holds one. */
const CHANCE = 0.5;

/** Puts at most one slip on a certificate, on lines that nobody leans on. */
export function withSlips(world: World, job: ReadyJob, entries: Entry[]): Spoilt {
  const draws = drawsFor(`${job.series.id} ${job.round} slip`);
  if (!job.series.isLeaf || job.round < 2 || draws.uniform() > CHANCE) return { entries, slips: [] };
  const first = Math.floor(SLIPS.length * draws.uniform());
  const turns = SLIPS.map((_, at) => SLIPS[(first + at) % SLIPS.length]!);
  const tries = [{ kind: 'duplicates exchanged', times: EXCHANGES, make: exchange }, ...turns];
  for (const { kind, times, make } of tries) {
    const made = new Set(world.catalogue.filter((entry) => entry.kind === kind).map((e) => e.certificateNo));
    if (made.size >= times) continue;
    const spoilt = make(job, entries, kind);
    if (spoilt) return spoilt;
  }
  return { entries, slips: [] };
}

function fault(
  kind: string,
  rule: string,
  line: number,
  verdict: Slip['verdict'],
  alsoFoundBy: string[] = [],
): Slip {
  return { is: 'fault', kind, rule, verdict, line, reference: null, alsoFoundBy };
}

/** Replaces what is printed on one line. */
function spoil(entries: Entry[], at: number, changed: Result['printed'], more: Partial<Entry> = {}): Entry[] {
  return entries.map((entry, place) =>
    place === at
      ? { ...entry, ...more, isFaulty: true, result: { ...entry.result, printed: changed } }
      : entry,
  );
}

/** Lines that nobody leans on, with two or more sound values before them. */
function leaves({ series }: ReadyJob, entries: Entry[]): number[] {
  return [...entries.keys()].filter((at) => {
    const { task } = entries[at]!.result;
    const before = task.weight.values.filter((value) => value.epoch === task.weight.epochs.length - 1);
    return (
      task.stage === null &&
      series.isLeaf?.(task.weight) &&
      before.length >= 2 &&
      !before.some((v) => v.isFaulty)
    );
  });
}

/** |deviation| in multiples of U, and whether the last value had the same sign and size. */
function standsOut(entry: Entry, times: number): boolean {
  const { task, printed: now } = entry.result;
  return (
    task.weight.values
      .slice(-2)
      .every(
        (before) =>
          before.deviation * now.deviation > 0 && Math.abs(before.deviation) >= times * before.expandedU,
      ) && Math.abs(now.deviation) >= times * now.expandedU
  );
}

function unitTooLarge(job: ReadyJob, entries: Entry[], kind: string): Spoilt | null {
  const at = leaves(job, entries).find((place) => standsOut(entries[place]!, 0.4));
  if (at === undefined) return null;
  const wrong = printedInWrongUnit(entries[at]!.result.printed, 1000);
  return {
    entries: spoil(entries, at, wrong, { isUnitConfirmed: true, hasBudget: false }),
    slips: [fault(kind, 'B-18', at + 1, 'today')],
  };
}

/** In-house work only: under accreditation the best capability would be undercut as well. */
function unitTooSmall(job: ReadyJob, entries: Entry[], kind: string): Spoilt | null {
  if (job.series.isAccredited) return null;
  const at = leaves(job, entries).find((place) => standsOut(entries[place]!, 1));
  if (at === undefined) return null;
  const wrong = printedInWrongUnit(entries[at]!.result.printed, 0.001);
  return {
    entries: spoil(entries, at, wrong, { isUnitConfirmed: true, hasBudget: false }),
    slips: [fault(kind, 'B-18', at + 1, 'today', ['B-21'])],
  };
}

/** A correction entered as a deviation; it shows where |deviation| is at least 1.5 U. */
function signFlip(job: ReadyJob, entries: Entry[], kind: string): Spoilt | null {
  const at = leaves(job, entries).find((place) => standsOut(entries[place]!, 1.6));
  if (at === undefined) return null;
  return {
    entries: spoil(entries, at, printedWithOtherSign(entries[at]!.result.printed)),
    slips: [fault(kind, 'B-17', at + 1, 'today')],
  };
}

/** U of in-house work stated at six tenths of what its references carry alone. */
function uBelowCarried(job: ReadyJob, entries: Entry[], kind: string): Spoilt | null {
  if (job.series.isAccredited) return null;
  const at = leaves(job, entries)[0];
  if (at === undefined) return null;
  const { deviation, carried } = entries[at]!.result;
  const wrong = printed(deviation, 0.6 * 2 * Math.sqrt(carried));
  return {
    entries: spoil(entries, at, wrong, { hasBudget: false }),
    slips: [fault(kind, 'B-21', at + 1, 'conduct')],
  };
}

/** Two weights of the same nominal whose values differ by at least 3 U, each entered for the other. */
function exchange(job: ReadyJob, entries: Entry[], kind: string): Spoilt | null {
  for (const one of leaves(job, entries)) {
    const other = leaves(job, entries).find((at) => at > one && isFarPair(entries[one]!, entries[at]!));
    if (other === undefined) continue;
    const [a, b] = [entries[one]!.result.printed, entries[other]!.result.printed];
    return {
      entries: spoil(spoil(entries, one, b), other, a),
      slips: [fault(kind, 'X-01', one + 1, 'today'), fault(kind, 'X-01', other + 1, 'today')],
    };
  }
  return null;
}

function isFarPair(one: Entry, other: Entry): boolean {
  const [a, b] = [one.result, other.result];
  const setOf = ({ task }: Result) => task.weight.registryNo.split('-')[0];
  const isPair =
    a.task.weight.nominal === b.task.weight.nominal &&
    a.task.weight.registryNo.includes('-') &&
    setOf(a) === setOf(b);
  const [da, db] = [a.printed.deviation, b.printed.deviation];
  const largest = Math.max(a.printed.expandedU, b.printed.expandedU);
  // Values that mirror each other would rather look like a turned sign.
  return (
    isPair &&
    isSettled(a) &&
    isSettled(b) &&
    Math.abs(da - db) >= 3.2 * largest &&
    Math.abs(da + db) >= 2.2 * largest
  );
}

/** Whether a value lies near the one before it: no wear or knock in between. */
function isSettled({ task, printed: now }: Result): boolean {
  const last = task.weight.values.at(-1);
  return last !== undefined && Math.abs(now.deviation - last.deviation) <= 1.2 * now.expandedU;
}

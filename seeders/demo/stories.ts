import type { WeightClass } from '#shared/contracts/common.ts';
import { placeOf, type CatalogueEntry } from './catalogue.ts';
import { reissue, withdraw, type Entry } from './certificate.ts';
import { daysAfter, monthsAfter } from './days.ts';
import { SECOND_LEVEL, THIRD_LEVEL } from './laboratories.ts';
import { addWeight, densityOf } from './pieces.ts';
import { printed } from './printed.ts';
import { fromPool, type Series } from './series.ts';
import type { DemoValue } from './value.ts';
import type { Weight } from './weight.ts';
import { valuesOf, type World } from './world.ts';

/** Something that happens on a day beside the calibrations. */
export interface Happening {
  day: string;
  happen(): void;
}

/** The weights of other laboratories that stories lean on. */
export interface StoryPools {
  e2: ReadonlyMap<string, Weight[]>;
}

/** A reference weight and a weight of the same nominal calibrated against it, both of one laboratory. */
interface Pair {
  owner: string;
  provider: string;
  reference: Series;
  working: Series;
}

interface Cast {
  world: World;
  series: Series[];
  happenings: Happening[];
  pair(n: number, plan: PairPlan): Pair;
}

interface PairPlan {
  owner: string;
  nominal: string;
  /** First days of the calibrations of the reference. */
  references: string[];
  /** First days of the work with it, and which of its values (by round) is used. */
  work: { begin: string; days?: number; uses: number | (() => DemoValue) }[];
  /** Says what each piece of work is. */
  say?(round: number, value: DemoValue): void;
}

const INTERVAL = 12;

/** A story told several times, in other laboratories and years. */
interface Story {
  times: { at: string; owner: number; nominal: string }[];
  tell(cast: Cast, n: number, at: string, owner: string, nominal: string): void;
}

/** The third level without the laboratory whose provider's scope rested for months. */
const TELLERS = THIRD_LEVEL.filter((code) => code !== 'WF');

const NOMINALS = ['1000', '500', '200', '100', '2000', '50', '5000'];

/** `count` tellings from a month on, half a year or so apart, one laboratory after the other. */
function tellings(count: number, from: string, apart: number, owner: number): Story['times'] {
  return Array.from({ length: count }, (_, n) => ({
    at: monthsAfter(from, n * apart),
    owner: (owner + n) % TELLERS.length,
    nominal: NOMINALS[(owner + 3 * n) % NOMINALS.length]!,
  }));
}

const STORIES: Story[] = [
  { times: tellings(3, '2018-03-06', 19, 0), tell: lateUse },
  { times: tellings(1, '2022-02-08', 1, 4), tell: ranOver },
  { times: tellings(3, '2018-05-15', 22, 1), tell: supersededReference },
  { times: tellings(2, '2019-09-10', 30, 3), tell: correctedAfterUse },
  { times: tellings(3, '2018-08-14', 21, 2), tell: withdrawnReference },
  { times: tellings(3, '2018-10-09', 20, 5), tell: withdrawnAfterUse },
  { times: tellings(4, '2018-04-10', 16, 3), tell: olderValue },
  { times: tellings(6, '2018-09-11', 14, 0), tell: nearMisses },
];

/** Tells every story: its weights, its calibrations and what happens in between. */
export function addStories(world: World, pools: StoryPools): { series: Series[]; happenings: Happening[] } {
  const series: Series[] = [];
  const happenings: Happening[] = [];
  let count = 0;
  const cast: Cast = {
    world,
    series,
    happenings,
    pair: (n, plan) => {
      const made = makePair(world, pools, n, plan);
      series.push(made.reference, made.working);
      return made;
    },
  };
  for (const story of STORIES) {
    for (const { at, owner, nominal } of story.times) {
      story.tell(cast, count, at, TELLERS[owner]!, nominal);
      count += 1;
    }
  }
  return { series, happenings };
}

function makePair(world: World, pools: StoryPools, n: number, plan: PairPlan): Pair {
  const { owner, nominal, references, work } = plan;
  const provider = SECOND_LEVEL[THIRD_LEVEL.indexOf(owner as never) % SECOND_LEVEL.length]!;
  const single = (registryNo: string, weightClass: WeightClass, intervalMonths: number) =>
    addWeight(world, {
      owner,
      registryNo,
      nominal,
      class: weightClass,
      density: densityOf(weightClass, nominal, registryNo),
      inServiceFrom: daysAfter(references[0]!, -21),
      intervalMonths,
    });
  const reference = single(`${owner} ${String(401 + n).padStart(4, '0')}`, 'F1', INTERVAL);
  const working = single(`${owner} ${String(501 + n).padStart(4, '0')}`, 'F2', 24);
  const common = {
    quantities: ['conventional mass'],
    method: 'Substitution weighing',
    how: 'comparison',
    workDays: 0,
    issueDays: 0,
    keepsDays: true,
  } as const;
  const pick = (uses: number | (() => DemoValue)) =>
    typeof uses === 'number' ? valuesOf(world, `${reference.registryNo} story`, uses)[0]! : uses();
  return {
    owner,
    provider,
    reference: {
      ...common,
      id: `${reference.registryNo} story`,
      issuer: provider,
      weights: [reference],
      ownShare: 0.1,
      isAccredited: true,
      hasBudget: false,
      wishesFor: fromPool(pools.e2.get(provider)!),
      begins: references,
      issueDays: 2,
    },
    working: {
      ...common,
      id: `${working.registryNo} story`,
      issuer: owner,
      weights: [working],
      ownShare: 0.08,
      isAccredited: false,
      hasBudget: true,
      wishesFor: () => [{ weight: reference, sensitivity: 1 }],
      picks: (round) => pick(work[round]!.uses),
      begins: work.map(({ begin }) => begin),
      after: (round, values) => plan.say?.(round, values[0]!),
    },
  };
}

/** Notes a fault, or a look-alike, of the link from a value to the reference it used. */
function note(
  { world }: Cast,
  value: DemoValue,
  reference: DemoValue,
  entry: Pick<CatalogueEntry, 'is' | 'kind' | 'rule' | 'verdict'>,
): void {
  world.catalogue.push({ ...entry, ...placeOf(value), reference: placeOf(reference), alsoFoundBy: [] });
}

/** The value of a pair's reference, by round. */
function referenceValue({ world }: Cast, pair: Pair, round: number): DemoValue {
  return valuesOf(world, pair.reference.id, round)[0]!;
}

/** Used three weeks after the laboratory's own programme called for a new calibration. */
function lateUse(cast: Cast, n: number, at: string, owner: string, nominal: string): void {
  const pair = cast.pair(n, {
    owner,
    nominal,
    references: [at, monthsAfter(at, 14), monthsAfter(at, 25)],
    work: [
      { begin: monthsAfter(at, 1), uses: 0 },
      { begin: daysAfter(monthsAfter(at, INTERVAL), 20), uses: 0 },
      { begin: monthsAfter(at, 15), uses: 1 },
    ],
    say: (round, value) => {
      if (round !== 1) return;
      const fault = { is: 'fault', kind: 'late use', rule: 'B-14', verdict: 'conduct' } as const;
      note(cast, value, referenceValue(cast, pair, 0), fault);
    },
  });
}

/** Begun in date and ended after it. */
function ranOver(cast: Cast, n: number, at: string, owner: string, nominal: string): void {
  const due = monthsAfter(at, INTERVAL);
  const pair = cast.pair(n, {
    owner,
    nominal,
    references: [at, monthsAfter(at, 14)],
    work: [
      { begin: monthsAfter(at, 1), uses: 0 },
      { begin: daysAfter(due, -4), uses: 0 },
    ],
    say: (round, value) => {
      if (round !== 1) return;
      const fault = { is: 'fault', kind: 'late use', rule: 'B-14', verdict: 'conduct' } as const;
      note(cast, value, referenceValue(cast, pair, 0), fault);
    },
  });
  pair.working.workDays = 8;
}

/** The certificate had been corrected, and the old value was used all the same. */
function supersededReference(cast: Cast, n: number, at: string, owner: string, nominal: string): void {
  const pair: Pair = cast.pair(n, {
    owner,
    nominal,
    references: [at, monthsAfter(at, 11)],
    work: [
      { begin: monthsAfter(at, 5), uses: 0 },
      { begin: monthsAfter(at, 7), uses: () => latestOf(cast, pair, 0) },
    ],
    say: (round, value) => {
      if (round !== 0) return;
      const fault = { is: 'fault', kind: 'superseded reference', rule: 'B-15', verdict: 'conduct' } as const;
      note(cast, value, referenceValue(cast, pair, 0), fault);
    },
  });
  cast.happenings.push({
    day: monthsAfter(at, 3),
    happen: () => correctCertificate(cast, pair, monthsAfter(at, 3)),
  });
}

/** Rightly used; the certificate was corrected later. The conduct is sound, today's verdict is not. */
function correctedAfterUse(cast: Cast, n: number, at: string, owner: string, nominal: string): void {
  const pair = cast.pair(n, {
    owner,
    nominal,
    references: [at, monthsAfter(at, 11)],
    work: [
      { begin: monthsAfter(at, 1), uses: 0 },
      { begin: monthsAfter(at, 12), uses: 1 },
    ],
    say: (round, value) => {
      if (round !== 0) return;
      const fault = {
        is: 'fault',
        kind: 'reference corrected after use',
        rule: 'B-15',
        verdict: 'today',
      } as const;
      note(cast, value, referenceValue(cast, pair, 0), fault);
    },
  });
  cast.happenings.push({
    day: monthsAfter(at, 4),
    happen: () => correctCertificate(cast, pair, monthsAfter(at, 4)),
  });
}

function latestOf({ world }: Cast, pair: Pair, round: number): DemoValue {
  const first = valuesOf(world, pair.reference.id, round)[0]!;
  return world.sheets.get(first.certificateNo)!.values[0]!;
}

/** The certificate had stated too small a U; a new revision states the larger one. */
function correctCertificate(cast: Cast, pair: Pair, day: string): void {
  const { certificateNo } = referenceValue(cast, pair, 0);
  const correct = (entry: Entry): Entry => {
    const { deviation, printed: before } = entry.result;
    return { ...entry, result: { ...entry.result, printed: printed(deviation, 1.3 * before.expandedU) } };
  };
  reissue(cast.world, certificateNo, {
    day,
    reason: 'The U of the reference had been left out of U.',
    correct,
  });
}

/** Withdrawn two months before it was used. */
function withdrawnReference(cast: Cast, n: number, at: string, owner: string, nominal: string): void {
  const pair = cast.pair(n, {
    owner,
    nominal,
    references: [at, monthsAfter(at, 8)],
    work: [
      { begin: monthsAfter(at, 6), uses: 0 },
      { begin: monthsAfter(at, 9), uses: 1 },
    ],
    say: (round, value) => {
      if (round !== 0) return;
      const fault = { is: 'fault', kind: 'withdrawn reference', rule: 'B-15', verdict: 'conduct' } as const;
      note(cast, value, referenceValue(cast, pair, 0), fault);
    },
  });
  withdrawOn(cast, pair, monthsAfter(at, 4), monthsAfter(at, 4));
}

/** Rightly used; withdrawn later from an earlier day on. The conduct stays sound, today's verdict does not. */
function withdrawnAfterUse(cast: Cast, n: number, at: string, owner: string, nominal: string): void {
  const pair = cast.pair(n, {
    owner,
    nominal,
    references: [at, monthsAfter(at, 10)],
    work: [
      { begin: monthsAfter(at, 5), uses: 0 },
      { begin: monthsAfter(at, 11), uses: 1 },
    ],
    say: (round, value) => {
      if (round !== 0) return;
      const kind = 'reference withdrawn after use, from before it';
      note(cast, value, referenceValue(cast, pair, 0), { is: 'fault', kind, rule: 'B-15', verdict: 'today' });
    },
  });
  withdrawOn(cast, pair, monthsAfter(at, 7), monthsAfter(at, 2));
}

function withdrawOn(cast: Cast, pair: Pair, day: string, effectiveOn: string): void {
  cast.happenings.push({
    day,
    happen: () => {
      const { certificateNo } = referenceValue(cast, pair, 0);
      const reason = 'The balance had been out of order.';
      withdraw(cast.world, certificateNo, { day, reason, effectiveOn });
    },
  });
}

/** A newer value had been issued weeks before, and the older one was used. */
function olderValue(cast: Cast, n: number, at: string, owner: string, nominal: string): void {
  const pair = cast.pair(n, {
    owner,
    nominal,
    references: [at, monthsAfter(at, 9)],
    work: [
      { begin: monthsAfter(at, 2), uses: 0 },
      { begin: daysAfter(monthsAfter(at, 9), 30), uses: 0 },
      { begin: monthsAfter(at, 12), uses: 1 },
    ],
    say: (round, value) => {
      if (round !== 1) return;
      const kind = 'older value, though a newer was known';
      note(cast, value, referenceValue(cast, pair, 0), {
        is: 'fault',
        kind,
        rule: 'B-81',
        verdict: 'conduct',
      });
    },
  });
}

/** What looks like a fault and is none: the last day in date, the day a newer certificate came, words corrected. */
function nearMisses(cast: Cast, n: number, at: string, owner: string, nominal: string): void {
  const due = monthsAfter(at, INTERVAL);
  const second = daysAfter(due, -2);
  const kinds = [
    { kind: 're-issued with unchanged values', rule: 'B-15', verdict: 'today' },
    { kind: 'used on the last day in date', rule: 'B-14', verdict: 'conduct' },
    { kind: 'used on the day the newer certificate was issued', rule: 'B-81', verdict: 'conduct' },
    { kind: 'used on the day its certificate was issued', rule: 'B-13', verdict: 'conduct' },
    { kind: 'used after it was re-issued in words', rule: 'B-81', verdict: 'conduct' },
  ] as const;
  const pair: Pair = cast.pair(n, {
    owner,
    nominal,
    // The second calibration ends two days before the first is due and is issued on the very day.
    references: [at, second],
    work: [
      { begin: monthsAfter(at, 1), uses: 0 },
      { begin: due, uses: () => latestOf(cast, pair, 0) },
      { begin: due, uses: () => latestOf(cast, pair, 0) },
      { begin: due, uses: 1 },
      { begin: monthsAfter(at, 4), uses: () => latestOf(cast, pair, 0) },
    ],
    say: (round, value) => {
      const used = cast.world.sheets.get(value.certificateNo)!.sheet.entries[0]!.result.task.leaning.uses[0]!
        .value;
      note(cast, value, used, { is: 'look-alike', ...kinds[round]! });
    },
  });
  cast.happenings.push({
    day: monthsAfter(at, 3),
    happen: () => {
      const { certificateNo } = referenceValue(cast, pair, 0);
      const reason = 'The address of the customer was corrected; value and U are the same.';
      reissue(cast.world, certificateNo, { day: monthsAfter(at, 3), reason });
    },
  });
}

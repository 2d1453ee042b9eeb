import { beforeAll, describe, expect, it } from 'vitest';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Decimal } from '#shared/decimal.ts';
import { stateAt, type ValueEnd } from '#shared/state-at.ts';
import { knownAt } from '#server/db/in-force.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { STATE_ON_DAY, STATE_SINCE } from '#server/db/value-state.ts';
import { reviseCalibration, withdrawCalibration } from '#server/modules/calibrations/index.ts';
import { chainSubject } from '#server/modules/chains/chain-subject.queries.ts';
import { presentChain } from '#server/modules/chains/chain.presenter.ts';
import { chainOf, storeOf } from '#server/modules/chains/index.ts';
import {
  inputOf,
  lineOf,
  makeCalibration,
  makeStandard,
  useOf,
} from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson } from '#tests/support/factories.ts';
import { makeNotice, makeScale, termOf } from '#tests/support/notice-scene.ts';
import { testApp } from '#tests/support/test-app.ts';

/**
 * What is shown of a reference and of the weight that leaned on it, on every day as known on every day.
 *
 * A reference was calibrated and issued on 2025-01-15 (deviation 0.123 mg). It was used on 2025-02-10 for a weight
 * (deviation 0.200 mg, sensitivity 1), issued and recorded on that day. Then one thing happened to the reference, as
 * each heading says. "recorded" is the day on which the register learnt of it; "counts from" the day it takes effect.
 *
 * A row holds for every day tried within its two ranges ("to" and "from" include their day); each combination of days
 * has exactly one row. Columns: in force on | as known on | the reference stands | conduct | today | the weight as now
 * known. Conduct is what had been made known by the day of use; it never changes afterwards.
 */
const TABLE = `
nothing happens
  from 2025-01-15 | from 2025-01-15 | in force                    | holds | holds | as certified

re-issued in other words: recorded 2025-04-10, counts from 2025-04-10
  from 2025-01-15 | to 2025-04-09   | in force                    | holds | holds | as certified
  to 2025-04-09   | from 2025-04-10 | in force                    | holds | holds | as certified
  from 2025-04-10 | from 2025-04-10 | superseded since 2025-04-10 | holds | holds | not moved

corrected to 0.150 mg: recorded 2025-04-10, counts from 2025-04-10
  from 2025-01-15 | to 2025-04-09   | in force                    | holds | holds | as certified
  to 2025-04-09   | from 2025-04-10 | in force                    | holds | holds | as certified
  from 2025-04-10 | from 2025-04-10 | superseded since 2025-04-10 | holds | fails | moved by 0.027 mg

corrected to 0.150 mg, back-dated to before the use: recorded 2025-04-10, counts from 2025-01-20
  from 2025-01-15 | to 2025-04-09   | in force                    | holds | holds | as certified
  to 2025-01-19   | from 2025-04-10 | in force                    | holds | holds | as certified
  from 2025-01-20 | from 2025-04-10 | superseded since 2025-01-20 | holds | fails | moved by 0.027 mg

corrected to 0.150 mg, of future effect: recorded 2025-04-10, counts from 2025-06-01
  from 2025-01-15 | to 2025-04-09   | in force                    | holds | holds | as certified
  to 2025-05-31   | from 2025-04-10 | in force                    | holds | holds | as certified
  from 2025-06-01 | from 2025-04-10 | superseded since 2025-06-01 | holds | fails | moved by 0.027 mg

withdrawn: recorded 2025-04-10, counts from 2025-04-10
  from 2025-01-15 | to 2025-04-09   | in force                    | holds | holds | as certified
  to 2025-04-09   | from 2025-04-10 | in force                    | holds | holds | as certified
  from 2025-04-10 | from 2025-04-10 | withdrawn since 2025-04-10  | holds | fails | not computable

withdrawn, back-dated to before the use: recorded 2025-04-10, counts from 2025-01-20
  from 2025-01-15 | to 2025-04-09   | in force                    | holds | holds | as certified
  to 2025-01-19   | from 2025-04-10 | in force                    | holds | holds | as certified
  from 2025-01-20 | from 2025-04-10 | withdrawn since 2025-01-20  | holds | fails | not computable

withdrawn from 2025-01-20 (recorded 2025-04-10), mended by a correction to 0.150 mg (recorded 2025-05-05, counts from 2025-05-05)
  from 2025-01-15 | to 2025-04-09   | in force                    | holds | holds | as certified
  to 2025-01-19   | from 2025-04-10 | in force                    | holds | holds | as certified
  from 2025-01-20 | 2025-04-10 to 2025-05-04 | withdrawn since 2025-01-20 | holds | fails | not computable
  2025-01-20 to 2025-05-04 | from 2025-05-05 | withdrawn since 2025-01-20 | holds | fails | not computable
  from 2025-05-05 | from 2025-05-05 | withdrawn since 2025-01-20  | holds | fails | moved by 0.027 mg

a notice shifts its scale by -0.020 mg: recorded 2025-04-10, counts from 2025-04-10
  from 2025-01-15 | to 2025-04-09   | in force                    | holds | holds | as certified
  to 2025-04-09   | from 2025-04-10 | in force                    | holds | holds | as certified
  from 2025-04-10 | from 2025-04-10 | in force                    | holds | holds | moved by -0.02 mg

a notice shifts its scale by -0.020 mg, back-dated: recorded 2025-04-10, counts from 2025-01-20
  from 2025-01-15 | to 2025-04-09   | in force                    | holds | holds | as certified
  to 2025-01-19   | from 2025-04-10 | in force                    | holds | holds | as certified
  from 2025-01-20 | from 2025-04-10 | in force                    | holds | holds | moved by -0.02 mg

a notice shifts its scale by -0.020 mg, of future effect: recorded 2025-04-10, counts from 2025-06-01
  from 2025-01-15 | to 2025-04-09   | in force                    | holds | holds | as certified
  to 2025-05-31   | from 2025-04-10 | in force                    | holds | holds | as certified
  from 2025-06-01 | from 2025-04-10 | in force                    | holds | holds | moved by -0.02 mg
`;

/** Before, on and after every date of the table. */
const DAYS = [
  ...['2025-01-15', '2025-01-19', '2025-01-20', '2025-01-21', '2025-02-09', '2025-02-10'],
  ...['2025-04-09', '2025-04-10', '2025-04-11', '2025-05-04', '2025-05-05', '2025-05-06'],
  ...['2025-05-31', '2025-06-01', '2025-06-02'],
];
const KNOWN = [
  ...['2025-01-15', '2025-04-09', '2025-04-10', '2025-04-11'],
  ...['2025-05-04', '2025-05-05', '2025-05-06'],
];

interface TableRow {
  days: string[];
  known: string[];
  stands: string;
  conduct: string;
  today: string;
  now: string;
}

/** What happens to the reference: which day the clock shows meanwhile, and what is done then. */
const LIVES: Record<string, { on: string; act: (scene: Scene) => Promise<unknown> }[]> = {
  'nothing happens': [],
  're-issued in other words: recorded 2025-04-10, counts from 2025-04-10': [
    { on: '2025-04-10', act: (scene) => revise(scene, '2025-04-10', '0.000123') },
  ],
  'corrected to 0.150 mg: recorded 2025-04-10, counts from 2025-04-10': [
    { on: '2025-04-10', act: (scene) => revise(scene, '2025-04-10') },
  ],
  'corrected to 0.150 mg, back-dated to before the use: recorded 2025-04-10, counts from 2025-01-20': [
    { on: '2025-04-10', act: (scene) => revise(scene, '2025-01-20') },
  ],
  'corrected to 0.150 mg, of future effect: recorded 2025-04-10, counts from 2025-06-01': [
    { on: '2025-04-10', act: (scene) => revise(scene, '2025-06-01') },
  ],
  'withdrawn: recorded 2025-04-10, counts from 2025-04-10': [
    { on: '2025-04-10', act: (scene) => withdraw(scene, '2025-04-10') },
  ],
  'withdrawn, back-dated to before the use: recorded 2025-04-10, counts from 2025-01-20': [
    { on: '2025-04-10', act: (scene) => withdraw(scene, '2025-01-20') },
  ],
  'withdrawn from 2025-01-20 (recorded 2025-04-10), mended by a correction to 0.150 mg (recorded 2025-05-05, counts from 2025-05-05)':
    [
      { on: '2025-04-10', act: (scene) => withdraw(scene, '2025-01-20') },
      { on: '2025-05-05', act: (scene) => revise(scene, '2025-05-05') },
    ],
  'a notice shifts its scale by -0.020 mg: recorded 2025-04-10, counts from 2025-04-10': [
    { on: '2025-04-10', act: (scene) => notice(scene, '2025-04-10') },
  ],
  'a notice shifts its scale by -0.020 mg, back-dated: recorded 2025-04-10, counts from 2025-01-20': [
    { on: '2025-04-10', act: (scene) => notice(scene, '2025-01-20') },
  ],
  'a notice shifts its scale by -0.020 mg, of future effect: recorded 2025-04-10, counts from 2025-06-01': [
    { on: '2025-04-10', act: (scene) => notice(scene, '2025-06-01') },
  ],
};

let now = noon('2025-01-15');
const app = await testApp({ now: () => now });

function noon(day: string): Date {
  return new Date(`${day}T12:00:00.000Z`);
}

type Scene = Awaited<ReturnType<typeof makeScene>>;

/** An institute's reference, and a weight of a laboratory that leaned on it. */
async function makeScene() {
  now = noon('2025-01-15');
  const institute = await makeLaboratory(app, 'national institute');
  const laboratory = await makeLaboratory(app);
  const scale = await makeScale(app);
  const reference = await makeStandard(app, institute.id);
  const weight = await makeStandard(app, laboratory.id);
  const input = inputOf(institute.id, '2025-01-15', [lineOf(reference.id, { scaleVersionId: scale.id })]);
  const { certificateNo } = input;
  const issued = await makeCalibration(app, institute.id, '2025-01-15', input.lines, { certificateNo });
  const referenceUid = issued.valueUids[0]!;
  now = noon('2025-02-10');
  const line = lineOf(weight.id, { deviation: '0.0002', references: [useOf(referenceUid, '2025-02-10')] });
  const certified = await makeCalibration(app, laboratory.id, '2025-02-10', [line]);
  const person = await makePerson(app, 'metrologist', laboratory.id);
  return { institute, scale, input, issued, referenceUid, weightUid: certified.valueUids[0]!, person };
}

function revise({ input, issued }: Scene, effectiveOn: string, deviation = '0.00015') {
  return reviseCalibration(app.context(), {
    ...input,
    lines: input.lines.map((line) => ({ ...line, deviation })),
    calibrationId: issued.calibrationId,
    issuedOn: now.toISOString().slice(0, 10),
    effectiveOn,
    reason: 'Tried by a test',
  });
}

function withdraw({ issued }: Scene, effectiveOn: string) {
  return withdrawCalibration(app.context(), issued.revisionId, { reason: 'Tried by a test', effectiveOn });
}

function notice({ institute, scale }: Scene, effectiveOn: string) {
  const madeKnownOn = now.toISOString().slice(0, 10);
  return makeNotice(app, institute.id, scale.id, { effectiveOn, madeKnownOn, terms: [termOf('-0.00002')] });
}

function tableOf(heading: string): TableRow[] {
  const block = TABLE.split('\n\n').find((text) => text.trim().split('\n')[0] === heading);
  const rows = block?.trim().split('\n').slice(1) ?? [];
  return rows.map((row) => {
    const [days, known, stands, conduct, today, nowKnown] = row.split('|').map((cell) => cell.trim());
    return {
      days: within(days!, DAYS),
      known: within(known!, KNOWN),
      stands: stands!,
      conduct: conduct!,
      today: today!,
      now: nowKnown!,
    };
  });
}

/** The days tried of a range: "from A", "to B" or "A to B". */
function within(range: string, days: readonly string[]): string[] {
  const [, from = '0000', to = '9999'] =
    /^(?:from )?(\d{4}-\d\d-\d\d)?(?: ?to (\d{4}-\d\d-\d\d))?$/.exec(range) ?? [];
  return days.filter((day) => from <= day && day <= to);
}

describe('the truth table of the two clocks', () => {
  it('has a heading for each life that is lived, and a life for each heading', () => {
    const headings = TABLE.trim()
      .split('\n\n')
      .map((block) => block.trim().split('\n')[0]);
    expect(headings).toEqual(Object.keys(LIVES));
  });

  describe.each(Object.keys(LIVES))('%s', (heading) => {
    let scene: Scene;
    let stored: { id: number; recordedAt: string; ends: ValueEnd[] };
    const rows = tableOf(heading);

    beforeAll(async () => {
      scene = await makeScene();
      for (const { on, act } of LIVES[heading]!) {
        now = noon(on);
        await act(scene);
      }
      now = noon('2025-08-01');
      stored = await storedLife(scene.referenceUid);
    });

    it('has one row for each day tried and each day of knowledge', () => {
      const cells = rows.flatMap(({ days, known }) => days.flatMap((day) => known.map((k) => `${day} ${k}`)));
      const all = DAYS.flatMap((day) => KNOWN.map((k) => `${day} ${k}`));
      expect(cells.toSorted()).toEqual(all.toSorted());
    });

    it.each(rows)('$stands on $days.0 and later as known on $known.0 and later: $now', async (row) => {
      for (const day of row.days) {
        for (const known of row.known) {
          const reply = await chain(scene, day, known, 'certified');
          const expected = { day, known, ...pick(row) };
          expect({ day, known, ...shown(reply, scene.referenceUid) }).toEqual(expected);
          expect({ day, known, stands: byFunction(stored, day, known) }).toEqual({
            day,
            known,
            stands: row.stands,
          });
          expect({ day, known, stands: await bySql(stored.id, day, known) }).toEqual({
            day,
            known,
            stands: row.stands,
          });
          await expectDrawnAsNowKnown(scene, day, known, row);
        }
      }
    });
  });

  it('shows nothing of the reference as standing before it was issued, nor before it was recorded', async () => {
    const scene = await makeScene();
    now = noon('2025-08-01');
    const stored = await storedLife(scene.referenceUid);
    for (const known of KNOWN) {
      expect(byFunction(stored, '2025-01-14', known)).toBe('not yet in force');
      expect(await bySql(stored.id, '2025-01-14', known)).toBe('not yet in force');
      expect(shown(await chain(scene, '2025-01-14', known, 'certified'), scene.referenceUid).stands).toBe(
        'not yet in force',
      );
    }
    expect(byFunction(stored, '2025-06-01', '2025-01-14')).toBe('unknown');
    const before = await chain(scene, '2025-06-01', '2025-01-14', 'certified');
    expect(shown(before, scene.referenceUid).stands).toBe('not yet in force');
  });

  it('has no future withdrawal: what stands today is not withdrawn from tomorrow', async () => {
    const scene = await makeScene();
    now = noon('2025-04-10');
    await expect(withdraw(scene, '2025-04-11')).rejects.toMatchObject({ id: 'unprocessable' });
  });
});

function pick({ stands, conduct, today, now: nowKnown }: TableRow) {
  return { stands, conduct, today, now: nowKnown };
}

async function chain(scene: Scene, day: string, known: string, as: 'certified' | 'now known') {
  const { user } = scene.person;
  const subject = await chainSubject({ ...app.context(user), user }, scene.weightUid);
  const found = await chainOf(app.context(user), storeOf(app.database), subject.id, { day, known, as });
  return presentChain(found, user, subject);
}

/** What a reply says of the reference, of the link to it under both verdicts, and of the weight as now known. */
function shown(reply: ChainResponse, referenceUid: string) {
  const reference = valueOf(reply, referenceUid)!;
  const outcome = (verdict: string) =>
    reply.checks.find(
      (check) => check.rule === 'B-15' && check.verdict === verdict && check.subject.type === 'link',
    )!.outcome;
  const now = reply.asNowKnown;
  return {
    stands: reference.stateSince ? `${reference.state} since ${reference.stateSince}` : reference.state,
    conduct: outcome('conduct'),
    today: outcome('today'),
    now: now === null ? 'as certified' : movedText(now.shift),
  };
}

function movedText(shift: string | null): string {
  if (shift === null) return 'not computable';
  return Number(shift) === 0 ? 'not moved' : `moved by ${new Decimal(shift).times(1000).toFixed()} mg`;
}

function valueOf(reply: ChainResponse, uid: string) {
  return reply.nodes.find((node) => node.type === 'value' && node.uid === uid) as
    Extract<ChainResponse['nodes'][number], { type: 'value' }> | undefined;
}

/** Drawn as now known, the successor stands in the reference's place, and no number is given below a withdrawn one. */
async function expectDrawnAsNowKnown(scene: Scene, day: string, known: string, row: TableRow) {
  const reply = await chain(scene, day, known, 'now known');
  const isReplaced = row.stands !== 'in force' && row.now !== 'not computable';
  expect({ day, known, isReplaced: !valueOf(reply, scene.referenceUid) }).toEqual({ day, known, isReplaced });
  expect(reply.uncertainty.standard === null).toBe(row.now === 'not computable');
  const standing = reply.links.find((link) => link.role === 'reference')!;
  const isMended = isReplaced || row.today === 'holds';
  expect({ day, known, isBroken: standing.today === 'broken' }).toEqual({ day, known, isBroken: !isMended });
}

const INSTANT = (column: string) => `DATE_FORMAT(${column}, '%Y-%m-%dT%H:%i:%s.%fZ')`;

async function storedLife(uid: string) {
  const value = await readRow<{ id: number; recordedAt: string }>(
    app.database,
    `SELECT id, ${INSTANT('recorded_at')} AS recordedAt FROM assigned_value WHERE uid = :uid`,
    { uid },
  );
  const ends = await readRows<ValueEnd>(
    app.database,
    `SELECT kind, effective_on AS effectiveOn, ${INSTANT('recorded_at')} AS recordedAt
     FROM value_end WHERE value_id = :id`,
    { id: value!.id },
  );
  return { ...value!, ends };
}

function byFunction(stored: { recordedAt: string; ends: ValueEnd[] }, day: string, known: string): string {
  const dates = { effectiveFrom: '2025-01-15', recordedAt: stored.recordedAt };
  const { state, since } = stateAt(dates, stored.ends, day, known);
  return since ? `${state} since ${since}` : state;
}

async function bySql(id: number, day: string, known: string): Promise<string> {
  const row = await readRow<{ state: string; since: string | null }>(
    app.database,
    `SELECT ${STATE_ON_DAY} AS state, ${STATE_SINCE} AS since FROM assigned_value v
     WHERE v.id = :id AND v.recorded_at <= :knownAt`,
    { id, day, knownAt: knownAt(known) },
  );
  if (!row) return 'unknown';
  return row.since ? `${row.state} since ${row.since}` : row.state;
}

import { describe, expect, it } from 'vitest';
import type { NoticeOwnRow, NoticeResponse, NoticeRow } from '#shared/contracts/notices.ts';
import { chainOf, noticeShifts, storeOf } from '#server/modules/chains/index.ts';
import { noticesInForce } from '#shared/notices/in-force.ts';
import { makePerson, type TestPerson } from '#tests/support/factories.ts';
import { issueValue, makeDownstreamScene, type SceneValue } from '#tests/support/downstream-scene.ts';
import { makeNotice, makeScale, termOf } from '#tests/support/notice-scene.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const FAR = '2099-01-01';

async function shown(id: string, person: TestPerson): Promise<NoticeResponse> {
  const reply = await (await app.signIn(person)).get(`/api/notices/${id}`);
  expect(reply.status, reply.text).toBe(200);
  return reply.body as NoticeResponse;
}

const own = (rows: NoticeRow[], value: SceneValue) =>
  rows.find((row): row is NoticeOwnRow => row.view === 'full' && row.uid === value.uid)!;

/** What the notices in force on a day bring to a value, by number. */
async function broughtOn(value: SceneValue, day: string) {
  const store = storeOf(app.database);
  const chain = await chainOf(app.context(), store, value.id, { day, known: FAR });
  const effects = noticeShifts(chain.closure, noticesInForce(store.notices, day, FAR)).get(value.uid) ?? [];
  return { chain, effects };
}

describe('a linear correction by the day of calibration', () => {
  it('gives each value the shift of its own day, its descendants that of the oldest covered one', async () => {
    const scene = await makeDownstreamScene(app);
    const scale = await makeScale(app);
    // Invented: -10 ug on the root's day, falling by 1 ug a day to -41 ug on the working standard's.
    const points = [
      { on: '2024-01-10', shift: '-0.00001' },
      { on: '2024-02-10', shift: '-0.000041' },
    ];
    const alone = await issueValue(app, {
      issuer: scene.institute,
      holder: scene.home,
      day: '2024-01-20',
      deviation: '0.0001',
      expandedU: '0.0002',
      leansOn: null,
    });
    const { id } = await makeNotice(app, scene.institute.id, scale.id, {
      terms: [{ shiftPerKilogram: points }],
    });
    const notice = await shown(id, scene.people.home);
    expect(own(notice.rows, alone)).toMatchObject({
      shift: '-0.00002',
      deviationBefore: '0.0001',
      deviationAfter: '0.00008',
      expandedUBefore: 0.0002,
      expandedUAfter: 0.0002,
      ratio: expect.closeTo(-0.1, 9),
    });
    // Calibrated later, but leaning on the root: it inherits the root's shift and gets none of its own.
    expect(own(notice.rows, scene.homes).shift).toBe('-0.00001');
    const { effects } = await broughtOn(scene.below, '2025-06-01');
    expect(effects.map(({ shift }) => shift)).toEqual([expect.closeTo(-0.00001, 15)]);
  });
});

describe('an uncertainty added, values unchanged', () => {
  it('adds in quadrature to certificates of before, and to none of after', async () => {
    const scene = await makeDownstreamScene(app);
    const scale = await makeScale(app);
    const after = await issueValue(app, {
      issuer: scene.institute,
      holder: scene.home,
      day: '2025-02-01',
      deviation: '0.0001',
      expandedU: '0.0002',
      leansOn: null,
    });
    const { id } = await makeNotice(app, scene.institute.id, scale.id, {
      kind: 'uncertainty added',
      terms: [{ ...termOf('0', 0.00008), performedTo: '2024-12-31' }],
    });
    const notice = await shown(id, scene.people.home);
    expect(own(notice.rows, after)).toBeUndefined();
    const row = own(notice.rows, scene.homes);
    expect(row).toMatchObject({
      shift: '0',
      ratio: 0,
      addedU: expect.closeTo(0.00008, 12),
      deviationAfter: '0.000133',
    });
    expect(row.expandedUAfter).toBeCloseTo(2 * Math.hypot(0.00015, 0.00008), 12);
    expect(row.word).toBe('material');
  });
});

describe('successive consensus values', () => {
  it('add up from scale to scale, each from its day on, and their weight is cumulative', async () => {
    const scene = await makeDownstreamScene(app);
    const [first, second, third] = [await makeScale(app), await makeScale(app), await makeScale(app)];
    const step = (from: { id: string }, to: { id: string }, effectiveOn: string, shift: string) =>
      makeNotice(app, scene.institute.id, from.id, {
        kind: 'consensus value',
        toScaleId: to.id,
        effectiveOn,
        terms: [{ ...termOf(shift, 0), performedTo: '2024-12-31' }],
      });
    // Invented: -16 ug, then -18 ug, beside U = 300 ug: each below 10 %, together above.
    await step(first, second, '2025-01-01', '-0.000016');
    const later = await step(second, third, '2026-01-01', '-0.000018');
    const on = async (day: string) => (await broughtOn(scene.homes, day)).effects.map(({ shift }) => shift);
    expect(await on('2024-12-31')).toEqual([]);
    expect(await on('2025-12-31')).toEqual([expect.closeTo(-0.000016, 12)]);
    expect(await on('2026-01-01')).toEqual([expect.closeTo(-0.000016, 12), expect.closeTo(-0.000018, 12)]);
    const notice = await shown(later.id, scene.people.home);
    expect(own(notice.rows, scene.homes)).toMatchObject({
      shift: '-0.000018',
      deviationBefore: '0.000117',
      deviationAfter: '0.000099',
      ratio: expect.closeTo(-0.034 / 0.3, 9),
      word: 'material',
    });
  });

  /**
   * Consensus values of the kilogram, offset from the international prototype: -2 ug from 2021-02-01, -7 ug from
   * 2023-03-01, u = 20 ug agreed (PTB, national prototype page citing CCM-TGPfD-kg; BIPM news 2023). Before them, from
   * 2019-05-20, 10 ug added in quadrature to certificates on the prototype's scale (CCM note on the redefinition).
   */
  it('carry the published offsets: 0, -2, -7 ug at 1 kg, and the 10 ug of the redefinition', async () => {
    const scene = await makeDownstreamScene(app);
    const [prototype, first, second] = [await makeScale(app), await makeScale(app), await makeScale(app)];
    const covered = { performedTo: '2024-12-31' };
    const notices: [string, { id: string }, { id: string } | null, string, number][] = [
      ['2019-05-20', prototype, null, '0', 0.00001],
      ['2021-02-01', prototype, first, '-0.000002', 0],
      ['2023-03-01', first, second, '-0.000005', 0],
    ];
    for (const [effectiveOn, from, to, shift, u] of notices) {
      await makeNotice(app, scene.institute.id, from.id, {
        kind: u > 0 ? 'uncertainty added' : 'consensus value',
        toScaleId: to?.id ?? null,
        effectiveOn,
        madeKnownOn: effectiveOn,
        terms: [{ ...termOf(shift, u), ...covered }],
      });
    }
    const uBefore = (await broughtOn(scene.below, '2019-05-19')).chain.numbers.propagation
      .standardUncertainty!;
    for (const [day, micrograms] of [
      ['2019-05-20', 0],
      ['2021-01-31', 0],
      ['2021-02-01', -2],
      ['2023-02-28', -2],
      ['2023-03-01', -7],
    ] as const) {
      const { chain, effects } = await broughtOn(scene.below, day);
      const total = effects.reduce((sum, { shift }) => sum + shift, 0);
      expect(total * 1e6, day).toBeCloseTo(micrograms, 9);
      const u = chain.numbers.propagation.standardUncertainty!;
      expect((u ** 2 - uBefore ** 2) / 1e-10, day).toBeCloseTo(1, 6);
    }
  });
});

describe('what each may see of a notice', async () => {
  const scene = await makeDownstreamScene(app);
  const scale = await makeScale(app);
  const { id } = await makeNotice(app, scene.institute.id, scale.id, {
    terms: [termOf('-0.00004', 0.00001)],
  });
  const people = {
    ...scene.people,
    assessor: await makePerson(app, 'assessor', scene.home.id),
    pilot: await makePerson(app, 'comparison pilot'),
    reader: await makePerson(app, 'reader', scene.home.id),
  };
  const { root, working, homes, others, customers, below } = scene;
  const values = { root, working, homes, others, customers, below };
  type Name = keyof typeof values;

  it.each<[keyof typeof people, Name[], Name[]]>([
    ['registrar', ['root', 'working', 'homes', 'others', 'customers', 'below'], []],
    ['institute', ['root', 'working'], ['homes', 'others', 'customers', 'below']],
    ['home', ['homes'], ['customers', 'below']],
    ['reader', ['homes'], ['customers', 'below']],
    ['assessor', ['homes'], ['customers', 'below']],
    ['customer', ['customers', 'below'], []],
    ['another', ['others'], []],
    ['stranger', [], []],
    ['pilot', [], []],
  ])('%s', async (who, full, warned) => {
    const notice = await shown(id, people[who]);
    const numbers = (view: NoticeRow['view']) =>
      notice.rows.filter((row) => row.view === view).map((row) => row.registryNo);
    const wanted = (names: Name[]) => names.map((name) => values[name].registryNo).sort();
    expect(numbers('full').sort()).toEqual(wanted(full));
    expect(numbers('warning').sort()).toEqual(wanted(warned));
    expect(notice.total).toMatchObject({ count: full.length + warned.length, warned: warned.length });
    const text = JSON.stringify(notice.rows);
    for (const name of Object.keys(values) as Name[]) {
      if (full.includes(name)) continue;
      const { deviation, certificateNo, uid, revisionId, standardId } = values[name];
      for (const hidden of [deviation, certificateNo, uid, revisionId, standardId]) {
        expect(text, `${name} for ${who}`).not.toContain(hidden);
      }
    }
    for (const row of notice.rows) {
      if (row.view === 'warning')
        expect(Object.keys(row).sort()).toEqual([
          'class',
          'laboratory',
          'nominal',
          'registryNo',
          'shift',
          'view',
          'word',
        ]);
    }
  });

  it('pages: each row once, no cursor of another list', async () => {
    const agent = await app.signIn(people.registrar);
    const seen: string[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const query = { limit: 2, ...(cursor && { cursor }) };
      const { body } = await agent.get(`/api/notices/${id}`).query(query);
      seen.push(...body.rows.map((row: NoticeRow) => row.registryNo));
      cursor = body.nextCursor;
    }
    expect(seen).toHaveLength(6);
    expect(new Set(seen).size).toBe(6);
    const refused = await agent.get(`/api/notices/${id}`).query({ cursor: 'bm90IG9uZQ' });
    expect(refused.status).toBe(400);
  });
});

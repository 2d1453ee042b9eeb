import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { WhatIfChange, WhatIfResponse, WhatIfRow } from '#shared/contracts/downstream.ts';
import { readRow } from '#server/db/read.ts';
import { memoryOf } from '#server/modules/downstream/index.ts';
import { issueValue, makeDownstreamScene, type DownstreamScene } from '#tests/support/downstream-scene.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const scene = await makeDownstreamScene(app);
/** Processes that have only just started: nothing is in their memory when the first question comes. */
const started = { institute: await testApp(), registrar: await testApp() };
type Who = keyof DownstreamScene['people'];
const agents = new Map<Who, Awaited<ReturnType<typeof app.signIn>>>();
for (const who of Object.keys(scene.people) as Who[]) agents.set(who, await app.signIn(scene.people[who]));

type Rest = Record<string, unknown>;
const send = (who: Who, changes: unknown[], rest: Rest = {}) =>
  agents
    .get(who)!
    .post('/api/what-if')
    .send({ changes, ...rest });

async function ask(who: Who, changes: WhatIfChange[], rest: Rest = {}): Promise<WhatIfResponse> {
  const reply = await send(who, changes, rest);
  expect(reply.status, reply.text).toBe(200);
  return reply.body as WhatIfResponse;
}

/** Every row by registry number, the groups opened one by one. */
async function rowsOf(who: Who, changes: WhatIfChange[], rest: Rest = {}): Promise<Map<string, WhatIfRow>> {
  const { groups } = await ask(who, changes, rest);
  const rows = new Map<string, WhatIfRow>();
  for (const { key } of groups) {
    const { page } = await ask(who, changes, { ...rest, group: key });
    for (const row of page!.rows) rows.set(row.registryNo, row);
  }
  return rows;
}

const shift = (valueUid: string, grams: string): WhatIfChange => ({ kind: 'shift', valueUid, shift: grams });
const { root, working, homes, others, customers, below, institute, home, customer } = scene;

describe('POST /api/what-if', () => {
  it('is 401 without sign-in', async () => {
    const reply = await app.request.post('/api/what-if').send({ changes: [shift(working.uid, '0.0001')] });
    expect(reply.status).toBe(401);
  });

  it.each<[string, unknown, Rest, string]>([
    ['no change', [], {}, 'changes'],
    ['a shift of zero', [{ kind: 'shift', valueUid: working.uid, shift: '0.000' }], {}, 'changes.0.shift'],
    ['a shift as a number', [{ kind: 'shift', valueUid: working.uid, shift: 0.1 }], {}, 'changes.0.shift'],
    ['an added u of zero', [{ kind: 'raise', valueUid: working.uid, addedU: 0 }], {}, 'changes.0.addedU'],
    ['an unknown kind', [{ kind: 'wish', valueUid: working.uid }], {}, 'changes.0.kind'],
    ['an unknown field', [{ ...shift(working.uid, '1'), by: 'me' }], {}, 'changes.0.by'],
    ['a threshold below zero', [shift(working.uid, '1')], { threshold: -1 }, 'threshold'],
    [
      'a notice with days out of order',
      [notice(['2024-02-01', '2024-01-01'])],
      {},
      'changes.0.shiftPerKilogram',
    ],
    ['a cursor of another order', [shift(working.uid, '1')], { group: 'x', cursor: 'bm90IG9uZQ' }, 'cursor'],
  ])('is 400 for %s', async (_, changes, rest, field) => {
    const reply = await send('institute', changes as unknown[], rest);
    expect(reply.status, reply.text).toBe(400);
    expect(Object.keys(reply.body.fields)).toEqual([field]);
  });

  it('is 403 for a notice in the name of a laboratory that the person does not read', async () => {
    expect((await send('home', [notice(['2024-01-01'])])).status).toBe(403);
  });

  it('is 404 for what the person may not know, and for what is not there', async () => {
    expect((await send('stranger', [shift(working.uid, '1')])).status).toBe(404);
    expect((await send('another', [shift(homes.uid, '1')])).status).toBe(404);
    expect((await send('institute', [shift(randomUUID(), '1')])).status).toBe(404);
    expect((await send('institute', [{ kind: 'withdraw', revisionId: randomUUID() }])).status).toBe(404);
    expect((await send('another', [{ kind: 'withdraw', revisionId: homes.revisionId }])).status).toBe(404);
  });

  it('is 422 for a notice of a laboratory that issued nothing', async () => {
    const reply = await send('registrar', [{ ...notice(['2024-01-01']), issuerId: randomUUID() }]);
    expect(reply.status).toBe(422);
    expect(Object.keys(reply.body.fields)).toEqual(['changes.0.issuerId']);
  });

  it('changes nothing: no act is recorded', async () => {
    const acts = () => readRow<{ n: number }>(app.database, 'SELECT COUNT(*) AS n FROM act');
    const before = await acts();
    await ask('institute', [
      shift(working.uid, '0.0005'),
      { kind: 'withdraw', revisionId: homes.revisionId },
    ]);
    expect(await acts()).toEqual(before);
  });

  it('gives the holder shift, shift over U, value and U after, and both class verdicts', async () => {
    const rows = await rowsOf('home', [shift(working.uid, '0.0012')]);
    expect([...rows.keys()].sort()).toEqual(
      [homes.registryNo, customers.registryNo, below.registryNo].sort(),
    );
    expect(rows.get(homes.registryNo)).toMatchObject({
      view: 'full',
      uid: homes.uid,
      deviation: '0.000133',
      deviationAfter: '0.001333',
      shift: 0.0012,
      ratio: expect.closeTo(4, 12),
      expandedUAfter: 0.0003,
      // E2 at 1 kg: 1.6 mg - 0.3 mg = 1.3 mg is the most that the guarded rule accepts.
      classBefore: 'keeps',
      classAfter: 'does not keep',
      word: 'verdict changes',
    });
  });

  it('gives an issuer laboratory, weight, shift and one word of weights of others, and nothing else', async () => {
    const rows = await rowsOf('institute', [shift(working.uid, '0.0012')]);
    expect(rows.size).toBe(4);
    const warned = (laboratory: { id: string; code: string; name: string }, registryNo: string) => ({
      view: 'warning',
      laboratory: { id: laboratory.id, code: laboratory.code, name: laboratory.name },
      registryNo,
      nominal: expect.stringMatching(/^1000(\.0*)?$/),
      class: 'E2',
      shift: 0.0012,
      word: 'verdict changes',
    });
    // The institute's own customers by name; home's customer is told as home's weight.
    expect(rows.get(homes.registryNo)).toEqual(warned(home, homes.registryNo));
    expect(rows.get(customers.registryNo)).toEqual(warned(home, customers.registryNo));
    expect(rows.get(below.registryNo)).toEqual(warned(customer, below.registryNo));
    const text = JSON.stringify([...rows.values()]);
    for (const value of [homes, others, customers, below]) {
      for (const hidden of [
        value.deviation,
        value.certificateNo,
        value.uid,
        value.revisionId,
        value.standardId,
      ]) {
        expect(text).not.toContain(hidden);
      }
    }
    for (const hidden of ['ratio', 'expandedU', 'deviation', 'classBefore', '0.001333']) {
      expect(text).not.toContain(hidden);
    }
  });

  it('counts no ratio of others: largest shift over U is of one’s own', async () => {
    const forInstitute = await ask('institute', [shift(working.uid, '0.0012')]);
    expect(forInstitute.groups.every((group) => group.largestRatio === null)).toBe(true);
    expect(forInstitute.groups.every((group) => group.largestShift === 0.0012)).toBe(true);
    const forHome = await ask('home', [shift(working.uid, '0.0012')]);
    const own = forHome.groups.find((group) => group.key === home.id)!;
    expect(own.largestRatio).toBeCloseTo(4, 12);
  });

  it.each<[Who, number]>([
    ['institute', 4],
    ['home', 3],
    ['customer', 2],
    ['another', 1],
    ['registrar', 4],
  ])('counts for the %s what is theirs or below theirs: %d', async (who, count) => {
    expect((await ask(who, [shift(working.uid, '0.0001')])).total.count).toBe(count);
  });

  it('decides the word by the threshold, and never suppresses a verdict', async () => {
    const words = async (grams: string, threshold?: number) =>
      (await ask('registrar', [shift(homes.uid, grams)], threshold === undefined ? {} : { threshold })).total
        .words;
    // U is 0.4 mg for the customer's weight, 0.5 mg for the one below it.
    expect(await words('0.00004')).toEqual({ none: 2, material: 0, verdictChanges: 0 });
    expect(await words('0.000045')).toEqual({ none: 1, material: 1, verdictChanges: 0 });
    expect(await words('0.000045', 0.01)).toEqual({ none: 0, material: 2, verdictChanges: 0 });
    expect(await words('0.0012', 10)).toEqual({ none: 0, material: 0, verdictChanges: 2 });
  });

  it('tells the words of weights of others at a threshold that nobody chooses, in rows, counts and order', async () => {
    const told = async (threshold: number) => {
      const rest = { by: 'class', group: 'E2', threshold };
      const { total, groups, page } = await ask('institute', [shift(working.uid, '0.00002')], rest);
      return { total, groups, rows: page!.rows };
    };
    const usual = await told(0.1);
    expect(usual.rows).toHaveLength(4);
    for (const threshold of [0, 0.001, 0.05, 0.17, 10]) expect(await told(threshold)).toEqual(usual);
  });

  it('tells U of weights of others by bands only: a material shift is never told as none', async () => {
    const word = async (who: Who, grams: string) =>
      (await rowsOf(who, [shift(working.uid, grams)])).get(homes.registryNo)!.word;
    // U is 0.3 mg: for its holder the word turns at 30 µg.
    expect(await word('home', '0.000029')).toBe('none');
    expect(await word('home', '0.000031')).toBe('material');
    const words = new Set<string>();
    for (const grams of ['0.0000201', '0.000029', '0.000031', '0.00005']) {
      words.add(await word('institute', grams));
    }
    expect([...words]).toEqual(['material']);
    expect(await word('institute', '0.00002')).toBe('none');
  });

  it('answers the largest shift that it takes, and refuses a larger one', async () => {
    const rows = await rowsOf('registrar', [shift(homes.uid, '-1000000')]);
    expect(rows.get(customers.registryNo)).toMatchObject({ deviationAfter: '-999999.999745' });
    expect((await send('registrar', [shift(homes.uid, '1000000.000000000001')])).status).toBe(400);
  });

  it('adds a larger u in quadrature, down the chain', async () => {
    const rows = await rowsOf('customer', [{ kind: 'raise', valueUid: homes.uid, addedU: 0.0002 }]);
    const row = rows.get(customers.registryNo);
    expect(row).toMatchObject({ shift: 0, classBefore: 'keeps', classAfter: 'does not keep' });
    expect((row as { expandedUAfter: number }).expandedUAfter).toBeCloseTo(
      2 * Math.hypot(0.0002, 0.0002),
      12,
    );
  });

  it('tells what cannot be computed any more below a withdrawn certificate', async () => {
    const changes: WhatIfChange[] = [{ kind: 'withdraw', revisionId: homes.revisionId }];
    const rows = await rowsOf('customer', changes);
    expect(rows.get(customers.registryNo)).toMatchObject({
      shift: null,
      deviationAfter: null,
      ratio: null,
      classAfter: 'not judged',
      word: 'verdict changes',
    });
    const warned = (await rowsOf('home', changes)).get(below.registryNo);
    expect(warned).toMatchObject({ view: 'warning', shift: null, word: 'verdict changes' });
  });

  it('counts a notice once on the way down: all its values shift alike, by mass and by day', async () => {
    // The root was weighed on 10 January, a third of the way between the two days.
    const change = {
      ...(notice(['2024-01-01', '2024-01-28']) as object),
      shiftPerKilogram: [
        { on: '2024-01-01', shift: '0' },
        { on: '2024-01-28', shift: '-0.000006' },
      ],
      addedUPerKilogram: 0.00001,
    } as WhatIfChange;
    const rows = await rowsOf('registrar', [change]);
    expect(rows.size).toBe(6);
    for (const row of rows.values()) expect(row.shift).toBeCloseTo(-2e-6, 15);
    const own = rows.get(root.registryNo) as { expandedUAfter: number };
    expect(own.expandedUAfter).toBeCloseTo(2 * Math.hypot(0.00005, 0.00001), 12);
  });

  it('hands nothing through a class limit, and says so when the reference leaves its class', async () => {
    const fresh = await makeDownstreamScene(app);
    const user = await issueValue(app, {
      issuer: fresh.home,
      holder: fresh.home,
      day: '2024-06-10',
      deviation: '0.002',
      expandedU: '0.006',
      leansOn: fresh.homes.uid,
      usedAs: 'class limit',
      weightClass: 'M1',
    });
    const agent = await app.signIn(fresh.people.home);
    const asked = async (grams: string) => {
      const body = { changes: [shift(fresh.working.uid, grams)], group: fresh.home.id };
      const reply = (await agent.post('/api/what-if').send(body)).body as WhatIfResponse;
      return { reply, row: reply.page!.rows.find((row) => row.registryNo === user.registryNo) };
    };
    const within = await asked('0.001');
    expect(within.row).toMatchObject({ shift: 0, isBeyondLimit: false, word: 'none' });
    expect(within.reply.beyondLimit).toEqual([]);
    const beyond = await asked('0.0016');
    expect(beyond.row).toMatchObject({ shift: 0, isBeyondLimit: true, word: 'material' });
    expect(beyond.reply.beyondLimit).toEqual([{ uid: fresh.homes.uid, registryNo: fresh.homes.registryNo }]);
  });

  it.each(['word', 'shift', 'ratio', 'u'])('sorts by %s and pages through every row once', async (sort) => {
    const changes: WhatIfChange[] = [
      shift(homes.uid, '0.00005'),
      { kind: 'raise', valueUid: customers.uid, addedU: 0.0001 },
      shift(root.uid, '0.00002'),
    ];
    const seen: WhatIfRow[] = [];
    let cursor: string | undefined;
    do {
      const rest = { by: 'class', group: 'E2', sort, limit: 1, ...(cursor ? { cursor } : {}) };
      const { page } = await ask('registrar', changes, rest);
      seen.push(...page!.rows);
      cursor = page!.nextCursor ?? undefined;
    } while (cursor);
    expect(new Set(seen.map((row) => row.registryNo)).size).toBe(3);
    const keys = seen.map((row) => {
      if (row.view !== 'full') throw new Error('The registrar sees all in full');
      const growth = row.expandedUAfter! / Number(row.expandedU);
      return { word: row.word === 'none' ? 0 : 1, shift: row.shift!, ratio: row.ratio!, u: growth }[sort]!;
    });
    expect(keys).toEqual([...keys].sort((a, b) => b - a));
  });

  it.each(['institute', 'registrar'] as const)(
    'answers the %s the same from the database, just after a start, as from memory later',
    async (who) => {
      const body = { changes: [shift(root.uid, '0.0003')], by: 'class', group: 'E2', limit: 500 };
      const agent = await started[who].signIn(scene.people[who]);
      const first = await agent.post('/api/what-if').send(body);
      expect(first.body.page.rows).toHaveLength(first.body.total.count);
      await memoryOf(started[who].database).load();
      expect(await memoryOf(started[who].database).current()).not.toBeNull();
      expect((await agent.post('/api/what-if').send(body)).body).toEqual(first.body);
    },
  );
});

/** A notice of the institute over all its values, with no shift on the days given. */
function notice(days: string[]): WhatIfChange {
  return {
    kind: 'notice',
    issuerId: institute.id,
    shiftPerKilogram: days.map((on) => ({ on, shift: '0' })),
    addedUPerKilogram: 0,
  };
}

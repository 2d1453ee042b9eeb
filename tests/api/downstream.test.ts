import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { DownstreamResponse } from '#shared/contracts/downstream.ts';
import { withdrawCalibration } from '#server/modules/calibrations/index.ts';
import { isPartSmall } from '#server/modules/downstream/graph.queries.ts';
import { graphFromDatabase, memoryOf } from '#server/modules/downstream/index.ts';
import { issueValue, makeDownstreamScene, type DownstreamScene } from '#tests/support/downstream-scene.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const scene = await makeDownstreamScene(app);
type Who = keyof DownstreamScene['people'];
const agents = new Map<Who, Awaited<ReturnType<typeof app.signIn>>>();
for (const who of Object.keys(scene.people) as Who[]) agents.set(who, await app.signIn(scene.people[who]));

async function ask(who: Who, uid: string, query: Record<string, string> = {}): Promise<DownstreamResponse> {
  const reply = await agents.get(who)!.get(`/api/downstream/${uid}`).query(query);
  expect(reply.status, reply.text).toBe(200);
  return reply.body as DownstreamResponse;
}

/** Groups as "who: rows (of them warnings)". */
function counted(reply: DownstreamResponse): Record<string, [number, number]> {
  return Object.fromEntries(
    reply.groups.map((group) => [group.laboratory?.code ?? group.key, [group.count, group.warned]]),
  );
}
const { institute, home, customer, another } = scene;

describe('GET /api/downstream/:uid', () => {
  it('is 401 without sign-in', async () => {
    expect((await app.request.get(`/api/downstream/${scene.root.uid}`)).status).toBe(401);
  });

  it.each([
    [{ by: 'colour' }, 'by'],
    [{ day: '2025-02-30' }, 'day'],
    [{ known: 'now' }, 'known'],
    [{ limit: '0' }, 'limit'],
    [{ by: 'class', group: 'E2', cursor: 'bm90IGEgcGxhY2U' }, 'cursor'],
  ])('is 400 for %o', async (query, field) => {
    const reply = await agents.get('institute')!.get(`/api/downstream/${scene.root.uid}`).query(query);
    expect(reply.status).toBe(400);
    expect(Object.keys(reply.body.fields)).toEqual([field]);
  });

  it('is 404 for what a person may not know, and for what is not there', async () => {
    for (const uid of [scene.root.uid, scene.below.uid, scene.root.standardId, randomUUID(), 'not-an-id']) {
      expect((await agents.get('stranger')!.get(`/api/downstream/${uid}`)).status).toBe(404);
    }
    expect((await agents.get('another')!.get(`/api/downstream/${scene.homes.uid}`)).status).toBe(404);
  });

  it('counts by laboratory: holders of what the institute issued, issuers of all that lies below', async () => {
    const reply = await ask('institute', scene.root.uid);
    expect(reply.total).toEqual({ count: 5, warned: 2 });
    expect(counted(reply)).toEqual({
      [institute.code]: [1, 0],
      [home.code]: [2, 1],
      [another.code]: [1, 0],
      [customer.code]: [1, 1],
    });
    expect(reply.page).toBeNull();
  });

  it('tells a warning as laboratory and weight and nothing else: not whose customer it is', async () => {
    const reply = await ask('institute', scene.root.uid, { group: home.id });
    const [own, others] = reply.page!.rows;
    expect(own).toMatchObject({ view: 'full', uid: scene.homes.uid, deviation: '0.000133' });
    expect(others).toEqual({
      view: 'warning',
      laboratory: { id: home.id, code: home.code, name: home.name },
      registryNo: scene.customers.registryNo,
      nominal: expect.stringMatching(/^1000(\.0*)?$/),
      class: 'E2',
    });
    const text = JSON.stringify(reply.page);
    for (const hidden of [customer.id, customer.code, scene.customers.certificateNo, scene.customers.uid]) {
      expect(text).not.toContain(hidden);
    }
  });

  it.each<[Who, 'working' | 'homes' | 'customers', Record<string, [number, number]>]>([
    ['home', 'working', { [home.code]: [1, 0], [customer.code]: [2, 1] }],
    ['home', 'homes', { [customer.code]: [2, 1] }],
    ['customer', 'working', { [customer.code]: [2, 0] }],
    ['customer', 'customers', { [customer.code]: [1, 0] }],
    ['another', 'working', { [another.code]: [1, 0] }],
    ['registrar', 'working', { [home.code]: [1, 0], [another.code]: [1, 0], [customer.code]: [2, 0] }],
  ])('shows the %s below "%s" only what is theirs or below theirs', async (who, value, expected) => {
    expect(counted(await ask(who, scene[value].uid))).toEqual(expected);
  });

  it('never sends value, U, dates or certificate of what is not the reader’s own', async () => {
    for (const by of ['laboratory', 'class', 'nominal', 'year']) {
      const { groups } = await ask('institute', scene.root.uid, { by });
      for (const { key } of groups) {
        const text = JSON.stringify(await ask('institute', scene.root.uid, { by, group: key }));
        for (const hidden of [scene.customers, scene.below]) {
          expect(text).not.toContain(hidden.deviation);
          expect(text).not.toContain(hidden.certificateNo);
          expect(text).not.toContain(hidden.uid);
          expect(text).not.toContain(hidden.standardId);
        }
        expect(text).not.toContain('2025-05-10');
      }
    }
  });

  it('counts by class, nominal and year; years of others are withheld', async () => {
    expect(counted(await ask('institute', scene.root.uid, { by: 'class' }))).toEqual({ E2: [5, 2] });
    expect(counted(await ask('institute', scene.root.uid, { by: 'nominal' }))).toEqual({ 3: [5, 2] });
    expect(counted(await ask('institute', scene.root.uid, { by: 'year' }))).toEqual({
      2024: [3, 0],
      withheld: [2, 2],
    });
    expect(counted(await ask('registrar', scene.root.uid, { by: 'year' }))).toEqual({
      2024: [4, 0],
      2025: [1, 0],
    });
  });

  it('opens a group page by page, each row once', async () => {
    const seen: unknown[] = [];
    let cursor: string | undefined;
    do {
      const query = { by: 'class', group: 'E2', limit: '2', ...(cursor ? { cursor } : {}) };
      const { page } = await ask('registrar', scene.root.uid, query);
      expect(page!.rows.length).toBeLessThanOrEqual(2);
      seen.push(...page!.rows.map((row) => row.registryNo));
      cursor = page!.nextCursor ?? undefined;
    } while (cursor);
    const all = [scene.working, scene.homes, scene.others, scene.customers, scene.below];
    expect(seen).toEqual(all.map((value) => value.registryNo));
  });

  it('opens a group that is not there as an empty page', async () => {
    const { page } = await ask('institute', scene.root.uid, { group: randomUUID() });
    expect(page).toMatchObject({ rows: [], nextCursor: null });
  });

  it('takes a standard for all its values', async () => {
    expect((await ask('institute', scene.root.standardId)).total).toEqual({ count: 5, warned: 2 });
    expect((await ask('customer', scene.root.standardId)).total).toEqual({ count: 2, warned: 0 });
  });

  it('tells weights, not calibrations, of others: a second calibration below adds no row', async () => {
    const fresh = await makeDownstreamScene(app);
    await issueValue(app, {
      issuer: fresh.home,
      holder: fresh.customer,
      day: '2024-08-10',
      deviation: '0.000277',
      expandedU: '0.0004',
      leansOn: fresh.homes.uid,
      standardId: fresh.customers.standardId,
    });
    const person = await app.signIn(fresh.people.institute);
    const reply = await person.get(`/api/downstream/${fresh.root.uid}`);
    expect(reply.body.total).toEqual({ count: 5, warned: 2 });
    const owner = await app.signIn(fresh.people.customer);
    expect((await owner.get(`/api/downstream/${fresh.working.uid}`)).body.total.count).toBe(3);
  });

  it('counts what was in force on the day, as known on the day', async () => {
    const fresh = await makeDownstreamScene(app);
    await withdrawCalibration(app.context(), fresh.others.revisionId, {
      reason: 'Tried by a test',
      effectiveOn: '2024-09-01',
    });
    const agent = await app.signIn(fresh.people.institute);
    const total = async (query: Record<string, string>) =>
      (await agent.get(`/api/downstream/${fresh.root.uid}`).query(query)).body.total.count;
    expect(await total({})).toBe(4);
    expect(await total({ day: '2024-08-31' })).toBe(4);
    expect(await total({ day: '2024-03-10' })).toBe(2);
    expect(await total({ known: '2000-01-01' })).toBe(0);
  });
});

describe('the graph in memory', () => {
  it('holds what a recursive query gives: values, links and ends', async () => {
    const memory = memoryOf(app.database);
    await memory.load();
    const loaded = (await memory.current())!;
    const part = await graphFromDatabase(app.database, [scene.root.id]);
    expect(part.valueCount).toBe(6);
    const told = (graph: typeof loaded, node: number) => {
      const links: unknown[] = [];
      for (let link = graph.firstUp[node]!; link >= 0; link = graph.nextUp[link]!) {
        const parentId = graph.id[graph.linkParent[link]!]!;
        if (part.nodeOf(parentId) < 0) continue;
        links.push([parentId, graph.sensitivity[link], graph.usedBeginDay[link], graph.isClassLimit[link]]);
      }
      return {
        holder: graph.laboratories.at(graph.holder[node]!),
        issuer: graph.laboratories.at(graph.issuer[node]!),
        nominal: graph.nominals.at(graph.nominal[node]!),
        class: graph.classes.at(graph.class[node]! - 1),
        numbers: [graph.deviation[node], graph.u[node], graph.expandedU[node], graph.uPlace[node]],
        days: [graph.performedDay[node], graph.effectiveDay[node], graph.recordedDay[node]],
        ends: graph.ends.get(node) ?? [],
        links,
      };
    };
    for (let node = 0; node < part.valueCount; node += 1) {
      expect(told(loaded, loaded.nodeOf(part.id[node]!))).toEqual(told(part, node));
    }
    expect(part.deviation[part.nodeOf(scene.homes.id)]).toBe(0.000133);
  });

  it('leaves to the database only what is small', async () => {
    expect(await isPartSmall(app.database, [scene.root.id], 6)).toBe(true);
    expect(await isPartSmall(app.database, [scene.root.id], 5)).toBe(false);
    expect(await isPartSmall(app.database, [], 0)).toBe(true);
  });

  it('is caught up with the newest act before each question', async () => {
    await memoryOf(app.database).load();
    const before = (await ask('institute', scene.root.uid)).total.count;
    const late = await issueValue(app, {
      issuer: institute,
      holder: another,
      day: '2024-10-10',
      deviation: '0.000155',
      expandedU: '0.0003',
      leansOn: scene.working.uid,
      standardId: scene.others.standardId,
    });
    expect((await ask('institute', scene.root.uid)).total.count).toBe(before + 1);
    const loaded = (await memoryOf(app.database).current())!;
    const standardOf = (id: number) => loaded.standard[loaded.nodeOf(id)];
    expect(standardOf(late.id)).toBe(standardOf(scene.others.id));
    await withdrawCalibration(app.context(), late.revisionId, {
      reason: 'Tried by a test',
      effectiveOn: '2024-10-11',
    });
    expect((await ask('institute', scene.root.uid)).total.count).toBe(before);
  });
});

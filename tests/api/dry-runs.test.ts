import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { WhatIfChange } from '#shared/contracts/downstream.ts';
import type { DryRunListResponse, DryRunResponse, NamedResponse } from '#shared/contracts/dry-runs.ts';
import { readRow } from '#server/db/read.ts';
import { verifyRecord } from '#server/modules/record/index.ts';
import { makePerson } from '#tests/support/factories.ts';
import { issueValue, makeDownstreamScene, type DownstreamScene } from '#tests/support/downstream-scene.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const scene = await makeDownstreamScene(app);
const { institute, home, working, homes, customers } = scene;
type Who = keyof DownstreamScene['people'];
const agents = new Map<Who, Awaited<ReturnType<typeof app.signIn>>>();
for (const who of Object.keys(scene.people) as Who[]) agents.set(who, await app.signIn(scene.people[who]));
const agent = (who: Who) => agents.get(who)!;

const shift = (valueUid: string, grams = '0.0012'): WhatIfChange => ({
  kind: 'shift',
  valueUid,
  shift: grams,
});

async function save(who: Who, changes: WhatIfChange[], rest: object = {}): Promise<DryRunResponse> {
  const reply = await agent(who)
    .post('/api/dry-runs')
    .send({ laboratoryId: home.id, name: 'Before we correct it', question: { changes }, ...rest });
  expect(reply.status, reply.text).toBe(201);
  return reply.body as DryRunResponse;
}

describe('POST /api/dry-runs', () => {
  it('is 401 without sign-in, 400 without a name or a change, 403 for another laboratory, 404 for what is hidden', async () => {
    const body = { laboratoryId: home.id, name: 'x', question: { changes: [shift(homes.uid)] } };
    expect((await app.request.post('/api/dry-runs').send(body)).status).toBe(401);
    const nameless = await agent('home')
      .post('/api/dry-runs')
      .send({ ...body, name: '  ' });
    expect([nameless.status, Object.keys(nameless.body.fields)]).toEqual([400, ['name']]);
    const empty = await agent('home')
      .post('/api/dry-runs')
      .send({ ...body, question: { changes: [] } });
    expect([empty.status, Object.keys(empty.body.fields)]).toEqual([400, ['question.changes']]);
    expect((await agent('another').post('/api/dry-runs').send(body)).status).toBe(403);
    const hidden = { ...body, question: { changes: [shift(scene.others.uid)] } };
    expect((await agent('home').post('/api/dry-runs').send(hidden)).status).toBe(404);
  });

  it('keeps the question and no answer, in one act', async () => {
    const run = await save('home', [shift(homes.uid)], {
      question: { changes: [shift(homes.uid)], threshold: 0.05, by: 'class' },
    });
    expect(run).toMatchObject({
      name: 'Before we correct it',
      laboratory: { id: home.id },
      question: { changes: [shift(homes.uid)], threshold: 0.05, by: 'class' },
      actsSince: 0,
      isDiscarded: false,
      abilities: { 'dry-run:note': true },
    });
    const act = await readRow<{ kind: string; content: string }>(
      app.database,
      'SELECT kind, content FROM act WHERE seq = :seq',
      { seq: run.actSeq },
    );
    expect(act!.kind).toBe('dry-run.save');
    for (const answer of ['largestShift', 'words', 'verdict', customers.registryNo]) {
      expect(act!.content).not.toContain(answer);
    }
    const { problems } = await verifyRecord(app.database);
    expect(problems.filter(({ actSeq }) => actSeq === run.actSeq)).toEqual([]);
  });
});

describe('GET /api/dry-runs/:id', () => {
  it('is 404 for none, and says how many acts were recorded since, keeping apart', async () => {
    expect((await agent('home').get(`/api/dry-runs/${randomUUID()}`)).status).toBe(404);
    const run = await save('home', [shift(homes.uid)]);
    await save('home', [shift(homes.uid, '0.002')]);
    const opened = async () => (await agent('home').get(`/api/dry-runs/${run.id}`)).body as DryRunResponse;
    expect((await opened()).actsSince).toBe(0);
    await issueValue(app, {
      issuer: home,
      holder: home,
      day: '2025-06-10',
      deviation: '0.0004',
      expandedU: '0.0006',
      leansOn: homes.uid,
    });
    // The weight is registered, then calibrated.
    expect((await opened()).actsSince).toBe(2);
  });

  it.each<[Who, boolean]>([
    ['home', true],
    ['institute', true],
    ['customer', true],
    ['registrar', true],
    ['another', false],
    ['stranger', false],
  ])('shows the %s the question of a link: %s', async (who, isShown) => {
    const run = await save('home', [shift(homes.uid)]);
    const reply = await agent(who).get(`/api/dry-runs/${run.id}`);
    expect(reply.status).toBe(200);
    expect(reply.body.question !== null).toBe(isShown);
    if (!isShown) expect(reply.text).not.toContain(homes.uid);
  });

  it('is answered within the rights of its reader: the customer sees the weights below its own', async () => {
    const run = await save('home', [shift(homes.uid)]);
    const { question } = (await agent('customer').get(`/api/dry-runs/${run.id}`)).body as DryRunResponse;
    const answer = await agent('customer')
      .post('/api/what-if')
      .send({ ...question, group: scene.customer.id });
    expect(answer.body.page.rows.map((row: { registryNo: string }) => row.registryNo).sort()).toEqual(
      [customers.registryNo, scene.below.registryNo].sort(),
    );
  });
});

describe('GET /api/dry-runs', () => {
  const listed = async (who: Who) =>
    ((await agent(who).get('/api/dry-runs')).body as DryRunListResponse).runs.map((run) => run.id);

  it('lists those of one’s own laboratories by page, and leaves out what is discarded', async () => {
    const first = await save('home', [shift(homes.uid)]);
    const second = await save('home', [shift(homes.uid)]);
    expect((await listed('home')).slice(0, 2)).toEqual([second.id, first.id]);
    expect(await listed('registrar')).toContain(first.id);
    for (const who of ['institute', 'customer', 'another', 'stranger'] as const) {
      expect(await listed(who)).not.toContain(first.id);
    }
    const page = (await agent('home').get('/api/dry-runs?limit=1')).body as DryRunListResponse;
    const next = await agent('home').get(`/api/dry-runs?limit=1&cursor=${page.nextCursor}`);
    expect(next.body.runs[0].id).toBe(first.id);
    const path = `/api/dry-runs/${second.id}/notes`;
    expect((await agent('institute').post(path).send({ kind: 'note', text: 'Not ours' })).status).toBe(403);
    await agent('home').post(path).send({ kind: 'note', text: 'Asked of the wrong weight' });
    const gone = await agent('home').post(path).send({ kind: 'discard', text: 'Asked again elsewhere' });
    expect(gone.body).toMatchObject({
      isDiscarded: true,
      notes: [
        { kind: 'note', text: 'Asked of the wrong weight' },
        { kind: 'discard', text: 'Asked again elsewhere' },
      ],
    });
    expect(await listed('home')).not.toContain(second.id);
    expect((await agent('home').post(path).send({ kind: 'note', text: 'Too late' })).status).toBe(409);
  });
});

describe('POST /api/what-if/named', () => {
  const named = async (who: Who, changes: unknown[]) =>
    agent(who).post('/api/what-if/named').send({ changes });

  it('names a value above one’s own as a statement would: no holder, no certificate to open', async () => {
    const reply = await named('home', [shift(working.uid)]);
    expect(reply.status, reply.text).toBe(200);
    expect((reply.body as NamedResponse).subjects).toEqual([
      {
        about: 'value',
        uid: working.uid,
        registryNo: working.registryNo,
        nominal: '1000',
        class: 'E2',
        certificateNo: working.certificateNo,
        issuer: expect.objectContaining({ id: institute.id }),
        deviation: working.deviation,
        expandedU: working.expandedU,
        k: '2',
        revisionId: null,
        abilities: {},
      },
    ]);
  });

  it('offers the real acts to the signatory of who entered the certificate alone', async () => {
    const signatory = await app.signIn(await makePerson(app, 'signatory', home.id));
    const asked = { changes: [shift(homes.uid), { kind: 'withdraw', revisionId: homes.revisionId }] };
    const reply = await signatory.post('/api/what-if/named').send(asked);
    for (const subject of (reply.body as NamedResponse).subjects) {
      expect(subject.abilities).toEqual({ 'calibration:withdraw': true, 'calibration:correct': true });
    }
    const metrologist = await named('home', asked.changes);
    expect(metrologist.body.subjects[0].abilities).toEqual({
      'calibration:withdraw': false,
      'calibration:correct': false,
    });
  });

  it('is 404 for what the person may not know', async () => {
    expect((await named('stranger', [shift(working.uid)])).status).toBe(404);
    expect((await named('another', [shift(homes.uid)])).status).toBe(404);
  });
});

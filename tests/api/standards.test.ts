import type supertest from 'supertest';
import { beforeAll, describe, expect, it } from 'vitest';
import { readRow } from '#server/db/read.ts';
import { assertFact } from '#server/modules/standards/index.ts';
import { lineOf, makeCalibration, makeStandard } from '#tests/support/calibration-factories.ts';
import { freeRegistryNo, makeLaboratory, makePerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();

let laboratory: { id: string; code: string; name: string };
let metrologist: supertest.Agent;
let reader: supertest.Agent;
let foreigner: supertest.Agent;
let registrar: supertest.Agent;

beforeAll(async () => {
  laboratory = await makeLaboratory(app);
  const other = await makeLaboratory(app);
  metrologist = await app.signIn(await makePerson(app, 'metrologist', laboratory.id));
  reader = await app.signIn(await makePerson(app, 'reader', laboratory.id));
  foreigner = await app.signIn(await makePerson(app, 'metrologist', other.id));
  registrar = await app.signIn(await makePerson(app, 'registrar'));
});

function weight(changes: object = {}) {
  return {
    laboratoryId: laboratory.id,
    registryNo: freeRegistryNo(),
    nominal: '1000',
    marking: '1 kg',
    shape: 'knob',
    material: 'stainless steel',
    class: 'E2',
    density: { value: '7950', expandedU: '140', k: '2', origin: 'assumed' },
    ...changes,
  };
}

describe('POST /api/standards', () => {
  it('is refused without sign-in', async () => {
    expect((await app.request.post('/api/standards').send(weight())).status).toBe(401);
  });

  it.each([
    ['nominal', { nominal: 1000 }],
    ['nominal', { nominal: '-1' }],
    ['nominal', { nominal: '1e3' }],
    ['registryNo', { registryNo: 'nr 1' }],
    ['marking', { marking: ' ' }],
    ['class', { class: 'E3' }],
    ['shape', { shape: 'cube' }],
    ['density.value', { density: { value: '7.95', expandedU: null, k: null, origin: 'assumed' } }],
    ['density.expandedU', { density: { value: '7950', expandedU: '0', k: '2', origin: 'assumed' } }],
    ['intervalMonths', { intervalMonths: 0 }],
    ['inServiceFrom', { inServiceFrom: '2023-02-29' }],
    ['laboratoryId', { laboratoryId: 'mine' }],
    ['colour', { colour: 'grey' }],
  ])('names %s for %j', async (field, changes) => {
    const reply = await metrologist.post('/api/standards').send(weight(changes));
    expect(reply.status).toBe(400);
    expect(Object.keys(reply.body.fields)).toEqual([field]);
  });

  it('is refused to a reader and to another laboratory', async () => {
    for (const agent of [reader, foreigner]) {
      expect((await agent.post('/api/standards').send(weight())).status).toBe(403);
    }
  });

  it('does not know a laboratory that is not there', async () => {
    const reply = await metrologist
      .post('/api/standards')
      .send(weight({ laboratoryId: '01890000-0000-7000-8000-000000000000' }));
    expect(reply.status).toBe(404);
  });

  it('refuses a number that is taken, by a standard or by a set', async () => {
    const body = weight();
    expect((await metrologist.post('/api/standards').send(body)).status).toBe(201);
    const again = await metrologist.post('/api/standards').send(body);
    expect(again.status).toBe(409);
    expect(again.body.fields.registryNo.received).toBe(body.registryNo);
    const { laboratoryId, registryNo } = body;
    const { marking, shape, material, nominal } = body;
    const set = await metrologist.post('/api/sets').send({
      laboratoryId,
      registryNo,
      name: 'Set',
      members: [{ nominal, marking, shape, material, class: null, density: null }],
    });
    expect(set.status).toBe(409);
  });

  it('refuses U of the density without k, and a day of service in the future', async () => {
    const density = { value: '7950', expandedU: '140', k: null, origin: 'assumed' };
    const noFactor = await metrologist.post('/api/standards').send(weight({ density }));
    expect(noFactor.status).toBe(422);
    expect(Object.keys(noFactor.body.fields)).toEqual(['density.k']);
    const future = await metrologist.post('/api/standards').send(weight({ inServiceFrom: '2999-01-01' }));
    expect(Object.keys(future.body.fields)).toEqual(['inServiceFrom']);
  });

  it('registers the weight with all that belongs to it, in one act', async () => {
    const body = weight({ intervalMonths: 24, inServiceFrom: '2020-05-01' });
    const reply = await metrologist.post('/api/standards').send(body);
    expect(reply.status).toBe(201);
    expect(reply.headers.location).toBe(`/api/standards/${reply.body.id}`);
    const sheet = await metrologist.get(`/api/standards/${reply.body.id}`);
    expect(sheet.status).toBe(200);
    expect(sheet.body).toMatchObject({
      standard: {
        registryNo: body.registryNo,
        nominal: '1000',
        class: 'E2',
        state: 'in service',
        holder: { id: laboratory.id },
        value: null,
        dueOn: null,
        inServiceFrom: '2020-05-01',
      },
      maximumPermissibleError: '0.0016',
      epochs: [{ n: 1, reason: 'new', beginsOn: '2020-05-01' }],
      properties: [{ kind: 'density', value: '7950', expandedU: '140', k: '2', origin: 'assumed' }],
      programme: { intervalMonths: 24, laboratory: { id: laboratory.id }, dueOn: null },
      history: [],
      leansOnThis: { weights: 0, laboratories: 0, newestUse: null },
      abilities: { 'standard:read': true, 'standard:change': true },
    });
    const source = await readRow<{ u: number; unit: string }>(
      app.database,
      'SELECT u, unit FROM source WHERE standard_id = :id',
      { id: reply.body.id },
    );
    // V = 1000 g / 7.950 g/cm3; u(V) = V (70/7950)
    expect(source!.u).toBeCloseTo((1000 / 7.95) * (70 / 7950), 9);
    expect(source!.unit).toBe('cm3');
    const act = await readRow(
      app.database,
      "SELECT seq FROM act WHERE kind = 'standard.register' AND subject_id = :id",
      { id: reply.body.id },
    );
    expect(act).not.toBeNull();
  });
});

describe('POST /api/sets', () => {
  const member = (changes: object = {}) => ({
    nominal: '2',
    marking: '2 g',
    shape: 'knob',
    material: 'stainless steel',
    class: 'F1',
    density: null,
    ...changes,
  });
  const set = (changes: object = {}) => ({
    laboratoryId: laboratory.id,
    registryNo: freeRegistryNo(),
    name: 'Set from 1 g to 2 g',
    members: [member(), member({ marking: '2 g *' }), member({ nominal: '1', marking: '1 g' })],
    ...changes,
  });

  it('is refused without sign-in, malformed, and without the role', async () => {
    expect((await app.request.post('/api/sets').send(set())).status).toBe(401);
    const suffixed = await metrologist.post('/api/sets').send(set({ registryNo: 'TV 0300-01' }));
    expect(suffixed.status).toBe(400);
    const empty = await metrologist.post('/api/sets').send(set({ members: [] }));
    expect(Object.keys(empty.body.fields)).toEqual(['members']);
    expect((await reader.post('/api/sets').send(set())).status).toBe(403);
  });

  it('refuses two weights that could not be told apart', async () => {
    const reply = await metrologist.post('/api/sets').send(set({ members: [member(), member()] }));
    expect(reply.status).toBe(422);
    expect(reply.body.fields['members.1.marking'].clause).toBe('OIML R 111-1:2004, 13');
  });

  it('numbers its weights in the order given and shows the set with each', async () => {
    const body = set();
    const reply = await metrologist.post('/api/sets').send(body);
    expect(reply.status).toBe(201);
    expect(reply.body.members.map((one: { registryNo: string }) => one.registryNo)).toEqual(
      ['01', '02', '03'].map((suffix) => `${body.registryNo}-${suffix}`),
    );
    const list = await metrologist.get('/api/standards').query({ q: body.registryNo.toLowerCase() });
    expect(list.body.count).toBe(3);
    expect(list.body.standards[1]).toMatchObject({
      marking: '2 g *',
      set: { id: reply.body.id, registryNo: body.registryNo },
    });
  });
});

describe('GET /api/standards', () => {
  it('is refused without sign-in and for queries that make no sense', async () => {
    expect((await app.request.get('/api/standards')).status).toBe(401);
    for (const query of [
      { sort: 'colour' },
      { limit: '0' },
      { class: 'X' },
      { nominalFrom: 'abc' },
      { cursor: 'AAAA' },
      { laboratory: '7' },
    ]) {
      const reply = await metrologist.get('/api/standards').query(query);
      expect([reply.status, Object.keys(reply.body.fields)]).toEqual([400, Object.keys(query)]);
    }
  });

  it('walks every row once, in each order, by cursor; a cursor of another order is refused', async () => {
    const own = await makeLaboratory(app);
    const agent = await app.signIn(await makePerson(app, 'reader', own.id));
    const made = [];
    for (const nominal of ['1000', '500', '500', '200', '1000']) {
      made.push(await makeStandard(app, own.id, { nominal, class: null }));
    }
    for (const [at, day] of ['2024-03-01', '2024-01-01', '2024-03-01'].entries()) {
      await makeCalibration(app, own.id, day, [lineOf(made[at]!.id)]);
    }
    const key: Record<
      string,
      (row: Record<string, unknown> & { value: { performedEnd: string } | null }) => string
    > = {
      registryNo: (row) => String(row.registryNo),
      nominal: (row) => String(row.nominal).padStart(9, '0'),
      calibrated: (row) => row.value?.performedEnd ?? '',
    };
    for (const sort of Object.keys(key)) {
      for (const order of [sort, `-${sort}`]) {
        const seen = [];
        let cursor: string | undefined;
        do {
          const reply: supertest.Response = await agent
            .get('/api/standards')
            .query({ sort: order, limit: 2, cursor });
          expect(reply.status).toBe(200);
          expect(reply.body).toMatchObject({ count: 5, isCountExact: true });
          seen.push(...reply.body.standards);
          cursor = reply.body.nextCursor ?? undefined;
        } while (cursor);
        expect(new Set(seen.map((row) => row.id)).size).toBe(5);
        expect(seen).toHaveLength(5);
        const keys = seen.map(key[sort]!);
        expect(keys).toEqual(order.startsWith('-') ? keys.toSorted().toReversed() : keys.toSorted());
      }
    }
    const first = await agent.get('/api/standards').query({ sort: 'nominal', limit: 2 });
    const mixed = await agent
      .get('/api/standards')
      .query({ sort: '-nominal', limit: 2, cursor: first.body.nextCursor });
    expect([mixed.status, Object.keys(mixed.body.fields)]).toEqual([400, ['cursor']]);
  });

  it('filters by kind, class, nominal, number, certificate and standing', async () => {
    const own = await makeLaboratory(app);
    const agent = await app.signIn(await makePerson(app, 'metrologist', own.id));
    const overdue = await makeStandard(app, own.id, { intervalMonths: 12 });
    const never = await makeStandard(app, own.id, { nominal: '500', class: 'F1', marking: 'lead one' });
    const { certificateNo } = await readRowOf(
      (await makeCalibration(app, own.id, '2021-01-01', [lineOf(overdue.id)])).calibrationId,
    );
    const found = async (query: object) => {
      const reply = await agent.get('/api/standards').query(query);
      return reply.body.standards.map((row: { id: string }) => row.id);
    };
    expect(await found({ class: 'F1' })).toEqual([never.id]);
    expect(await found({ nominalFrom: '600' })).toEqual([overdue.id]);
    expect(await found({ nominalTo: '600' })).toEqual([never.id]);
    expect(await found({ q: 'LEAD' })).toEqual([never.id]);
    expect(await found({ q: certificateNo.toLowerCase() })).toEqual([overdue.id]);
    expect(await found({ standing: 'overdue' })).toEqual([overdue.id]);
    expect(await found({ standing: 'no value' })).toEqual([never.id]);
    expect(await found({ standing: 'due' })).toEqual([]);
    expect(await found({ kind: 'prototype' })).toEqual([]);
    expect(await found({ q: '%' })).toEqual([]);
  });

  it('shows a laboratory its own only, the registrar all, and follows a change of owner', async () => {
    const [from, to] = [await makeLaboratory(app), await makeLaboratory(app)];
    const sold = await makeStandard(app, from.id);
    const [seller, buyer] = await Promise.all(
      [from, to].map(async ({ id }) => app.signIn(await makePerson(app, 'reader', id))),
    );
    const count = async (agent: supertest.Agent, query = {}) =>
      (await agent.get('/api/standards').query(query)).body.count;
    expect([await count(seller!), await count(buyer!)]).toEqual([1, 0]);
    expect(await count(buyer!, { laboratory: from.id })).toBe(0);
    expect(await count(registrar, { laboratory: from.id })).toBe(1);
    for (const kind of ['owner', 'custodian'] as const) {
      await assertFact(app.context(), {
        standardId: sold.id,
        kind,
        laboratoryId: to.id,
        validFrom: '2021-01-01',
      });
    }
    expect([await count(seller!), await count(buyer!)]).toEqual([0, 1]);
    expect((await seller!.get(`/api/standards/${sold.id}`)).status).toBe(404);
  });

  it('says who may register', async () => {
    const abilities = async (agent: supertest.Agent) => (await agent.get('/api/standards')).body.abilities;
    expect(await abilities(metrologist)).toEqual({ 'standard:register': true });
    expect(await abilities(reader)).toEqual({ 'standard:register': false });
  });
});

describe('GET /api/standards/:standardId', () => {
  it('is refused without sign-in, and is unknown to other laboratories', async () => {
    const { id } = await makeStandard(app, laboratory.id);
    expect((await app.request.get(`/api/standards/${id}`)).status).toBe(401);
    expect((await foreigner.get(`/api/standards/${id}`)).status).toBe(404);
    expect((await metrologist.get('/api/standards/7')).status).toBe(404);
    expect((await metrologist.get('/api/standards/01890000-0000-7000-8000-000000000000')).status).toBe(404);
    expect((await registrar.get(`/api/standards/${id}`)).body.abilities).toEqual({
      'standard:read': true,
      'standard:change': true,
    });
  });

  it('gives the history digit for digit, with the change since the value before', async () => {
    const { id } = await makeStandard(app, laboratory.id, { intervalMonths: 12 });
    await makeCalibration(app, laboratory.id, '2022-01-31', [
      lineOf(id, { deviation: '0.123456789012', unitConfirmed: true, expandedU: null, k: null }),
    ]);
    await makeCalibration(app, laboratory.id, '2023-01-31', [lineOf(id, { deviation: '0.000100' })]);
    await makeCalibration(app, laboratory.id, '2024-01-31', [lineOf(id, { deviation: '-0.000400' })]);
    const { body } = await metrologist.get(`/api/standards/${id}`);
    expect(body.standard).toMatchObject({ dueOn: '2025-01-31', value: { deviation: '-0.0004' } });
    expect(body.history).toMatchObject([
      { deviation: '0.123456789012', expandedU: null, change: null, state: 'in force' },
      { deviation: '0.0001', change: { deviation: '-0.123356789012', ratio: null } },
      { deviation: '-0.0004', expandedU: '0.0005', k: '2', change: { deviation: '-0.0005' } },
    ]);
    expect(body.history[2].change.ratio).toBeCloseTo(5e-4 / (5e-4 * Math.SQRT2), 9);
  });
});

describe('POST /api/standards/:standardId/epochs', () => {
  const body = { reason: 'adjusted', beginsOn: '2024-05-01' };

  it('is refused without sign-in, malformed, to others, and to a reader', async () => {
    const { id } = await makeStandard(app, laboratory.id);
    const path = `/api/standards/${id}/epochs`;
    expect((await app.request.post(path).send(body)).status).toBe(401);
    expect((await metrologist.post(path).send({ ...body, reason: 'lost' })).status).toBe(400);
    expect((await reader.post(path).send(body)).status).toBe(403);
    expect((await foreigner.post(path).send(body)).status).toBe(404);
  });

  it('keeps the epochs in order', async () => {
    const { id } = await makeStandard(app, laboratory.id, { inServiceFrom: '2020-01-01' });
    const path = `/api/standards/${id}/epochs`;
    const early = await metrologist.post(path).send({ ...body, beginsOn: '2019-01-01' });
    expect([early.status, Object.keys(early.body.fields)]).toEqual([422, ['beginsOn']]);
    const late = await metrologist.post(path).send({ ...body, beginsOn: '2999-01-01' });
    expect(late.status).toBe(422);
    const good = await metrologist.post(path).send({ ...body, lastGoodOn: '2024-06-01' });
    expect(Object.keys(good.body.fields)).toEqual(['lastGoodOn']);
    const opened = await metrologist.post(path).send(body);
    expect([opened.status, opened.body.n]).toEqual([201, 2]);
    const act = await readRow<{ kind: string }>(
      app.database,
      'SELECT kind FROM act WHERE subject_id = :id ORDER BY seq DESC LIMIT 1',
      { id },
    );
    expect(act!.kind).toBe('epoch.open');
  });
});

async function readRowOf(calibrationId: string): Promise<{ certificateNo: string }> {
  const row = await readRow<{ certificateNo: string }>(
    app.database,
    'SELECT certificate_no AS certificateNo FROM calibration WHERE id = :calibrationId',
    { calibrationId },
  );
  return row!;
}

import type supertest from 'supertest';
import { beforeAll, describe, expect, it } from 'vitest';
import { readRow } from '#server/db/read.ts';
import { assertAuthorisation } from '#server/modules/network/index.ts';
import { lineOf, makeCalibration, makeStandard } from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson, type TestPerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const NOBODY = '01890000-0000-7000-8000-000000000000';

let laboratory: { id: string; code: string; name: string };
let issuer: { id: string; name: string };
let signatory: TestPerson;
let agents: Record<'metrologist' | 'reader' | 'signatory' | 'foreigner' | 'registrar', supertest.Agent>;

beforeAll(async () => {
  laboratory = await makeLaboratory(app);
  issuer = await makeLaboratory(app, 'external institute');
  const other = await makeLaboratory(app);
  signatory = await makePerson(app, 'signatory', laboratory.id);
  agents = {
    metrologist: await app.signIn(await makePerson(app, 'metrologist', laboratory.id)),
    reader: await app.signIn(await makePerson(app, 'reader', laboratory.id)),
    signatory: await app.signIn(signatory),
    foreigner: await app.signIn(await makePerson(app, 'metrologist', other.id)),
    registrar: await app.signIn(await makePerson(app, 'registrar')),
  };
});

let running = 0;

function contentOf(standardId: string | null, changes: object = {}, line: object = {}) {
  running += 1;
  return {
    issuerId: issuer.id,
    certificateNo: `D-${laboratory.code}-${running}`,
    issuedOn: '2024-02-20',
    performedBegin: '2024-02-18',
    performedEnd: '2024-02-19',
    method: 'Substitution weighing',
    lines: [
      { key: 'a', standardId, value: '0,120', unit: 'mg', expandedU: '0,50', uUnit: 'mg', k: '2', ...line },
    ],
    ...changes,
  };
}

async function draft(content: object = {}): Promise<{ id: string; version: number }> {
  const reply = await agents.metrologist.post('/api/drafts').send({ laboratoryId: laboratory.id, content });
  expect(reply.status).toBe(201);
  return reply.body;
}

describe('POST /api/drafts', () => {
  it('is refused without sign-in, malformed, without the role and elsewhere', async () => {
    const body = { laboratoryId: laboratory.id, content: {} };
    expect((await app.request.post('/api/drafts').send(body)).status).toBe(401);
    const colour = await agents.metrologist
      .post('/api/drafts')
      .send({ ...body, content: { colour: 'grey' } });
    expect([colour.status, Object.keys(colour.body.fields)]).toEqual([400, ['content.colour']]);
    for (const agent of [agents.reader, agents.signatory, agents.foreigner]) {
      expect((await agent.post('/api/drafts').send(body)).status).toBe(403);
    }
    expect(
      (await agents.metrologist.post('/api/drafts').send({ ...body, laboratoryId: NOBODY })).status,
    ).toBe(404);
  });

  it('keeps the emptiest sheet and names each thing that is missing', async () => {
    const reply = await agents.metrologist
      .post('/api/drafts')
      .send({ laboratoryId: laboratory.id, content: { lines: [{ key: 'a' }] } });
    expect(reply.status).toBe(201);
    expect(reply.headers.location).toBe(`/api/drafts/${reply.body.id}`);
    expect(reply.body).toMatchObject({ version: 1, state: 'open', revisionId: null });
    expect(
      reply.body.points.map((point: { field: string; kind: string }) => [point.field, point.kind]),
    ).toEqual(
      [
        'issuerId',
        'certificateNo',
        'method',
        'performedBegin',
        'performedEnd',
        'issuedOn',
        'lines.0.standardId',
        'lines.0.value',
        'lines.0.expandedU',
      ].map((field) => [field, 'missing']),
    );
    expect(reply.body.abilities).toEqual({
      'draft:read': true,
      'draft:write': true,
      'draft:send': true,
      'calibration:issue': false,
    });
  });

  it('keeps half-typed numbers as they are', async () => {
    const { id } = await makeStandard(app, laboratory.id);
    const made = await draft(contentOf(id, { issuedOn: '2024-02-3' }, { value: '0,12,', k: 'two' }));
    const reply = await agents.metrologist.get(`/api/drafts/${made.id}`);
    expect(reply.body.content.lines[0]).toMatchObject({ value: '0,12,', k: 'two' });
    expect(reply.body.points).toEqual(
      expect.arrayContaining([
        expect.objectContaining({ field: 'issuedOn', kind: 'wrong', received: '2024-02-3' }),
        expect.objectContaining({ field: 'lines.0.value', kind: 'wrong', received: '0,12,' }),
        expect.objectContaining({ field: 'lines.0.k', kind: 'wrong', received: 'two' }),
      ]),
    );
  });
});

describe('GET /api/drafts/:draftId', () => {
  it('is open to the laboratory and the registrar, unknown to others', async () => {
    const { id } = await draft();
    expect((await app.request.get(`/api/drafts/${id}`)).status).toBe(401);
    expect((await agents.reader.get(`/api/drafts/${id}`)).status).toBe(200);
    expect((await agents.registrar.get(`/api/drafts/${id}`)).body.abilities).toMatchObject({
      'draft:write': true,
      'calibration:issue': false,
    });
    expect((await agents.foreigner.get(`/api/drafts/${id}`)).status).toBe(404);
    expect((await agents.metrologist.get(`/api/drafts/${NOBODY}`)).status).toBe(404);
  });

  it('shows the weights and references it names, and questions a slip of unit or sign', async () => {
    const weight = await makeStandard(app, laboratory.id);
    const root = await makeCalibration(app, laboratory.id, '2023-01-10', [
      lineOf(weight.id, { deviation: '-0.0008', expandedU: '0.0005' }),
    ]);
    const reference = { valueUid: root.valueUids[0], sensitivity: '' };
    const { id } = await draft(contentOf(weight.id, {}, { value: '+0.800', references: [reference] }));
    const reply = await agents.metrologist.get(`/api/drafts/${id}`);
    expect(reply.body.standards).toMatchObject([
      {
        id: weight.id,
        maximumPermissibleError: '0.0016',
        lastValue: { deviation: '-0.0008', expandedU: '0.0005', performedEnd: '2023-01-10' },
      },
    ]);
    expect(reply.body.references).toMatchObject([
      { valueUid: root.valueUids[0], state: 'in force', isNewest: true, deviation: '-0.0008' },
    ]);
    expect(reply.body.points).toMatchObject([{ field: 'lines.0.value', kind: 'question' }]);
    expect(reply.body.points[0].message).toMatch(/other sign/);
  });

  it('does not show another laboratory’s weight', async () => {
    const other = await makeLaboratory(app);
    const foreign = await makeStandard(app, other.id);
    const { id } = await draft(contentOf(foreign.id));
    const reply = await agents.metrologist.get(`/api/drafts/${id}`);
    expect(reply.body.standards).toEqual([]);
    expect(reply.body.points[0]).toMatchObject({ field: 'lines.0.standardId', kind: 'wrong' });
    expect(JSON.stringify(reply.body)).not.toContain(foreign.registryNo);
  });
});

describe('the checks shown as a draft is written', () => {
  interface Check {
    line: number;
    rule: string;
    outcome: string;
    referenceUid: string | null;
    sentence: string;
  }

  async function checksOf(
    line: object,
    expandedU = '0.00016',
  ): Promise<{ checks: Check[]; rootUid: string }> {
    const [above, below] = [await makeStandard(app, laboratory.id), await makeStandard(app, laboratory.id)];
    const root = await makeCalibration(app, laboratory.id, '2023-06-10', [lineOf(above.id, { expandedU })]);
    const rootUid = root.valueUids[0]!;
    const references = [{ valueUid: rootUid }];
    const { id } = await draft(contentOf(below.id, { issuerId: laboratory.id }, { references, ...line }));
    const reply = await agents.metrologist.get(`/api/drafts/${id}`);
    expect(reply.status).toBe(200);
    return { checks: reply.body.checks, rootUid };
  }

  it('hold for an honest result, each in words with its clause', async () => {
    const { checks, rootUid } = await checksOf({ value: '0.12', underAccreditation: false });
    expect(checks.filter((check) => check.outcome === 'fails')).toEqual([]);
    const carried = checks.find((check) => check.rule === 'B-21');
    expect(carried).toMatchObject({ line: 0, outcome: 'holds', clause: expect.any(String) as string });
    const dated = checks.find((check) => check.rule === 'B-12');
    expect(dated).toMatchObject({ referenceUid: rootUid, outcome: 'holds' });
    expect(dated!.sentence).toMatch(/2023-06-10/);
  });

  it('fail where U is less than the reference brings, while the question of issuing stays the person’s', async () => {
    const { checks } = await checksOf({ expandedU: '0.50', underAccreditation: false }, '0.0012');
    expect(checks.find((check) => check.rule === 'B-21')).toMatchObject({ outcome: 'fails' });
  });
});

describe('PUT /api/drafts/:draftId', () => {
  it('is refused without sign-in, malformed, without the role and elsewhere', async () => {
    const { id } = await draft();
    const body = { version: 1, content: {} };
    expect((await app.request.put(`/api/drafts/${id}`).send(body)).status).toBe(401);
    const noVersion = await agents.metrologist.put(`/api/drafts/${id}`).send({ content: {} });
    expect([noVersion.status, Object.keys(noVersion.body.fields)]).toEqual([400, ['version']]);
    expect((await agents.reader.put(`/api/drafts/${id}`).send(body)).status).toBe(403);
    expect((await agents.foreigner.put(`/api/drafts/${id}`).send(body)).status).toBe(404);
  });

  it('answers a stale save with the version that stands, and keeps that one', async () => {
    const { id } = await draft();
    const save = (method: string) =>
      agents.metrologist.put(`/api/drafts/${id}`).send({ version: 1, content: { method } });
    const [one, two] = await Promise.all([save('first tab'), save('second tab')]);
    expect([one.status, two.status].sort()).toEqual([200, 409]);
    const [kept, refused] = one.status === 200 ? [one, two] : [two, one];
    expect(refused.body.type).toBe('/problems/stale');
    expect(refused.body.current).toEqual(kept.body);
    expect(kept.body.version).toBe(2);
  });
});

describe('POST /api/drafts/:draftId/state', () => {
  it('sends to sign, opens again on the next save, and discards', async () => {
    const { id } = await draft();
    const move = (version: number, state: string, agent = agents.metrologist) =>
      agent.post(`/api/drafts/${id}/state`).send({ version, state });
    expect((await app.request.post(`/api/drafts/${id}/state`).send({})).status).toBe(401);
    expect((await move(1, 'issued')).status).toBe(400);
    expect((await move(1, 'sent to sign', agents.reader)).status).toBe(403);
    expect((await move(7, 'sent to sign')).status).toBe(409);
    expect((await move(1, 'sent to sign')).body.state).toBe('sent to sign');
    const saved = await agents.metrologist.put(`/api/drafts/${id}`).send({ version: 2, content: {} });
    expect(saved.body).toMatchObject({ state: 'open', version: 3 });
    expect((await move(3, 'discarded', agents.signatory)).body.state).toBe('discarded');
    const late = await agents.metrologist.put(`/api/drafts/${id}`).send({ version: 4, content: {} });
    expect(late.status).toBe(422);
    expect((await move(4, 'open')).body.state).toBe('open');
  });
});

describe('POST /api/drafts/:draftId/issue', () => {
  const sign = (id: string, version: number, password = signatory.password, agent = agents.signatory) =>
    agent.post(`/api/drafts/${id}/issue`).send({ version, password });

  it('is refused without sign-in, malformed, and without the hand for it', async () => {
    const { id } = await draft();
    expect((await app.request.post(`/api/drafts/${id}/issue`).send({})).status).toBe(401);
    expect((await sign(id, 1, '')).status).toBe(400);
    for (const agent of [agents.metrologist, agents.reader, agents.registrar]) {
      expect((await sign(id, 1, 'x', agent)).status).toBe(403);
    }
    expect((await sign(id, 1, 'x', agents.foreigner)).status).toBe(404);
  });

  it('is refused to a signatory whose authorisation has ended', async () => {
    const former = await makePerson(app, 'signatory', laboratory.id);
    await assertAuthorisation(app.context(), {
      accountId: former.accountId,
      laboratoryId: laboratory.id,
      what: 'sign calibrations',
      state: 'ended',
      validFrom: '2024-01-01',
      validTo: null,
    });
    const { id } = await draft();
    expect((await sign(id, 1, former.password, await app.signIn(former))).status).toBe(403);
  });

  it('wants the password again, the version that was read, and every point settled', async () => {
    const { id } = await makeStandard(app, laboratory.id);
    const open = await draft(contentOf(id, { method: '' }, { k: '' }));
    const guessed = await sign(open.id, 1, 'not this one');
    expect([guessed.status, Object.keys(guessed.body.fields)]).toEqual([422, ['password']]);
    const points = await sign(open.id, 1);
    expect([points.status, Object.keys(points.body.fields).sort()]).toEqual([422, ['lines.0.k', 'method']]);
    const stale = await sign(open.id, 2);
    expect([stale.status, stale.body.current.version]).toEqual([409, 1]);
    expect(guessed.body.fields.password.received).toBeUndefined();
  });

  it('issues once, however often it is clicked, exactly what was typed', async () => {
    const { id } = await makeStandard(app, laboratory.id);
    const content = contentOf(id);
    const made = await draft(content);
    const clicks = await Promise.all([sign(made.id, 1), sign(made.id, 1), sign(made.id, 1)]);
    expect(clicks.map((click) => click.status).sort()).toEqual([201, 409, 409]);
    const issued = clicks.find((click) => click.status === 201)!;
    expect(issued.headers.location).toBe(`/api/calibrations/${issued.body.revisionId}`);
    const sheet = await agents.metrologist.get(`/api/calibrations/${issued.body.revisionId}`);
    expect(sheet.body.calibration).toMatchObject({
      certificateNo: content.certificateNo,
      revisionN: 1,
      issuer: { id: issuer.id },
      registeredBy: { id: laboratory.id },
      signatory: signatory.user.name,
      state: 'in force',
    });
    expect(sheet.body.lines).toMatchObject([
      {
        uid: issued.body.valueUids[0],
        deviation: '0.00012',
        reportedUnit: 'mg',
        reportedDecimals: 3,
        expandedU: '0.0005',
        k: '2',
        underAccreditation: true,
      },
    ]);
    const after = await agents.metrologist.get(`/api/drafts/${made.id}`);
    expect(after.body).toMatchObject({ state: 'issued', revisionId: issued.body.revisionId, points: [] });
    const act = await readRow<{ accountId: string; content: string }>(
      app.database,
      "SELECT account_id AS accountId, content FROM act WHERE kind = 'calibration.issue' AND content LIKE :revision",
      { revision: `%${issued.body.revisionId}%` },
    );
    expect(act!.accountId).toBe(signatory.accountId);
    expect(JSON.parse(act!.content)).toMatchObject({
      after: { contentSha256: sheet.body.calibration.contentSha256 },
    });
  });

  it('names a certificate that is in the register already', async () => {
    const { id } = await makeStandard(app, laboratory.id);
    const content = contentOf(id);
    const [first, second] = [await draft(content), await draft(content)];
    expect((await sign(first.id, 1)).status).toBe(201);
    const again = await sign(second.id, 1);
    expect(again.status).toBe(422);
    expect(again.body.fields.certificateNo.received).toBe(content.certificateNo);
  });
});

describe('GET /api/references', () => {
  it('is refused without sign-in, without a word to look for, and for another laboratory', async () => {
    const query = { laboratory: laboratory.id, q: 'T' };
    expect((await app.request.get('/api/references').query(query)).status).toBe(401);
    const empty = await agents.metrologist.get('/api/references').query({ ...query, q: '' });
    expect([empty.status, Object.keys(empty.body.fields)]).toEqual([400, ['q']]);
    expect((await agents.reader.get('/api/references').query(query)).status).toBe(403);
    expect((await agents.foreigner.get('/api/references').query(query)).status).toBe(403);
    expect(
      (await agents.metrologist.get('/api/references').query({ ...query, laboratory: NOBODY })).status,
    ).toBe(404);
  });

  it('finds own values by part of the number, the newest of the issuer by the whole number only, of nobody else', async () => {
    const other = await makeLaboratory(app);
    const [own, foreign] = [await makeStandard(app, laboratory.id), await makeStandard(app, other.id)];
    for (const [lab, weight] of [
      [laboratory, own],
      [other, foreign],
    ] as const) {
      await makeCalibration(app, lab.id, '2023-01-10', [lineOf(weight.id)]);
      await makeCalibration(app, lab.id, '2024-01-10', [lineOf(weight.id)]);
    }
    const find = async (q: string, quantity?: string, issuer?: string) => {
      const reply = await agents.metrologist
        .get('/api/references')
        .query({ laboratory: laboratory.id, q, quantity, issuer });
      return reply.body.references.map((one: { performedEnd: string; isNewest: boolean }) => [
        one.performedEnd,
        one.isNewest,
      ]);
    };
    const both = [
      ['2024-01-10', true],
      ['2023-01-10', false],
    ];
    expect(await find(own.registryNo.slice(0, -1).toLowerCase())).toEqual(both);
    expect(await find(foreign.registryNo)).toEqual([]);
    expect(await find(foreign.registryNo, undefined, other.id)).toEqual([['2024-01-10', true]]);
    expect(await find(foreign.registryNo.slice(0, -1), undefined, other.id)).toEqual([]);
    expect(await find(foreign.registryNo, 'mass', other.id)).toEqual([]);
  });

  it('tells the numbers of own values, and none of another laboratory’s', async () => {
    const other = await makeLaboratory(app);
    const [own, foreign] = [await makeStandard(app, laboratory.id), await makeStandard(app, other.id)];
    await makeCalibration(app, laboratory.id, '2024-01-10', [lineOf(own.id)]);
    await makeCalibration(app, other.id, '2024-01-10', [lineOf(foreign.id)]);
    const find = async (q: string) => {
      const query = { laboratory: laboratory.id, q, issuer: other.id };
      const reply = await agents.metrologist.get('/api/references').query(query);
      const { deviation, expandedU, k } = reply.body.references[0];
      return { deviation, expandedU, k };
    };
    expect(await find(own.registryNo)).toEqual({ deviation: '0.000123', expandedU: '0.0005', k: '2' });
    expect(await find(foreign.registryNo)).toEqual({ deviation: null, expandedU: null, k: null });
  });
});

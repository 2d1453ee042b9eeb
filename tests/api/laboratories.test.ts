import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Role } from '#shared/contracts/identity.ts';
import { readRow } from '#server/db/read.ts';
import { assertMembership } from '#server/modules/identity/index.ts';
import { assertRecognition, assertScopeLine } from '#server/modules/network/index.ts';
import { makeLaboratory, makePerson, type TestPerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp({ now: () => new Date('2026-03-02T09:00:00Z') });

const home = await makeLaboratory(app);
const other = await makeLaboratory(app);
const people: Record<string, TestPerson> = {};
type Agent = Awaited<ReturnType<typeof app.signIn>>;
const agents: Record<string, Agent> = {};

beforeAll(async () => {
  const roles: [string, Role, string | null][] = [
    ['registrar', 'registrar', null],
    ['administrator', 'laboratory administrator', home.id],
    ['metrologist', 'metrologist', home.id],
    ['foreign administrator', 'laboratory administrator', other.id],
    ['assessor', 'assessor', home.id],
    ['pilot', 'comparison pilot', null],
  ];
  for (const [name, role, laboratoryId] of roles) {
    people[name] = await makePerson(app, role, laboratoryId);
    agents[name] = await app.signIn(people[name]);
  }
});

const agent = (name: string): Agent => agents[name]!;

describe('GET /api/laboratories', () => {
  it('answers 401 without sign-in', async () => {
    expect((await app.request.get('/api/laboratories')).status).toBe(401);
  });

  it('answers 400 for a day that does not exist', async () => {
    const reply = await agent('metrologist').get('/api/laboratories?day=2025-02-30');
    expect(reply.status).toBe(400);
    expect(reply.body.fields.day).toMatchObject({ received: '2025-02-30' });
  });

  it('shows every laboratory with its standing on the day asked about', async () => {
    const laboratory = await makeLaboratory(app);
    const context = app.context();
    const recognition = {
      laboratoryId: laboratory.id,
      kind: 'accreditation' as const,
      body: 'Accreditation Board of the tests',
      number: 'T-9',
      arrangement: 'Test arrangement',
    };
    await assertRecognition(context, {
      ...recognition,
      state: 'suspended',
      validFrom: '2021-01-01',
      validTo: '2021-06-30',
    });
    const line = { ...scopeLine(laboratory.id), line: 1 };
    await assertScopeLine(context, { ...line, validFrom: '2020-01-01', validTo: null });
    await assertScopeLine(context, { ...line, state: 'withdrawn', validFrom: '2022-01-01', validTo: null });
    const on = async (day: string) => {
      const reply = await agent('metrologist').get(`/api/laboratories?day=${day}`);
      expect(reply.status).toBe(200);
      return reply.body.laboratories.find((row: { id: string }) => row.id === laboratory.id);
    };
    expect(await on('1999-12-31')).toMatchObject({
      recognition: 'none',
      recognitionBody: null,
      scopeLines: 0,
    });
    expect(await on('2020-12-31')).toMatchObject({ recognition: 'granted', scopeLines: 1 });
    expect(await on('2021-06-30')).toMatchObject({ recognition: 'suspended', scopeLines: 1 });
    expect(await on('2021-07-01')).toMatchObject({ recognition: 'granted', scopeLines: 1 });
    expect(await on('2022-01-01')).toMatchObject({ recognition: 'granted', scopeLines: 0 });
  });
});

describe('GET /api/laboratories/:laboratoryId', () => {
  it('answers 401 without sign-in', async () => {
    expect((await app.request.get(`/api/laboratories/${home.id}`)).status).toBe(401);
  });

  it.each(['not-an-id', randomUUID()])('answers 404 for %s', async (id) => {
    expect((await agent('registrar').get(`/api/laboratories/${id}`)).status).toBe(404);
  });

  it.each([
    ['registrar', true, { 'laboratory:see-people': true, 'laboratory:manage-people': true }],
    ['administrator', true, { 'laboratory:see-people': true, 'laboratory:manage-people': true }],
    ['metrologist', true, { 'laboratory:see-people': true, 'laboratory:manage-people': false }],
    ['assessor', true, { 'laboratory:see-people': true, 'laboratory:manage-people': false }],
    ['foreign administrator', false, { 'laboratory:see-people': false, 'laboratory:manage-people': false }],
    ['pilot', false, { 'laboratory:see-people': false, 'laboratory:manage-people': false }],
  ])('shows people to the %s: %s', async (name, seesPeople, abilities) => {
    const reply = await agent(name).get(`/api/laboratories/${home.id}`);
    expect(reply.status).toBe(200);
    expect(reply.body.people !== null).toBe(seesPeople);
    expect(reply.body.abilities).toEqual(abilities);
  });

  it('gives scope lines as exact decimals, and the people with their roles', async () => {
    const laboratory = await makeLaboratory(app);
    await assertScopeLine(app.context(), {
      ...scopeLine(laboratory.id),
      line: 3,
      bestUConstant: '0.000000000001',
      validFrom: '2020-01-01',
      validTo: null,
    });
    const person = await makePerson(app, 'signatory', laboratory.id);
    const reply = await agent('registrar').get(`/api/laboratories/${laboratory.id}`);
    expect(reply.body.scope).toEqual([
      {
        line: 3,
        quantity: 'conventional mass',
        nominalFrom: '0.001',
        nominalTo: '50000',
        method: 'direct comparison',
        bestUConstant: '0.000000000001',
        bestURelative: 1.6e-7,
        k: '2',
        coverage: '0.9545',
        state: 'granted',
        validFrom: '2020-01-01',
        validTo: null,
      },
    ]);
    expect(reply.body.people).toEqual([
      {
        accountId: person.accountId,
        name: person.user.name,
        role: 'signatory',
        validFrom: '2000-01-01',
        validTo: null,
      },
    ]);
  });
});

describe('PUT /api/laboratories/:laboratoryId/people/:accountId', () => {
  const grant = { role: 'reader', state: 'granted', validFrom: '2026-03-01', validTo: null };
  const address = (laboratoryId: string, accountId: string) =>
    `/api/laboratories/${laboratoryId}/people/${accountId}`;

  it('answers 401 without sign-in', async () => {
    const reply = await app.request.put(address(home.id, people.pilot!.accountId)).send(grant);
    expect(reply.status).toBe(401);
  });

  it.each([
    [{}, ['role', 'state', 'validFrom', 'validTo']],
    [{ ...grant, role: 'king' }, ['role']],
    [{ ...grant, validFrom: '2026-02-30' }, ['validFrom']],
    [{ ...grant, accountId: 'x' }, ['accountId']],
  ])('answers 400 for %j and names the fields', async (body, fields) => {
    const reply = await agent('registrar').put(address(home.id, people.pilot!.accountId)).send(body);
    expect(reply.status).toBe(400);
    expect(Object.keys(reply.body.fields).sort()).toEqual(fields);
  });

  it.each([
    ['administrator', 'assessor'],
    ['administrator', 'laboratory administrator'],
    ['administrator', 'registrar'],
    ['metrologist', 'reader'],
    ['assessor', 'reader'],
    ['pilot', 'reader'],
    ['foreign administrator', 'reader'],
  ])('refuses the %s who would grant %s', async (name, role) => {
    const reply = await agent(name)
      .put(address(home.id, people.pilot!.accountId))
      .send({ ...grant, role });
    expect(reply.status).toBe(403);
    expect(reply.body.type).toBe('/problems/not-permitted');
  });

  it('answers 404 for an unknown laboratory and, to those who may grant, for an unknown account', async () => {
    expect(
      (await agent('registrar').put(address(randomUUID(), people.pilot!.accountId)).send(grant)).status,
    ).toBe(404);
    expect((await agent('registrar').put(address(home.id, randomUUID())).send(grant)).status).toBe(404);
    expect((await agent('metrologist').put(address(home.id, randomUUID())).send(grant)).status).toBe(403);
  });

  it('answers 422 for days in the wrong order and for a role of the network', async () => {
    const to = address(home.id, people.pilot!.accountId);
    const reversed = await agent('registrar')
      .put(to)
      .send({ ...grant, validTo: '2026-02-01' });
    expect(reversed.status).toBe(422);
    expect(reversed.body.fields.validTo).toMatchObject({
      received: '2026-02-01',
      expected: '2026-03-01 or later, or none',
    });
    const misplaced = await agent('registrar')
      .put(to)
      .send({ ...grant, role: 'registrar' });
    expect(misplaced.status).toBe(422);
    expect(misplaced.body.fields.role.received).toBe('registrar');
  });

  it.each(['metrologist', 'signatory', 'reader'] as const)(
    'lets an administrator grant and end %s',
    async (role) => {
      const laboratory = await makeLaboratory(app);
      const administrator = await app.signIn(
        await makePerson(app, 'laboratory administrator', laboratory.id),
      );
      const person = await makePerson(app, 'comparison pilot');
      const to = address(laboratory.id, person.accountId);
      const granted = await administrator.put(to).send({ ...grant, role });
      expect(granted.status).toBe(200);
      const personAgent = await app.signIn(person);
      const held = await personAgent.get('/api/session');
      expect(held.body.person.roles.map((one: { role: string }) => one.role)).toContain(role);
      const ended = await administrator.put(to).send({ ...grant, role, state: 'ended' });
      expect(ended.status).toBe(200);
      const after = await personAgent.get('/api/session');
      expect(after.body.person.roles.map((one: { role: string }) => one.role)).not.toContain(role);
    },
  );

  it('authorises a signatory to sign in the same act', async () => {
    const laboratory = await makeLaboratory(app);
    const person = await makePerson(app, 'comparison pilot');
    const to = address(laboratory.id, person.accountId);
    await agent('registrar')
      .put(to)
      .send({ ...grant, role: 'signatory' });
    const row = await readRow(
      app.database,
      `SELECT u.state FROM authorisation u JOIN membership m ON m.act_seq = u.act_seq
       WHERE u.account_id = :accountId AND u.laboratory_id = :laboratoryId AND m.role = 'signatory'`,
      { accountId: person.accountId, laboratoryId: laboratory.id },
    );
    expect(row).toEqual({ state: 'granted' });
  });

  it('opens a laboratory to an assessor for the days of the grant only, by the registrar', async () => {
    const laboratory = await makeLaboratory(app);
    const person = await makePerson(app, 'comparison pilot');
    const assessor = await app.signIn(person);
    const seesPeople = async () =>
      (await assessor.get(`/api/laboratories/${laboratory.id}`)).body.people !== null;
    expect(await seesPeople()).toBe(false);
    const body = { ...grant, role: 'assessor', validFrom: '2026-03-01', validTo: '2026-03-02' };
    await agent('registrar').put(address(laboratory.id, person.accountId)).send(body);
    expect(await seesPeople()).toBe(true);
    await assertMembership(app.context(), {
      accountId: person.accountId,
      laboratoryId: laboratory.id,
      role: 'assessor',
      state: 'granted',
      validFrom: '2026-03-02',
      validTo: '2026-03-02',
    });
    await agent('registrar')
      .put(address(laboratory.id, person.accountId))
      .send({ ...body, state: 'ended' });
    expect(await seesPeople()).toBe(false);
  });

  it('leaves an act that says who granted what', async () => {
    const person = await makePerson(app, 'comparison pilot');
    const reply = await agent('administrator').put(address(home.id, person.accountId)).send(grant);
    const act = await readRow<{ kind: string; accountId: string; laboratoryId: string; content: string }>(
      app.database,
      `SELECT kind, account_id AS accountId, laboratory_id AS laboratoryId, content FROM act
       WHERE subject_type = 'membership' AND subject_id = :id`,
      { id: reply.body.id },
    );
    expect(act).toMatchObject({
      kind: 'membership.grant',
      accountId: people.administrator!.accountId,
      laboratoryId: home.id,
    });
    expect(JSON.parse(act!.content).after).toEqual({
      ...grant,
      laboratoryId: home.id,
      accountId: person.accountId,
    });
  });
});

function scopeLine(laboratoryId: string) {
  return {
    laboratoryId,
    quantity: 'conventional mass' as const,
    nominalFrom: '0.001',
    nominalTo: '50000',
    method: 'direct comparison',
    bestUConstant: '0.0000031',
    bestURelative: 1.6e-7,
    k: '2',
    coverage: '0.9545',
    state: 'granted' as const,
  };
}

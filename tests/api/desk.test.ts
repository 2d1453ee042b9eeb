import { beforeAll, describe, expect, it } from 'vitest';
import type { Role } from '#shared/contracts/identity.ts';
import type { Clock } from '#server/http/context.ts';
import { withdrawCalibration } from '#server/modules/calibrations/index.ts';
import { assertFact, registerSet } from '#server/modules/standards/index.ts';
import { lineOf, makeCalibration, makeStandard, useOf } from '#tests/support/calibration-factories.ts';
import { freeRegistryNo, makeLaboratory, makePerson, type TestPerson } from '#tests/support/factories.ts';
import { makeDownstreamScene } from '#tests/support/downstream-scene.ts';
import { makeNotice, makeScale, termOf } from '#tests/support/notice-scene.ts';
import { testApp } from '#tests/support/test-app.ts';

const clock: Clock = { now: () => new Date('2026-03-02T09:00:00Z') };
const app = await testApp(clock);
type Agent = Awaited<ReturnType<typeof app.signIn>>;

async function personAt(
  role: Role,
  laboratoryId: string | null,
): Promise<{ agent: Agent; person: TestPerson }> {
  const person = await makePerson(app, role, laboratoryId);
  return { agent: await app.signIn(person), person };
}

const desk = async (agent: Agent) => {
  const reply = await agent.get('/api/desk');
  expect(reply.status).toBe(200);
  return reply.body;
};

describe('GET /api/desk', () => {
  it('answers 401 without sign-in', async () => {
    expect((await app.request.get('/api/desk')).status).toBe(401);
  });

  it('is empty, with the laboratory named, where nothing waits', async () => {
    const home = await makeLaboratory(app);
    const { agent } = await personAt('reader', home.id);
    expect(await desk(agent)).toEqual({
      day: '2026-03-02',
      laboratories: [{ id: home.id, code: home.code, name: home.name }],
      toSign: [],
      drafts: [],
      due: [],
      upstream: [],
      notices: [],
      audits: [],
      register: null,
      assessments: [],
    });
  });

  it('counts the register for the registrar alone', async () => {
    const { agent } = await personAt('registrar', null);
    const { register } = await desk(agent);
    expect(register.laboratories).toBeGreaterThan(0);
    expect(register.acts).toBeGreaterThan(register.laboratories);
    expect(Object.keys(register).sort()).toEqual(['acts', 'laboratories', 'standards', 'values']);
  });

  it('names the laboratories opened to an assessor', async () => {
    const home = await makeLaboratory(app);
    const { agent } = await personAt('assessor', home.id);
    expect((await desk(agent)).assessments).toEqual([
      { laboratory: { id: home.id, code: home.code, name: home.name }, until: null },
    ]);
  });

  it('lists what is due within 60 days or overdue by the own programme, the longest overdue first', async () => {
    const home = await makeLaboratory(app);
    const calibrated = async (day: string, intervalMonths: number | null) => {
      const standard = await makeStandard(app, home.id, { intervalMonths });
      if (day) await makeCalibration(app, home.id, day, [lineOf(standard.id)]);
      return standard;
    };
    const overdue = await calibrated('2023-06-10', 24);
    const soon = await calibrated('2024-05-01', 24);
    await calibrated('2024-05-02', 24);
    await calibrated('2020-01-10', null);
    await calibrated('', 24);
    const retired = await calibrated('2021-01-10', 12);
    await assertFact(app.context(), {
      standardId: retired.id,
      kind: 'state',
      value: 'retired',
      validFrom: '2022-01-01',
    });
    const { agent } = await personAt('metrologist', home.id);
    const { due } = await desk(agent);
    expect(
      due.map(({ registryNo, dueOn, lastCalibrated }: Record<string, string>) => [
        registryNo,
        dueOn,
        lastCalibrated,
      ]),
    ).toEqual([
      [overdue.registryNo, '2025-06-10', '2023-06-10'],
      [soon.registryNo, '2026-05-01', '2024-05-01'],
    ]);
    const { agent: elsewhere } = await personAt('metrologist', (await makeLaboratory(app)).id);
    expect((await desk(elsewhere)).due).toEqual([]);
  });

  it('tells of a reference that was withdrawn since, until the weight has a newer value', async () => {
    const home = await makeLaboratory(app);
    const institute = await makeLaboratory(app, 'national institute');
    const reference = await makeStandard(app, institute.id);
    const top = await makeCalibration(app, institute.id, '2025-01-10', [lineOf(reference.id)]);
    const standard = await makeStandard(app, home.id);
    const line = lineOf(standard.id, {
      references: [useOf(top.valueUids[0]!, '2025-02-10')],
      expandedU: '0.0009',
    });
    const below = await makeCalibration(app, home.id, '2025-02-10', [line]);
    const { agent } = await personAt('metrologist', home.id);
    expect((await desk(agent)).upstream).toEqual([]);
    await withdrawCalibration(app.context(), top.revisionId, {
      reason: 'The balance was not level',
      effectiveOn: '2025-06-01',
    });
    expect((await desk(agent)).upstream).toEqual([
      {
        valueUid: below.valueUids[0],
        registryNo: standard.registryNo,
        quantity: 'conventional mass',
        certificateNo: expect.any(String),
        referenceRegistryNo: reference.registryNo,
        referenceCertificateNo: expect.any(String),
        what: 'withdrawn',
        on: '2025-06-01',
      },
    ]);
    await makeCalibration(app, home.id, '2025-09-10', [lineOf(standard.id)]);
    expect((await desk(agent)).upstream).toEqual([]);
  });

  it('tells of a notice that moves own values materially, to who holds them, until it is no news', async () => {
    const scene = await makeDownstreamScene(app);
    const scale = await makeScale(app);
    const publish = (effectiveOn: string, shift: string, replacesId: string | null = null) =>
      makeNotice(app, scene.institute.id, scale.id, { effectiveOn, replacesId, terms: [termOf(shift)] });
    const notices = async (who: 'home' | 'stranger') =>
      (await desk(await app.signIn(scene.people[who]))).notices;
    const early = await publish('2025-12-31', '-0.0001');
    expect(await notices('home')).toEqual([]);
    // 40 ug beside U = 300 ug: material for the one value that home holds.
    const { id, number } = await publish('2026-02-20', '-0.00004', early.id);
    expect(await notices('home')).toEqual([
      { id, number, effectiveOn: '2026-02-20', material: 1, verdictChanges: 0 },
    ]);
    expect(await notices('stranger')).toEqual([]);
  });

  it('shows open drafts to the laboratory, and what waits for a signature to its signatory', async () => {
    const home = await makeLaboratory(app);
    const { agent: metrologist } = await personAt('metrologist', home.id);
    const { agent: signatory } = await personAt('signatory', home.id);
    const content = { issuerId: home.id, certificateNo: 'HB 1', lines: [{ key: 'a' }, { key: 'b' }] };
    const made = await metrologist.post('/api/drafts').send({ laboratoryId: home.id, content });
    expect(made.status).toBe(201);
    const [draft] = (await desk(metrologist)).drafts;
    expect(draft).toMatchObject({
      id: made.body.id,
      laboratory: { id: home.id },
      certificateNo: 'HB 1',
      issuerName: home.name,
      lines: 2,
      state: 'open',
    });
    expect((await desk(signatory)).toSign).toEqual([]);
    await metrologist
      .post(`/api/drafts/${made.body.id}/state`)
      .send({ version: made.body.version, state: 'sent to sign' });
    expect((await desk(signatory)).toSign.map((one: { id: string }) => one.id)).toEqual([made.body.id]);
    expect((await desk(metrologist)).toSign).toEqual([]);
    expect((await desk(metrologist)).drafts).toEqual([]);
  });
});

describe('GET /api/find', () => {
  const registryNo = freeRegistryNo();
  const foreignNo = freeRegistryNo();
  let home: Awaited<ReturnType<typeof makeLaboratory>>;
  let metrologist: Agent;
  let registrar: Agent;
  let standardId: string;

  beforeAll(async () => {
    home = await makeLaboratory(app);
    const other = await makeLaboratory(app);
    ({ agent: metrologist } = await personAt('metrologist', home.id));
    ({ agent: registrar } = await personAt('registrar', null));
    const standard = await makeStandard(app, home.id, {
      registryNo,
      marking: '100 % of_it',
      serial: 'SN-77341',
    });
    standardId = standard.id;
    await makeCalibration(app, home.id, '2025-03-01', [lineOf(standard.id)], {
      certificateNo: `FIND-${home.code}-17`,
    });
    const foreign = await makeStandard(app, other.id, { registryNo: foreignNo, marking: 'hidden marking' });
    await makeCalibration(app, other.id, '2025-03-01', [lineOf(foreign.id)], {
      certificateNo: `HIDE-${other.code}-18`,
    });
  });

  const found = async (agent: Agent, q: string) => {
    const reply = await agent.get('/api/find').query({ q });
    expect(reply.status).toBe(200);
    return reply.body.found as { kind: string; id: string; label: string; detail: string }[];
  };

  it('answers 401 without sign-in', async () => {
    expect((await app.request.get('/api/find?q=x')).status).toBe(401);
  });

  it.each([{}, { q: '' }, { q: '   ' }, { q: 'x'.repeat(121) }, { q: ['a', 'b'] }])(
    'answers 400 for %j',
    async (query) => {
      const reply = await metrologist.get('/api/find').query(query);
      expect(reply.status).toBe(400);
      expect(Object.keys(reply.body.fields)).toEqual(['q']);
    },
  );

  it('finds an own standard by number, part of it, marking and serial', async () => {
    for (const q of [registryNo, registryNo.toLowerCase(), registryNo.slice(2), '00 % of', 'sn-77341']) {
      expect(await found(metrologist, q), q).toContainEqual({
        kind: 'standard',
        id: standardId,
        label: registryNo,
        detail: `1\u2009kg, 100 % of_it, ${home.name}`,
      });
    }
  });

  it('finds nothing of another laboratory, not by its whole number either', async () => {
    expect(await found(metrologist, foreignNo)).toEqual([]);
    expect(await found(metrologist, foreignNo.slice(0, -1))).toEqual([]);
    expect(await found(metrologist, 'hidden marking')).toEqual([]);
    expect(await found(metrologist, 'HIDE-')).toEqual([]);
  });

  it('lets the registrar find all of it by its beginning', async () => {
    expect((await found(registrar, foreignNo.slice(0, -1))).map((one) => one.label)).toContain(foreignNo);
    expect((await found(registrar, 'hidden mark')).map((one) => one.label)).toContain(foreignNo);
    expect((await found(registrar, 'HIDE-')).map((one) => one.kind)).toContain('certificate');
  });

  it('finds an own certificate by part of its number, and laboratories by name', async () => {
    const [certificate] = await found(metrologist, `${home.code}-17`);
    expect(certificate).toMatchObject({
      kind: 'certificate',
      label: `FIND-${home.code}-17`,
      detail: `${home.name}, 2025-03-01`,
    });
    expect((await metrologist.get(`/api/calibrations/${certificate!.id}`)).status).toBe(200);
    expect(await found(metrologist, home.name.toLowerCase())).toContainEqual({
      kind: 'laboratory',
      id: home.id,
      label: home.name,
      detail: `${home.code}, Testing`,
    });
  });

  it('finds a set', async () => {
    const setNo = freeRegistryNo();
    await registerSet(app.context(), {
      laboratoryId: home.id,
      registryNo: setNo,
      name: 'Set of two',
      manufacturer: null,
      inServiceFrom: null,
      intervalMonths: null,
      members: ['1', '2'].map((nominal) => ({
        nominal,
        marking: `${nominal} g`,
        serial: null,
        shape: 'knob' as const,
        material: 'stainless steel',
        class: 'E2' as const,
        density: null,
      })),
    });
    const labels = (await found(metrologist, setNo)).map((one) => `${one.kind} ${one.label}`);
    expect(labels).toEqual(
      expect.arrayContaining([`set ${setNo}`, `standard ${setNo}-01`, `standard ${setNo}-02`]),
    );
  });

  it.each(['%', '_', "' OR 1=1 --", '\\', '100 %%', '😀', 'a\u0000b'])(
    'takes %j as text that stands for itself',
    async (q) => {
      const labels = (await found(metrologist, q)).map((one) => one.label);
      expect(labels).toEqual(q === '%' || q === '_' ? [registryNo] : []);
    },
  );
});

import type supertest from 'supertest';
import { beforeAll, describe, expect, it } from 'vitest';
import { readRow, readRows } from '#server/db/read.ts';
import { issueCalibration, reviseCalibration } from '#server/modules/calibrations/index.ts';
import { assertFact } from '#server/modules/standards/index.ts';
import {
  inputOf,
  lineOf,
  makeCalibration,
  makeStandard,
  useOf,
} from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const NOBODY = '01890000-0000-7000-8000-000000000000';

interface Place {
  id: string;
  agent: supertest.Agent;
  signatory: supertest.Agent;
}

async function place(): Promise<Place> {
  const { id } = await makeLaboratory(app);
  return {
    id,
    agent: await app.signIn(await makePerson(app, 'metrologist', id)),
    signatory: await app.signIn(await makePerson(app, 'signatory', id)),
  };
}

let institute: Place;
let holder: Place;
let stranger: Place;
let registrar: supertest.Agent;

beforeAll(async () => {
  [institute, holder, stranger] = [await place(), await place(), await place()];
  registrar = await app.signIn(await makePerson(app, 'registrar'));
});

const certificates = (reply: supertest.Response): string[] =>
  reply.body.calibrations.map((row: { certificateNo: string }) => row.certificateNo);

describe('GET /api/calibrations', () => {
  it('is refused without sign-in and for queries that make no sense', async () => {
    expect((await app.request.get('/api/calibrations')).status).toBe(401);
    for (const query of [{ sort: 'x' }, { state: 'x' }, { issuedFrom: '2024-13-01' }, { cursor: 'e30' }]) {
      const reply = await holder.agent.get('/api/calibrations').query(query);
      expect([reply.status, Object.keys(reply.body.fields)]).toEqual([400, Object.keys(query)]);
    }
  });

  it('shows a laboratory what it issued, entered or holds, and nobody else', async () => {
    const weight = await makeStandard(app, holder.id);
    const issued = await makeCalibration(app, institute.id, '2024-01-10', [lineOf(weight.id)], {
      registeredById: holder.id,
      certificateNo: `V-${weight.registryNo}`,
    });
    const asked = { q: `v-${weight.registryNo.toLowerCase()}` };
    for (const agent of [institute.agent, holder.agent, registrar]) {
      const reply = await agent.get('/api/calibrations').query(asked);
      expect(reply.body.calibrations).toMatchObject([
        {
          revisionId: issued.revisionId,
          weights: 1,
          firstRegistryNo: weight.registryNo,
          state: 'in force',
          issuer: { id: institute.id },
        },
      ]);
    }
    expect((await stranger.agent.get('/api/calibrations').query(asked)).body.count).toBe(0);
    const byWeight = await holder.agent
      .get('/api/calibrations')
      .query({ q: weight.registryNo, laboratory: institute.id });
    expect(byWeight.body.count).toBe(1);
  });

  it('walks every row once in each order; the latest revision, or those of a state', async () => {
    const own = await place();
    const weight = await makeStandard(app, own.id);
    const days = ['2024-01-10', '2024-01-10', '2024-02-10', '2024-03-10', '2024-04-10'];
    const inputs = days.map((day) => inputOf(own.id, day, [lineOf(weight.id)]));
    const issued = [];
    for (const input of inputs) issued.push(await issueCalibration(app.context(), input));
    const revised = await reviseCalibration(app.context(), {
      ...inputs[0]!,
      calibrationId: issued[0]!.calibrationId,
      issuedOn: '2024-05-01',
      effectiveOn: '2024-05-01',
      reason: 'Address corrected',
    });
    for (const sort of ['issuedOn', '-issuedOn', 'certificateNo', '-certificateNo']) {
      const seen: { revisionId: string; issuedOn: string; certificateNo: string }[] = [];
      let cursor: string | undefined;
      do {
        const reply: supertest.Response = await own.agent
          .get('/api/calibrations')
          .query({ sort, limit: 2, cursor });
        expect(reply.body.count).toBe(5);
        seen.push(...reply.body.calibrations);
        cursor = reply.body.nextCursor ?? undefined;
      } while (cursor);
      expect(new Set(seen.map((row) => row.revisionId)).size).toBe(5);
      expect(seen).toHaveLength(5);
      const keys = seen.map((row) => (sort.endsWith('issuedOn') ? row.issuedOn : row.certificateNo));
      expect(keys).toEqual(sort.startsWith('-') ? keys.toSorted().toReversed() : keys.toSorted());
    }
    const superseded = await own.agent.get('/api/calibrations').query({ state: 'superseded' });
    expect(superseded.body.calibrations).toMatchObject([{ revisionId: issued[0]!.revisionId, revisionN: 1 }]);
    const newest = await own.agent.get('/api/calibrations').query({ issuedFrom: '2024-04-11' });
    expect(newest.body.calibrations).toMatchObject([{ revisionId: revised.revisionId, revisionN: 2 }]);
    const inRange = await own.agent
      .get('/api/calibrations')
      .query({ issuedFrom: '2024-02-01', issuedTo: '2024-03-31', sort: 'issuedOn' });
    expect(certificates(inRange)).toEqual([inputs[2]!.certificateNo, inputs[3]!.certificateNo]);
  });

  it('puts the open drafts of one’s laboratories on the first page', async () => {
    const made = await holder.agent
      .post('/api/drafts')
      .send({ laboratoryId: holder.id, content: { certificateNo: 'half done', issuerId: institute.id } });
    const reply = await holder.agent.get('/api/calibrations');
    expect(reply.body.drafts).toMatchObject([
      {
        id: made.body.id,
        certificateNo: 'half done',
        lines: 0,
        state: 'open',
        laboratory: { id: holder.id },
      },
    ]);
    expect(reply.body.drafts[0].issuerName).toMatch(/^Laboratory/);
    expect(reply.body.abilities).toEqual({ 'calibration:draft': true });
    expect((await stranger.agent.get('/api/calibrations')).body.drafts).toEqual([]);
  });
});

describe('GET /api/calibrations/:revisionId', () => {
  it('is refused without sign-in and unknown to strangers', async () => {
    const weight = await makeStandard(app, holder.id);
    const { revisionId } = await makeCalibration(app, holder.id, '2024-01-10', [lineOf(weight.id)]);
    expect((await app.request.get(`/api/calibrations/${revisionId}`)).status).toBe(401);
    expect((await stranger.agent.get(`/api/calibrations/${revisionId}`)).status).toBe(404);
    expect((await holder.agent.get(`/api/calibrations/${NOBODY}`)).status).toBe(404);
    expect((await holder.agent.get('/api/calibrations/x')).status).toBe(404);
  });

  it('names the later certificate of a weight that stands beside it, to the holder alone', async () => {
    const { id } = await makeStandard(app, holder.id);
    const laboratoryId = institute.id;
    await assertFact(app.context(), {
      standardId: id,
      kind: 'custodian',
      laboratoryId,
      validFrom: '2024-01-01',
    });
    const first = await makeCalibration(app, institute.id, '2024-06-12', [lineOf(id)]);
    const second = await makeCalibration(app, institute.id, '2025-06-12', [lineOf(id)]);
    const newerOn = async (agent: supertest.Agent, revisionId: string) =>
      (await agent.get(`/api/calibrations/${revisionId}`)).body.lines[0].newer;
    expect(await newerOn(holder.agent, first.revisionId)).toMatchObject({ revisionId: second.revisionId });
    expect(await newerOn(holder.agent, second.revisionId)).toBeNull();
    expect(await newerOn(institute.agent, first.revisionId)).toBeNull();
  });

  it('shows each customer their own lines, and the budget to the issuer alone', async () => {
    const [mine, theirs] = [await makeStandard(app, holder.id), await makeStandard(app, stranger.id)];
    const top = await makeStandard(app, institute.id);
    const root = await makeCalibration(app, institute.id, '2024-01-10', [lineOf(top.id)]);
    const references = [useOf(root.valueUids[0]!, '2024-02-10')];
    const components = [
      {
        name: 'repeatability',
        evaluation: 'A' as const,
        distribution: 'normal' as const,
        standardUncertainty: 2e-4,
        sensitivity: 1,
      },
    ];
    const shared = await makeShared(mine.id, theirs.id, references, components);
    const full = await institute.agent.get(`/api/calibrations/${shared}`);
    expect(full.body.lines).toHaveLength(2);
    expect(full.body.lines[0].components).toEqual([
      { name: 'repeatability', evaluation: 'A', standardUncertainty: 2e-4, sensitivity: 1 },
    ]);
    const part = await holder.agent.get(`/api/calibrations/${shared}`);
    expect(part.body.lines).toMatchObject([
      {
        standard: { id: mine.id },
        components: null,
        references: [{ valueUid: root.valueUids[0], registryNo: top.registryNo, state: 'in force' }],
      },
    ]);
    expect(part.body.calibration.weights).toBe(1);
    expect(JSON.stringify(part.body)).not.toContain(theirs.registryNo);
    expect(part.body.abilities).toEqual({ 'calibration:read': true, 'calibration:withdraw': false });
  });

  /** Two customers' weights in the institute's custody, on one certificate. */
  async function makeShared(
    mine: string,
    theirs: string,
    references: ReturnType<typeof useOf>[],
    components: object[],
  ): Promise<string> {
    for (const standardId of [mine, theirs]) {
      await assertFact(app.context(), {
        standardId,
        kind: 'custodian',
        laboratoryId: institute.id,
        validFrom: '2024-01-01',
      });
    }
    const issued = await makeCalibration(app, institute.id, '2024-02-10', [
      lineOf(mine, { references, components: components as never }),
      lineOf(theirs, { references, components: components as never }),
    ]);
    return issued.revisionId;
  }
});

describe('POST /api/calibrations/:revisionId/withdraw', () => {
  const body = {
    reason: 'The balance was found faulty',
    effectiveOn: '2024-02-01',
    password: 'a long test password',
  };

  it('is refused without sign-in, malformed, to those who do not sign, and to strangers', async () => {
    const weight = await makeStandard(app, holder.id);
    const { revisionId } = await makeCalibration(app, holder.id, '2024-01-10', [lineOf(weight.id)]);
    const path = `/api/calibrations/${revisionId}/withdraw`;
    expect((await app.request.post(path).send(body)).status).toBe(401);
    const short = await holder.signatory.post(path).send({ ...body, reason: 'x' });
    expect([short.status, Object.keys(short.body.fields)]).toEqual([400, ['reason']]);
    expect((await holder.agent.post(path).send(body)).status).toBe(403);
    expect((await registrar.post(path).send(body)).status).toBe(403);
    expect((await stranger.signatory.post(path).send(body)).status).toBe(404);
    const unsigned = await holder.signatory.post(path).send({ ...body, password: 'not mine' });
    expect([unsigned.status, Object.keys(unsigned.body.fields)]).toEqual([422, ['password']]);
    const early = await holder.signatory.post(path).send({ ...body, effectiveOn: '2023-12-31' });
    expect([early.status, Object.keys(early.body.fields)]).toEqual([422, ['effectiveOn']]);
  });

  it('ends every value from the day on, once, and leaves its act', async () => {
    const weight = await makeStandard(app, holder.id);
    const { revisionId, calibrationId } = await makeCalibration(app, holder.id, '2024-01-10', [
      lineOf(weight.id),
    ]);
    const path = `/api/calibrations/${revisionId}/withdraw`;
    const reply = await holder.signatory.post(path).send(body);
    expect(reply.status).toBe(200);
    expect(reply.body).toMatchObject({
      actSeq: expect.any(Number),
      calibration: { state: 'withdrawn' },
      lines: [{ state: 'withdrawn', stateSince: '2024-02-01' }],
    });
    expect((await holder.signatory.post(path).send(body)).status).toBe(409);
    const sheet = await holder.agent.get(`/api/standards/${weight.id}`);
    expect(sheet.body.standard.value).toBeNull();
    expect(sheet.body.history).toMatchObject([{ state: 'withdrawn', stateSince: '2024-02-01' }]);
    const act = await readRow(
      app.database,
      "SELECT seq FROM act WHERE kind = 'calibration.withdraw' AND subject_id = :calibrationId",
      { calibrationId },
    );
    expect(act).toEqual({ seq: reply.body.actSeq });
  });
});

describe('a withdrawal of what another laboratory issued', () => {
  const body = {
    reason: 'Weighed in the wrong hall',
    effectiveOn: '2024-02-01',
    password: 'a long test password',
  };
  /** Issued by the institute, entered by the holder. */
  const received = async () => {
    const weight = await makeStandard(app, holder.id);
    const issued = await makeCalibration(app, institute.id, '2024-01-10', [lineOf(weight.id)], {
      registeredById: holder.id,
      certificateNo: `W-${weight.registryNo}`,
    });
    return { ...issued, certificateNo: `W-${weight.registryNo}` };
  };
  const withdrawnBy = async (signatory: supertest.Agent) => {
    const { revisionId, calibrationId, certificateNo } = await received();
    const reply = await signatory.post(`/api/calibrations/${revisionId}/withdraw`).send(body);
    expect(reply.status, reply.text).toBe(200);
    const act = await readRow<{ laboratoryId: string; content: string }>(
      app.database,
      `SELECT laboratory_id AS laboratoryId, content FROM act
       WHERE kind = 'calibration.withdraw' AND subject_id = :calibrationId`,
      { calibrationId },
    );
    return { certificateNo, reason: reply.body.lines[0].stateReason as string, act: act! };
  };

  it('is of the certificate where its issuer signs, in the name of the issuer', async () => {
    const { certificateNo, reason, act } = await withdrawnBy(institute.signatory);
    expect(reason).toBe(`Certificate ${certificateNo} withdrawn by its issuer: ${body.reason}`);
    expect(act.laboratoryId).toBe(institute.id);
    expect(act.content).toContain('"withdrawn":"certificate"');
    expect(act.content).toContain(reason);
  });

  it('is of the entry where the laboratory signs that only entered it', async () => {
    const { certificateNo, reason, act } = await withdrawnBy(holder.signatory);
    expect(reason).toBe(
      `Entry of certificate ${certificateNo} withdrawn by the laboratory that made it: ${body.reason}`,
    );
    expect(act.laboratoryId).toBe(holder.id);
    expect(act.content).toContain('"withdrawn":"entry"');
  });

  it('refuses a reason too long to be told with what was withdrawn', async () => {
    const { revisionId } = await received();
    const long = { ...body, reason: 'x'.repeat(300) };
    const reply = await holder.signatory.post(`/api/calibrations/${revisionId}/withdraw`).send(long);
    expect([reply.status, Object.keys(reply.body.fields)]).toEqual([422, ['reason']]);
  });

  it('is nobody else’s to sign, and says so beforehand', async () => {
    const { revisionId } = await received();
    const path = `/api/calibrations/${revisionId}`;
    expect((await stranger.signatory.post(`${path}/withdraw`).send(body)).status).toBe(404);
    expect((await institute.agent.post(`${path}/withdraw`).send(body)).status).toBe(403);
    const may = async (one: supertest.Agent) => (await one.get(path)).body.abilities['calibration:withdraw'];
    expect([await may(institute.signatory), await may(holder.signatory)]).toEqual([true, true]);
    expect([await may(institute.agent), await may(holder.agent)]).toEqual([false, false]);
  });
});

describe('POST /api/calibrations/:revisionId/correct', () => {
  const head = {
    reason: 'The sign was copied wrongly',
    issuedOn: '2024-03-01',
    effectiveOn: '2024-03-01',
    password: 'a long test password',
  };

  it('issues the next revision with the line corrected and every other line as it stood', async () => {
    const [one, two] = [await makeStandard(app, holder.id), await makeStandard(app, holder.id)];
    const { revisionId, valueUids } = await makeCalibration(app, holder.id, '2024-01-10', [
      lineOf(one.id, { deviation: '0.00012' }),
      lineOf(two.id, { deviation: '0.00034' }),
    ]);
    const path = `/api/calibrations/${revisionId}/correct`;
    const lines = [{ valueUid: valueUids[0]!, deviation: '-0.0001203', expandedU: '0.0009' }];
    const reply = await holder.signatory.post(path).send({ ...head, lines });
    expect(reply.status, reply.text).toBe(201);
    const sheet = await holder.agent.get(`/api/calibrations/${reply.body.revisionId}`);
    expect(sheet.body.calibration).toMatchObject({ revisionN: 2, reason: head.reason, state: 'in force' });
    expect(sheet.body.lines).toMatchObject([
      { deviation: '-0.0001203', expandedU: '0.0009', reportedDecimals: 4 },
      { deviation: '0.00034' },
    ]);
    const act = await readRow(app.database, 'SELECT kind FROM act WHERE seq = :seq', {
      seq: reply.body.actSeq,
    });
    expect(act).toEqual({ kind: 'calibration.revise' });
    // The revision before it is no longer the one that stands.
    const again = await holder.signatory.post(path).send({ ...head, lines });
    expect(again.status).toBe(422);
  });

  it('lets what U grows by join the covariance of a weighing design', async () => {
    const [one, two] = [await makeStandard(app, holder.id), await makeStandard(app, holder.id)];
    const covariance = [
      [4e-8, 1e-8],
      [1e-8, 4e-8],
    ];
    const lines = [lineOf(one.id, { expandedU: '0.0004' }), lineOf(two.id, { expandedU: '0.0004' })];
    const input = inputOf(holder.id, '2024-01-10', lines, { group: { covariance } });
    const issued = await issueCalibration(app.context(), input);
    const path = `/api/calibrations/${issued.revisionId}/correct`;
    const grown = [{ valueUid: issued.valueUids[0]!, expandedU: '0.0005' }];
    const reply = await holder.signatory.post(path).send({ ...head, lines: grown });
    expect(reply.status, reply.text).toBe(201);
    const values = await readRows<{ localU: number }>(
      app.database,
      'SELECT local_u AS localU FROM assigned_value WHERE revision_id = :revisionId ORDER BY line',
      { revisionId: reply.body.revisionId },
    );
    // u grows from 0.2 mg to 0.25 mg: 6.25 - 4 = 2.25 in units of 1e-8 g2.
    expect(values[0]!.localU ** 2 / 6.25e-8).toBeCloseTo(1, 9);
    expect(values[1]!.localU ** 2 / 4e-8).toBeCloseTo(1, 9);
  });

  it('is refused without the password, for a value of another certificate, and where nothing is corrected', async () => {
    const weight = await makeStandard(app, holder.id);
    const { revisionId, valueUids } = await makeCalibration(app, holder.id, '2024-01-10', [
      lineOf(weight.id),
    ]);
    const path = `/api/calibrations/${revisionId}/correct`;
    const lines = [{ valueUid: valueUids[0]!, deviation: '0.0002' }];
    expect((await app.request.post(path).send({ ...head, lines })).status).toBe(401);
    expect((await holder.agent.post(path).send({ ...head, lines })).status).toBe(403);
    expect((await stranger.signatory.post(path).send({ ...head, lines })).status).toBe(404);
    const unsigned = await holder.signatory.post(path).send({ ...head, lines, password: 'not mine' });
    expect([unsigned.status, Object.keys(unsigned.body.fields)]).toEqual([422, ['password']]);
    const foreign = [{ valueUid: revisionId, deviation: '0.0002' }];
    const other = await holder.signatory.post(path).send({ ...head, lines: foreign });
    expect([other.status, Object.keys(other.body.fields)]).toEqual([422, ['lines.0.valueUid']]);
    const nothing = await holder.signatory.post(path).send({ ...head, lines: [{ valueUid: valueUids[0]! }] });
    expect(nothing.status).toBe(400);
  });
});

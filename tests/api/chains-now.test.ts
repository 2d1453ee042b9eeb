import { describe, expect, it } from 'vitest';
import type { ChainLifeResponse } from '#shared/contracts/chain-life.ts';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { reviseCalibration } from '#server/modules/calibrations/index.ts';
import {
  inputOf,
  lineOf,
  makeCalibration,
  makeStandard,
  useOf,
} from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

let now = new Date('2025-01-15T12:00:00.000Z');
const app = await testApp({ now: () => now });

const institute = await makeLaboratory(app, 'national institute');
const laboratory = await makeLaboratory(app);
const reference = await makeStandard(app, institute.id);
const weight = await makeStandard(app, laboratory.id);
const input = inputOf(institute.id, '2025-01-15', [lineOf(reference.id)]);
const issued = await makeCalibration(app, institute.id, '2025-01-15', input.lines, {
  certificateNo: input.certificateNo,
});
const referenceUid = issued.valueUids[0]!;
now = new Date('2025-02-10T12:00:00.000Z');
const used = lineOf(weight.id, { deviation: '0.0002', references: [useOf(referenceUid, '2025-02-10')] });
const certified = await makeCalibration(app, laboratory.id, '2025-02-10', [used]);
const weightUid = certified.valueUids[0]!;
now = new Date('2025-04-10T12:00:00.000Z');
const revised = await reviseCalibration(app.context(), {
  ...input,
  lines: [lineOf(reference.id, { deviation: '0.00015' })],
  calibrationId: issued.calibrationId,
  issuedOn: '2025-04-10',
  effectiveOn: '2025-04-10',
  reason: 'Tried by a test',
});
// Another calibration of the reference: history that is the institute's own.
await makeCalibration(app, institute.id, '2025-04-10', [lineOf(reference.id)]);
now = new Date('2027-08-01T12:00:00.000Z');

const inLaboratory = await app.signIn(await makePerson(app, 'metrologist', laboratory.id));
const inInstitute = await app.signIn(await makePerson(app, 'metrologist', institute.id));
const stranger = await app.signIn(await makePerson(app, 'metrologist', (await makeLaboratory(app)).id));

type Agent = typeof inLaboratory;
async function get<Reply>(agent: Agent, path: string): Promise<Reply> {
  const reply = await agent.get(path);
  expect(reply.status, reply.text).toBe(200);
  return reply.body as Reply;
}
const chainOf = (agent: Agent, uid: string, query = '') =>
  get<ChainResponse>(agent, `/api/chains/${uid}${query}`);
const lifeOf = (agent: Agent, uid: string) => get<ChainLifeResponse>(agent, `/api/chains/${uid}/life`);

describe('GET /api/chains/:valueUid as now known', () => {
  it('echoes how the links stand, and refuses a reading that it does not know', async () => {
    expect((await chainOf(inLaboratory, weightUid)).question.as).toBe('certified');
    expect((await chainOf(inLaboratory, weightUid, '?as=now%20known')).question.as).toBe('now known');
    const refused = await inLaboratory.get(`/api/chains/${weightUid}?as=yesterday`);
    expect(refused.status).toBe(400);
    expect(refused.body.fields.as).toMatchObject({ received: 'yesterday' });
  });

  it('shows a successor as its predecessor is shown: of another laboratory a statement', async () => {
    const { nodes, asNowKnown } = await chainOf(inLaboratory, weightUid, '?as=now%20known');
    const successor = nodes.find((node) => node.uid === revised.valueUids[0]);
    expect(successor).toMatchObject({
      view: 'statement',
      deviation: '0.00015',
      holder: null,
      revisionId: null,
      uNow: null,
    });
    expect(nodes.some((node) => node.uid === referenceUid)).toBe(false);
    expect(asNowKnown).toMatchObject({ shift: '0.000027', deviation: '0.000227' });
  });

  it('names in the certified chain what each value is held to be now', async () => {
    const { nodes } = await chainOf(inLaboratory, weightUid);
    const now = (uid: string) => nodes.find((node) => node.uid === uid);
    expect(now(referenceUid)).toMatchObject({
      now: { deviation: '0.00015', shift: '0.000027', because: null },
    });
    expect(now(weightUid)).toMatchObject({
      now: { deviation: '0.000227', shift: '0.000027', because: null },
    });
  });

  it('tells who reads it in full what took the place of the weight’s own certificate, and nobody else', async () => {
    const own = await chainOf(inInstitute, referenceUid);
    expect(own.succeededBy).toMatchObject({ uid: revised.valueUids[0], revisionN: 2 });
    expect((await chainOf(inLaboratory, referenceUid)).succeededBy).toBeNull();
  });
});

describe('GET /api/chains/:valueUid/life', () => {
  it('is 401 without sign-in, 404 for whom the value is not to know', async () => {
    expect((await app.request.get(`/api/chains/${weightUid}/life`)).status).toBe(401);
    expect((await stranger.get(`/api/chains/${weightUid}/life`)).status).toBe(404);
  });

  it('tells what befell the weight and what it rests on, each with its three days', async () => {
    const { events, today } = await lifeOf(inLaboratory, weightUid);
    expect(today).toBe('2027-08-01');
    expect(events.map(({ kind, of, inForceFrom }) => `${inForceFrom} ${of} ${kind}`)).toEqual([
      '2025-02-10 weight calibrated',
      '2025-02-10 weight issued',
      '2025-04-10 chain superseded',
      '2027-02-10 weight due',
    ]);
    expect(events[2]).toMatchObject({
      valueUid: referenceUid,
      registryNo: reference.registryNo,
      madeKnownOn: '2025-04-10',
      recordedOn: '2025-04-10',
      isImported: false,
    });
  });

  it('keeps the history of another laboratory’s weight: only the value that the statement is about is told', async () => {
    const kinds = (life: ChainLifeResponse) => life.events.map(({ kind }) => kind);
    expect(kinds(await lifeOf(inLaboratory, referenceUid))).toEqual(['calibrated', 'issued', 'superseded']);
    const own = kinds(await lifeOf(inInstitute, referenceUid));
    expect(own.filter((kind) => kind === 'issued')).toHaveLength(2);
    expect(own).toContain('due');
  });

  it('marks what was entered long after it was made known', async () => {
    const imported = await makeCalibration(app, laboratory.id, '2020-03-01', [lineOf(weight.id)]);
    const { events } = await lifeOf(inLaboratory, imported.valueUids[0]!);
    const issue = events.find(({ kind, inForceFrom }) => kind === 'issued' && inForceFrom === '2020-03-01');
    expect(issue).toMatchObject({ recordedOn: '2027-08-01', isImported: true });
  });
});

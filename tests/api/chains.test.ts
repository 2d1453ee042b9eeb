import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { ChainResponse } from '#shared/contracts/chains.ts';
import { issueCalibration, withdrawCalibration } from '#server/modules/calibrations/index.ts';
import { chainSubject } from '#server/modules/chains/chain-subject.queries.ts';
import { presentChain } from '#server/modules/chains/chain.presenter.ts';
import { chainOf, storeOf } from '#server/modules/chains/index.ts';
import { registerStandard } from '#server/modules/standards/index.ts';
import { freeRegistryNo, makeLaboratory, makePerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();

/**
 * A network small enough to work out by hand: a root R (u 10 ug) at the institute; W at the institute from R
 * (local 20 ug); two weights of a laboratory from W with c = 1, local 100 ug and 60 ug; values in grams.
 */
async function smallNetwork() {
  const institute = await makeLaboratory(app, 'national institute');
  const laboratory = await makeLaboratory(app);
  const context = app.context();
  const weight = (laboratoryId: string, mark: string) =>
    registerStandard(context, {
      laboratoryId,
      registryNo: freeRegistryNo(),
      nominal: '1000',
      marking: mark,
      serial: null,
      shape: 'knob',
      material: 'stainless steel',
      class: null,
      density: null,
      manufacturer: null,
      inServiceFrom: '2019-01-01',
      intervalMonths: 24,
    });
  const [root, working, first, second] = [
    await weight(institute.id, 'R'),
    await weight(institute.id, 'W'),
    await weight(laboratory.id, 'A'),
    await weight(laboratory.id, 'B'),
  ];
  const issue = async (
    standardId: string,
    day: string,
    expandedU: string,
    local: number | null,
    leansOn: string | null,
    registeredById = institute.id,
  ) => {
    const issued = await issueCalibration(context, {
      issuerId: institute.id,
      registeredById,
      certificateNo: `T-${randomUUID().slice(0, 8)}`,
      issuedOn: day,
      performedBegin: day,
      performedEnd: day,
      method: 'ABBA',
      lines: [
        {
          standardId,
          quantity: 'mass',
          deviation: '0.00001',
          reportedUnit: 'mg',
          reportedDecimals: milligramDecimals(expandedU),
          expandedU,
          reportedUDecimals: milligramDecimals(expandedU),
          k: '2',
          rootKind: leansOn ? null : 'realization run',
          references: leansOn ? [{ valueUid: leansOn, sensitivity: 1, usedBegin: day, usedEnd: day }] : [],
          components:
            local === null
              ? []
              : [
                  {
                    name: 'weighing',
                    evaluation: 'A',
                    distribution: 'normal',
                    standardUncertainty: local,
                    sensitivity: 1,
                  },
                ],
        },
      ],
    });
    return { uid: issued.valueUids[0]!, revisionId: issued.revisionId };
  };
  const r = await issue(root.id, '2020-01-10', '0.000020', 1e-5, null);
  const w = await issue(working.id, '2020-02-10', '0.000045', 2e-5, r.uid);
  const a = await issue(first.id, '2020-03-10', '0.00021', 1e-4, w.uid, laboratory.id);
  const b = await issue(second.id, '2020-03-11', '0.00013', 6e-5, w.uid, laboratory.id);
  return {
    institute,
    laboratory,
    r,
    w,
    a,
    b,
    issueAgain: (day: string) => issue(first.id, day, '0.00021', 1e-4, w.uid, laboratory.id),
  };
}

/** A certificate prints value and U in milligrams to the same place. */
function milligramDecimals(grams: string): number {
  return grams.length - '0.000'.length;
}

const network = await smallNetwork();
const metrologist = await makePerson(app, 'metrologist', network.laboratory.id);
const institutes = await makePerson(app, 'metrologist', network.institute.id);
const stranger = await makePerson(app, 'metrologist', (await makeLaboratory(app)).id);

async function chain(person: typeof metrologist, uid: string, query = ''): Promise<ChainResponse> {
  const agent = await app.signIn(person);
  const reply = await agent.get(`/api/chains/${uid}${query}`);
  expect(reply.status, reply.text).toBe(200);
  return reply.body as ChainResponse;
}

describe('GET /api/chains/:valueUid', () => {
  it('is 401 without sign-in', async () => {
    expect((await app.request.get(`/api/chains/${network.a.uid}`)).status).toBe(401);
  });

  it('is 400 naming the day that is none', async () => {
    const agent = await app.signIn(metrologist);
    const reply = await agent.get(`/api/chains/${network.a.uid}?day=2025-02-30`);
    expect(reply.status).toBe(400);
    expect(reply.body.fields.day).toMatchObject({ received: '2025-02-30' });
  });

  it('is 404 for a value of others, and for one that does not exist', async () => {
    const agent = await app.signIn(stranger);
    expect((await agent.get(`/api/chains/${network.a.uid}`)).status).toBe(404);
    expect((await agent.get(`/api/chains/${randomUUID()}`)).status).toBe(404);
    expect((await agent.get('/api/chains/not-an-id')).status).toBe(404);
  });

  it('gives u, the share of the root and of each local part as worked out by hand', async () => {
    const reply = await chain(metrologist, network.a.uid);
    const u2 = 1e-10 + 4e-10 + 1e-8;
    expect(reply.uncertainty.standard! ** 2 / u2).toBeCloseTo(1, 12);
    expect(reply.rootShares).toEqual([{ uid: network.r.uid, share: expect.closeTo(1e-10 / u2, 12) }]);
    const shares = new Map(reply.contributions.map((row) => [row.uids[0], row.share]));
    expect(shares.get(network.a.uid)).toBeCloseTo(1e-8 / u2, 12);
    expect(shares.get(network.w.uid)).toBeCloseTo(4e-10 / u2, 12);
    const flow = reply.links.find((link) => link.childUid === network.a.uid)!.flow!;
    const local = reply.nodes.find((node) => node.uid === network.a.uid);
    expect(flow + (local?.type === 'value' ? local.localShare! : NaN)).toBeCloseTo(1, 12);
  });

  it('puts the focus in tier 0 and its root two tiers up', async () => {
    const reply = await chain(metrologist, network.a.uid);
    const tiers = Object.fromEntries(reply.nodes.map((node) => [node.uid, node.tier]));
    expect(tiers).toEqual({ [network.a.uid]: 0, [network.w.uid]: 1, [network.r.uid]: 2 });
  });

  it('says each rule once and refers every check to one', async () => {
    const reply = await chain(metrologist, network.a.uid);
    const ids = reply.rules.map((rule) => rule.id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const check of reply.checks) {
      const rule = reply.rules.find((candidate) => candidate.id === check.rule);
      expect(rule).toBeDefined();
      if (check.sentence !== null) expect(rule!.sentences[check.sentence]).toBeDefined();
    }
  });

  it('shows upstream of one’s own weight as a statement: no sheet, holder, budget or own words of its rules', async () => {
    const reply = await chain(metrologist, network.a.uid);
    const upstream = reply.nodes.find((node) => node.uid === network.r.uid)!;
    expect(upstream).toMatchObject({
      view: 'statement',
      revisionId: null,
      holder: null,
      uCarried: null,
      uNow: null,
    });
    const itsChecks = reply.checks.filter(
      (check) => check.subject.type === 'value' && check.subject.uid === network.r.uid,
    );
    expect(itsChecks.length).toBeGreaterThan(0);
    expect(
      itsChecks.every((check) => check.sentence === null && Object.keys(check.parameters).length === 0),
    ).toBe(true);
    expect(
      (await chain(institutes, network.w.uid)).nodes.every(
        (node) => node.type === 'source' || node.view === 'full',
      ),
    ).toBe(true);
  });

  it('opens a reference of one’s own weight, as a statement', async () => {
    const reply = await chain(metrologist, network.w.uid);
    expect(reply.nodes.find((node) => node.uid === network.w.uid)).toMatchObject({ view: 'statement' });
    expect(reply.improvements).toEqual([]);
  });

  it('names what stood of the weight on a day before the value was in force', async () => {
    const fresh = await smallNetwork();
    const person = await makePerson(app, 'metrologist', fresh.laboratory.id);
    const later = await fresh.issueAgain('2021-05-10');
    const before = await chain(person, later.uid, '?day=2021-05-09');
    expect(before.nodes.find((node) => node.uid === later.uid)).toMatchObject({ state: 'not yet in force' });
    const focus = before.nodes.find((node) => node.uid === later.uid);
    const earlier = (await chain(person, fresh.a.uid)).nodes.find((node) => node.uid === fresh.a.uid);
    expect(before.inForceInstead).toEqual({
      uid: fresh.a.uid,
      certificateNo: earlier?.type === 'value' ? earlier.certificateNo : undefined,
    });
    expect(focus?.type === 'value' && focus.certificateNo).not.toBe(before.inForceInstead!.certificateNo);
    expect((await chain(person, later.uid, '?day=2021-05-10')).inForceInstead).toBeNull();
    expect((await chain(person, fresh.a.uid, '?day=2020-03-09')).inForceInstead).toBeNull();
    expect((await chain(person, later.uid, '?known=2021-05-09')).inForceInstead).toBeNull();
  });

  it('names a later value that stands beside one in force, on the days when it does', async () => {
    const fresh = await smallNetwork();
    const person = await makePerson(app, 'metrologist', fresh.laboratory.id);
    const later = await fresh.issueAgain('2021-05-10');
    expect((await chain(person, fresh.a.uid)).newerInForce).toMatchObject({ uid: later.uid });
    expect((await chain(person, fresh.a.uid, '?day=2021-05-09')).newerInForce).toBeNull();
    expect((await chain(person, later.uid)).newerInForce).toBeNull();
  });

  it('finds the choice of a chain by its number in small letters, without the space', async () => {
    const agent = await app.signIn(metrologist);
    const node = (await chain(metrologist, network.a.uid)).nodes.find(({ uid }) => uid === network.a.uid)!;
    const number = node.registryNo!.toLowerCase().replaceAll(' ', '');
    const reply = await agent.get('/api/chains').query({ q: number });
    expect(reply.body.values.map((value: { uid: string }) => value.uid)).toEqual([network.a.uid]);
  });

  it('gives the covariance of two siblings: what they share', async () => {
    const agent = await app.signIn(metrologist);
    const reply = await agent.get(`/api/chains/${network.a.uid}/covariance/${network.b.uid}`);
    expect(reply.status).toBe(200);
    expect(reply.body.covariance / 5e-10).toBeCloseTo(1, 12);
    expect(reply.body.correlation).toBeCloseTo(5e-10 / Math.sqrt((5e-10 + 1e-8) * (5e-10 + 3.6e-9)), 12);
  });

  it('sees a withdrawal from the next question on: conduct stands, today does not', async () => {
    const fresh = await smallNetwork();
    const person = await makePerson(app, 'metrologist', fresh.laboratory.id);
    const before = await chain(person, fresh.a.uid);
    expect(before.nodes.find((node) => node.uid === fresh.w.uid)).toMatchObject({ state: 'in force' });
    await withdrawCalibration(app.context(), fresh.w.revisionId, {
      reason: 'damaged',
      effectiveOn: '2020-06-01',
    });
    const after = await chain(person, fresh.a.uid);
    expect(after.nodes.find((node) => node.uid === fresh.w.uid)).toMatchObject({
      state: 'withdrawn',
      stateSince: '2020-06-01',
    });
    const link = after.links.find((row) => row.childUid === fresh.a.uid)!;
    expect([link.conduct, link.today]).toEqual(['sound', 'broken']);
    const yesterday = await chain(person, fresh.a.uid, '?day=2020-05-31');
    expect(yesterday.inForceInstead).toBeNull();
    expect(yesterday.nodes.find((node) => node.uid === fresh.w.uid)).toMatchObject({ state: 'in force' });
  });
});

it('presents a chain in its final form: where only a sample is checked, the contract would change nothing', async () => {
  for (const person of [metrologist, institutes]) {
    const context = { ...app.context(person.user), user: person.user };
    const uid = person === metrologist ? network.a.uid : network.w.uid;
    const subject = await chainSubject(context, uid);
    const worked = await chainOf(context, storeOf(app.database), subject.id, {});
    const reply = presentChain(worked, person.user, subject);
    expect(ChainResponse.parse(reply)).toEqual(reply);
  }
});

import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { DistanceResponse } from '#shared/contracts/distance.ts';
import { withdrawCalibration } from '#server/modules/calibrations/index.ts';
import type { TogetherResponse } from '#shared/contracts/together.ts';
import {
  inputOf,
  lineOf,
  makeCalibration,
  makeStandard,
  useOf,
} from '#tests/support/calibration-factories.ts';
import { issueValue, makeDownstreamScene, type DownstreamScene } from '#tests/support/downstream-scene.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const today = new Date().toISOString().slice(0, 10);
const scene = await makeDownstreamScene(app);
const { root, working, homes, others } = scene;
type Who = keyof DownstreamScene['people'];
const agents = new Map<Who, Awaited<ReturnType<typeof app.signIn>>>();
for (const who of Object.keys(scene.people) as Who[]) agents.set(who, await app.signIn(scene.people[who]));

describe('GET /api/chains/:valueUid/distance', () => {
  const ask = async (who: Who, uid: string): Promise<DistanceResponse> => {
    const reply = await agents.get(who)!.get(`/api/chains/${uid}/distance`);
    expect(reply.status, reply.text).toBe(200);
    return reply.body as DistanceResponse;
  };

  it('is 401 without sign-in, 404 for what the person may not know', async () => {
    expect((await app.request.get(`/api/chains/${homes.uid}/distance`)).status).toBe(401);
    expect((await agents.get('stranger')!.get(`/api/chains/${homes.uid}/distance`)).status).toBe(404);
    expect((await agents.get('home')!.get(`/api/chains/${randomUUID()}/distance`)).status).toBe(404);
  });

  it('says how wrong each ancestor may be: 1.6 mg - 0.3 mg - 0.133 mg at a sensitivity of 1', async () => {
    const reply = await ask('home', homes.uid);
    expect(reply).toMatchObject({ because: null, class: 'E2', room: expect.closeTo(0.001167, 12) });
    expect(reply.ancestors.map((row) => row.uid)).toEqual([working.uid, root.uid]);
    for (const row of reply.ancestors) {
      expect(row).toMatchObject({
        sensitivity: 1,
        upwards: expect.closeTo(0.001167, 12),
        downwards: expect.closeTo(0.001433, 12),
        text: '1.1 mg',
      });
    }
  });

  it('has no limit for a reference used by its class limit', async () => {
    const value = await issueValue(app, {
      issuer: scene.home,
      holder: scene.home,
      day: '2024-06-10',
      deviation: '0.002',
      expandedU: '0.006',
      leansOn: homes.uid,
      usedAs: 'class limit',
      weightClass: 'M1',
    });
    const reply = await ask('home', value.uid);
    expect(reply.ancestors[0]).toMatchObject({ uid: homes.uid, sensitivity: 0, upwards: null, text: null });
  });

  it('says why there is no distance', async () => {
    const beyond = await issueValue(app, {
      issuer: scene.home,
      holder: scene.home,
      day: '2024-06-11',
      deviation: '0.0015',
      expandedU: '0.0004',
      leansOn: homes.uid,
    });
    const reply = await ask('home', beyond.uid);
    expect(reply.because).toContain('does not keep its class');
    expect(reply.room).toBeCloseTo(-0.0003, 12);
    expect(reply.ancestors).toEqual([]);
    const { id } = await makeStandard(app, scene.home.id);
    const issued = await makeCalibration(app, scene.home.id, '2024-06-12', [lineOf(id)]);
    expect((await ask('home', issued.valueUids[0]!)).because).toBe('Its certificate states no class.');
  });

  it('says what the value can still carry: U of its own at best, classes with U <= MPE/3', async () => {
    // 0.3 mg at 1 kg: above a third of E1's 0.5 mg, within a third of E2's 1.6 mg.
    const { reach } = await ask('home', homes.uid);
    expect(reach.bestExpandedU).toBeCloseTo(0.0003, 6);
    expect(reach.classes).toEqual(['E2', 'F1', 'F2', 'M1', 'M2', 'M3']);
    expect((await ask('institute', root.uid)).reach.classes[0]).toBe('E1');
  });

  it('tells the drift to its holder alone: it speaks of other calibrations of the weight', async () => {
    const again = await issueValue(app, {
      issuer: scene.institute,
      holder: scene.institute,
      day: '2023-02-10',
      deviation: '0.000010',
      expandedU: '0.0002',
      leansOn: null,
      standardId: working.standardId,
    });
    expect(again.uid).toBeTruthy();
    expect((await ask('institute', working.uid)).reach.drift).not.toBeNull();
    const { reach } = await ask('home', working.uid);
    expect(reach).toMatchObject({ drift: null, expandedUToday: null, until: [] });
    expect(reach.driftBecause).toContain('holder');
  });

  it('says that no drift is known of a weight calibrated once', async () => {
    const { reach } = await ask('home', homes.uid);
    expect(reach).toMatchObject({ drift: null, expandedUToday: null, until: [] });
    expect(reach.driftBecause).toMatch(/^No drift known/);
  });

  it('says until when each class can be reached, by the line through two calibrations of one epoch', async () => {
    const { home } = scene;
    const parts = { issuer: home, holder: home, expandedU: '0.00001', leansOn: null };
    const first = await issueValue(app, { ...parts, day: '2020-01-01', deviation: '0.0001' });
    const again = { ...parts, day: '2024-01-01', deviation: '0.0003', standardId: first.standardId };
    const { uid } = await issueValue(app, again);
    const { reach } = await ask('home', uid);
    expect(reach.drift).toMatchObject({ from: 'calibrations', calibrations: 2 });
    // 0.2 mg in four years; the two u of 5 ug are independent: 0.005 * sqrt(2) / 4 mg in the slope.
    expect(reach.drift!.perYear / (0.0002 / 4)).toBeCloseTo(1, 3);
    expect(reach.drift!.u / ((0.000005 * Math.SQRT2) / 4)).toBeCloseTo(1, 3);
    const last = Object.fromEntries(reach.until.map((row) => [row.class, row.last]));
    expect(reach.until.map((row) => row.class)).toEqual(reach.classes);
    // E1: a third of 0.5 mg is 0.1667 mg, less U = 0.01 mg, at 50 ug a year: a little over three years.
    expect(last.E1).toMatch(/^2027-0[12]/);
    expect(last.E2! > last.E1!).toBe(true);
    expect(last.M3).toBeNull();
    expect(reach.expandedUToday!).toBeGreaterThan(reach.bestExpandedU!);
    expect(reach.until.every(({ last, isPast }) => isPast === (last !== null && last < today))).toBe(true);
    expect(reach.reserves).toEqual([]);
  });

  it('has a reserve where the drift counts a value whose sign does not fit the others', async () => {
    const parts = { issuer: scene.home, holder: scene.home, expandedU: '0.00001', leansOn: null };
    const first = await issueValue(app, { ...parts, day: '2020-01-01', deviation: '0.0003' });
    const further = { ...parts, standardId: first.standardId };
    await issueValue(app, { ...further, day: '2021-01-01', deviation: '-0.0003' });
    const { uid } = await issueValue(app, { ...further, day: '2022-01-01', deviation: '0.0003' });
    const { reach } = await ask('home', uid);
    expect(reach.reserves).toEqual([expect.stringContaining('(B-17)')]);
  });

  it('has a reserve where what it rests on was withdrawn', async () => {
    const parts = { issuer: scene.home, holder: scene.home, expandedU: '0.0003', deviation: '0.0001' };
    const above = await issueValue(app, { ...parts, day: '2023-01-01', leansOn: null });
    const { uid } = await issueValue(app, { ...parts, day: '2023-02-01', leansOn: above.uid });
    expect((await ask('home', uid)).reach.reserves).toEqual([]);
    await withdrawCalibration(app.context(), above.revisionId, {
      reason: 'The balance was found faulty',
      effectiveOn: '2023-03-01',
    });
    expect((await ask('home', uid)).reach.reserves).toEqual([expect.stringContaining('withdrawn since')]);
    expect((await ask('home', above.uid)).reach.reserves[0]).toContain('itself withdrawn');
  });
});

describe('POST /api/chains/together', () => {
  const send = (who: Who, body: object) => agents.get(who)!.post('/api/chains/together').send(body);
  const ask = async (who: Who, body: object): Promise<TogetherResponse> => {
    const reply = await send(who, body);
    expect(reply.status, reply.text).toBe(200);
    return reply.body as TogetherResponse;
  };

  it('is 401 without sign-in', async () => {
    const body = { valueUids: [homes.uid, others.uid] };
    expect((await app.request.post('/api/chains/together').send(body)).status).toBe(401);
  });

  it.each([
    [{ valueUids: [homes.uid] }, 'valueUids'],
    [{ valueUids: [homes.uid, homes.uid] }, 'valueUids'],
    [{ valueUids: [homes.uid, others.uid], signs: [1] }, 'signs'],
    [{ valueUids: [homes.uid, others.uid], signs: [1, 2] }, 'signs.1'],
  ])('is 400 for %o', async (body, field) => {
    const reply = await send('institute', body);
    expect(reply.status).toBe(400);
    expect(Object.keys(reply.body.fields)).toEqual([field]);
  });

  it('is 404 where one of them may not be known', async () => {
    expect((await send('home', { valueUids: [homes.uid, others.uid] })).status).toBe(404);
  });

  it('gives covariance, r, and u of sum and difference of two that share a working standard', async () => {
    const reply = await ask('institute', { valueUids: [homes.uid, others.uid], signs: [1, -1] });
    // What they share is the working standard's variance: u 0.1 mg; each has u 0.15 mg.
    const [own, shared] = [0.00015 ** 2, 0.0001 ** 2];
    const tolerance = 7;
    expect(reply.covariance[0]![1]! / shared).toBeCloseTo(1, tolerance);
    expect(reply.covariance[0]![0]! / own).toBeCloseTo(1, tolerance);
    expect(reply.correlation[1]![0]!).toBeCloseTo(shared / own, tolerance);
    expect(reply.sum.u! / Math.sqrt(2 * own + 2 * shared)).toBeCloseTo(1, tolerance);
    expect(reply.signed.u! / Math.sqrt(2 * own - 2 * shared)).toBeCloseTo(1, tolerance);
    expect(reply.sum.linear! / 0.0003).toBeCloseTo(1, tolerance);
    expect(reply.undeclared).toEqual([]);
    const common = reply.shared.filter((row) => row.type === 'value').map((row) => row.uid);
    expect(common).toEqual([root.uid, working.uid]);
  });

  it('gives the bound where one certificate states no covariance of its two results', async () => {
    const [first, second] = [await makeStandard(app, scene.home.id), await makeStandard(app, scene.home.id)];
    const references = [useOf(homes.uid, '2024-07-10')];
    const input = inputOf(scene.home.id, '2024-07-10', [
      lineOf(first.id, { references }),
      lineOf(second.id, { references }),
    ]);
    const { valueUids } = await makeCalibration(app, scene.home.id, '2024-07-10', input.lines);
    const reply = await ask('home', { valueUids });
    expect(reply.covariance[0]![1]).toBeNull();
    expect(reply.correlation[0]![1]).toBeNull();
    expect(reply.undeclared).toEqual([{ pair: [0, 1], because: expect.stringContaining('no covariance') }]);
    expect(reply.sum.u).toBeNull();
    // Each u is 0.25 mg; shared 0.15 mg in u, local parts at r = 1: the whole is linear.
    expect(reply.sum.bound! / 0.0005).toBeCloseTo(1, 6);
    // In a difference the shared part cancels and the local parts add.
    const difference = await ask('home', { valueUids, signs: [1, -1] });
    expect(difference.signed.bound! / (2 * Math.sqrt(0.00025 ** 2 - 0.00015 ** 2))).toBeCloseTo(1, 6);
  });

  it('adds the masses with their signs, and says what each weight is', async () => {
    const reply = await ask('institute', { valueUids: [homes.uid, others.uid], signs: [1, -1] });
    expect(reply.sum.total).toBe('2000.000277');
    expect(reply.signed.total).toBe('-0.000011');
    expect(reply.weights).toMatchObject([
      { registryNo: homes.registryNo, nominal: '1000', deviation: homes.deviation, k: '2' },
      { registryNo: others.registryNo, certificateNo: others.certificateNo },
    ]);
  });

  it('never adds a mass to a conventional mass, and says so', async () => {
    const { id } = await makeStandard(app, scene.home.id);
    const issued = await makeCalibration(app, scene.home.id, '2024-07-12', [
      lineOf(id, { quantity: 'mass' }),
    ]);
    const reply = await ask('home', { valueUids: [homes.uid, issued.valueUids[0]!] });
    expect(reply.notAdded).toContain('not added');
    expect(reply.sum).toEqual({ u: null, bound: null, linear: null, total: null });
  });

  it('answers one who sees a reference as a statement', async () => {
    const reply = await ask('home', { valueUids: [homes.uid, working.uid] });
    expect(reply.shared.map((row) => row.uid)).toContain(working.uid);
    expect(reply.correlation[0]![1]! / (0.0001 / 0.00015)).toBeCloseTo(1, 7);
  });
});

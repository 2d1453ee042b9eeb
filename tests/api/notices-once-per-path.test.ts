import { describe, expect, it } from 'vitest';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { WhatIfResponse } from '#shared/contracts/downstream.ts';
import type { NoticeResponse } from '#shared/contracts/notices.ts';
import { lineOf, makeCalibration, makeStandard, useOf } from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson } from '#tests/support/factories.ts';
import { makeNotice, makeScale, termOf } from '#tests/support/notice-scene.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();

/** Grams at 1 kg: what the notice shifts, and what it adds to the standard uncertainty. */
const SHIFT = -0.00002;
const ADDED = 0.00003;

/**
 * Weights of 1 kg: a grandparent, two parents, and a child that rests on each parent by half. The notice covers what
 * was determined until 2012, and so the grandparent and the first parent; where `isChildCovered`, the child too.
 */
async function diamond(above: 'one grandparent' | 'two grandparents', isChildCovered: boolean) {
  const institute = await makeLaboratory(app, 'national institute');
  const value = async (day: string, expandedU: string, references: [uid: string, sensitivity: number][]) => {
    const standard = await makeStandard(app, institute.id, { inServiceFrom: '2010-01-01' });
    const uses = references.map(([uid, sensitivity]) => useOf(uid, day, sensitivity));
    const line = lineOf(standard.id, { expandedU, ...(uses.length > 0 && { references: uses }) });
    return (await makeCalibration(app, institute.id, day, [line])).valueUids[0]!;
  };
  const grandparent = await value('2010-03-01', '0.0001', []);
  const first = await value('2011-03-01', '0.0002', [[grandparent, 1]]);
  const aside = above === 'one grandparent' ? grandparent : await value('2015-03-01', '0.0001', []);
  const second = await value('2016-03-01', '0.0002', [[aside, 1]]);
  const child = await value('2020-03-01', '0.0004', [
    [first, 0.5],
    [second, 0.5],
  ]);
  const terms = [
    { ...termOf(String(SHIFT), ADDED), performedTo: '2012-12-31' },
    ...(isChildCovered ? [{ ...termOf(String(SHIFT), ADDED), performedFrom: '2020-01-01' }] : []),
  ];
  const scale = await makeScale(app);
  const agent = await app.signIn(await makePerson(app, 'metrologist', institute.id));
  // What the same notice would do, asked before there is one; a dry run knows one term only.
  const question = { by: 'year', group: '2020', changes: [supposed(institute.id)] };
  const dryRun = await agent.post('/api/what-if').send(question);
  expect(dryRun.status, dryRun.text).toBe(200);
  const notice = await makeNotice(app, institute.id, scale.id, { terms });
  const chainOf = async (uid: string) => {
    const reply = await agent.get(`/api/chains/${uid}`);
    expect(reply.status, reply.text).toBe(200);
    return reply.body as ChainResponse;
  };
  const page = (await agent.get(`/api/notices/${notice.id}`)).body as NoticeResponse;
  return {
    ...{ chainOf, page, first, second, child },
    dryRun: dryRun.body as WhatIfResponse,
  };
}

function supposed(issuerId: string) {
  return {
    kind: 'notice',
    issuerId,
    shiftPerKilogram: [{ on: '2000-01-01', shift: String(SHIFT) }],
    addedUPerKilogram: ADDED,
    performedTo: '2012-12-31',
  };
}

type Diamond = Awaited<ReturnType<typeof diamond>>;

/** What is held to have come to a value: in its chain as now known, and on the notice's page. */
async function broughtTo({ chainOf, page }: Diamond, uid: string) {
  const chain = await chainOf(uid);
  const row = page.rows.find(
    (each): each is typeof each & { view: 'full' } => each.view === 'full' && each.uid === uid,
  );
  return {
    shift: Number(chain.asNowKnown?.shift ?? 0),
    onPage: Number(row?.shift ?? 0),
    addedOnPage: row?.addedU ?? 0,
    variance: chain.uncertainty.standard! ** 2,
  };
}

/** Of the child: shift and added u by hand, and the variance that its certificate states. */
async function expectChild(made: Diamond, shift: number, added: number) {
  const brought = await broughtTo(made, made.child);
  expect(brought.shift).toBeCloseTo(shift, 15);
  expect(brought.onPage).toBeCloseTo(shift, 15);
  expect(brought.addedOnPage).toBeCloseTo(added, 15);
  // Stated: U = 0.4 mg, k = 2. The notice is one effect more, whatever its paths.
  expect(brought.variance / (0.0002 ** 2 + added ** 2)).toBeCloseTo(1, 12);
}

describe('a notice that covers a grandparent and one parent', () => {
  it('reaches the covered parent once, though it could come over two ways', async () => {
    const made = await diamond('one grandparent', false);
    const brought = await broughtTo(made, made.first);
    expect(brought.shift).toBeCloseTo(SHIFT, 15);
    expect(brought.variance / (0.0001 ** 2 + ADDED ** 2)).toBeCloseTo(1, 12);
  });

  it('comes to the child whole: half over each parent, and the halves add up as one effect', async () => {
    const made = await diamond('one grandparent', false);
    await expectChild(made, 0.5 * SHIFT + 0.5 * SHIFT, 0.5 * ADDED + 0.5 * ADDED);
    const row = made.dryRun.page!.rows.find((each) => each.view === 'full');
    expect(row!.shift).toBeCloseTo(SHIFT, 15);
    expect(row!.expandedUAfter! / (2 * Math.hypot(0.0002, ADDED))).toBeCloseTo(1, 12);
  });

  it('comes by half where the other parent rests on what the notice leaves alone', async () => {
    const made = await diamond('two grandparents', false);
    await expectChild(made, 0.5 * SHIFT, 0.5 * ADDED);
    expect((await broughtTo(made, made.second)).shift).toBe(0);
  });

  it('enters at a covered child for the part only that did not come from above', async () => {
    const made = await diamond('two grandparents', true);
    await expectChild(made, SHIFT, ADDED);
  });

  it('does not enter again at a covered child that has all of it from above', async () => {
    const made = await diamond('one grandparent', true);
    await expectChild(made, SHIFT, ADDED);
  });
});

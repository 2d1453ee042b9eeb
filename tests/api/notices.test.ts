import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { NoticeResponse } from '#shared/contracts/notices.ts';
import { readRow } from '#server/db/read.ts';
import { chainOf, noticeShifts, storeOf } from '#server/modules/chains/index.ts';
import { verifyRecord } from '#server/modules/record/index.ts';
import { makeLaboratory, makePerson } from '#tests/support/factories.ts';
import { issueValue, makeDownstreamScene, type DownstreamScene } from '#tests/support/downstream-scene.ts';
import { makeNotice, makeScale, noticeBody, termOf } from '#tests/support/notice-scene.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const scene = await makeDownstreamScene(app);
const scale = await makeScale(app);
const signatory = await makePerson(app, 'signatory', scene.institute.id);
const agent = await app.signIn(signatory);

type Body = Record<string, unknown>;
const post = (changes: Body = {}, who = agent) =>
  who
    .post('/api/notices')
    .send({ ...noticeBody(scene.institute.id, scale.id), password: signatory.password, ...changes });

/** An institute of its own, so that what one test publishes moves no value of another. */
async function ownScene(): Promise<DownstreamScene> {
  return makeDownstreamScene(app);
}

async function chainAt(id: number, day?: string, known?: string) {
  return chainOf(app.context(), storeOf(app.database), id, { day, known });
}

describe('POST /api/notices', () => {
  it('is 401 without sign-in, 403 for who is no signatory of the issuer', async () => {
    expect((await post({}, app.request)).status).toBe(401);
    const metrologist = await app.signIn(scene.people.institute);
    expect((await post({ password: scene.people.institute.password }, metrologist)).status).toBe(403);
    const registrar = await app.signIn(scene.people.registrar);
    expect((await post({ password: scene.people.registrar.password }, registrar)).status).toBe(403);
  });

  it('asks for the password again, and publishes nothing without it', async () => {
    const acts = () => readRow<{ n: number }>(app.database, 'SELECT COUNT(*) AS n FROM notice');
    const before = await acts();
    const reply = await post({ password: 'a guess' });
    expect(reply.status).toBe(422);
    expect(reply.body.fields.password.message).toContain('Nothing was published.');
    expect(await acts()).toEqual(before);
  });

  it.each<[string, Body, string]>([
    ['no terms', { terms: [] }, 'terms'],
    ['no shift on any day', { terms: [{ shiftPerKilogram: [] }] }, 'terms.0.shiftPerKilogram'],
    [
      'days out of order',
      {
        terms: [
          {
            shiftPerKilogram: [
              { on: '2020-01-02', shift: '1' },
              { on: '2020-01-01', shift: '1' },
            ],
          },
        ],
      },
      'terms.0.shiftPerKilogram',
    ],
    ['a shift in another unit', { terms: [termOf('-20')] }, 'terms.0.shiftPerKilogram.0.shift'],
    ['a shift that is no number', { terms: [termOf('a lot')] }, 'terms.0.shiftPerKilogram.0.shift'],
    [
      'a nominal that is no number',
      { terms: [{ ...termOf('1'), nominalFrom: '1 kg', nominalTo: '5' }] },
      'terms.0.nominalFrom',
    ],
    ['terms that are none', { terms: [null] }, 'terms.0'],
    [
      'a shift as a number',
      { terms: [{ shiftPerKilogram: [{ on: '2020-01-01', shift: 1 }] }] },
      'terms.0.shiftPerKilogram.0.shift',
    ],
    ['an uncertainty below zero', { terms: [termOf('0', -1)] }, 'terms.0.addedUPerKilogram'],
    [
      'reversed days',
      { terms: [{ ...termOf('1'), performedFrom: '2020-02-01', performedTo: '2020-01-01' }] },
      'terms.0.performedFrom',
    ],
    [
      'reversed nominals',
      { terms: [{ ...termOf('1'), nominalFrom: '20', nominalTo: '10' }] },
      'terms.0.nominalFrom',
    ],
    ['an unknown kind', { kind: 'wish' }, 'kind'],
    ['no number', { number: ' ' }, 'number'],
    ['no reason', { reason: '' }, 'reason'],
    ['a day that is none', { effectiveOn: '2025-02-30' }, 'effectiveOn'],
    ['an unknown field', { withdrawn: true }, 'withdrawn'],
    ['half a character', { title: 'a\ud800' }, 'title'],
    [
      'a scale version named and made',
      { toScaleId: randomUUID(), newScale: { name: 'x', basis: 'y', validFrom: '2020-01-01' } },
      'newScale',
    ],
  ])('is 400 for %s', async (_, changes, field) => {
    const reply = await post(changes);
    expect(reply.status, reply.text).toBe(400);
    expect(Object.keys(reply.body.fields)).toEqual([field]);
  });

  it.each<[string, () => Body, string, string]>([
    ['made known tomorrow', () => ({ madeKnownOn: '2999-01-01' }), 'madeKnownOn', '2999-01-01'],
    ['a scale version that is not there', () => ({ fromScaleId: UNKNOWN }), 'fromScaleId', UNKNOWN],
    ['a scale that leads to itself', () => ({ toScaleId: scale.id }), 'toScaleId', scale.id],
    [
      'a name that is taken',
      () => ({ newScale: { name: scale.name, basis: 'b', validFrom: '2025-01-01' } }),
      'newScale.name',
      scale.name,
    ],
    ['nothing moved', () => ({ terms: [termOf('0.000')] }), 'terms.0.shiftPerKilogram', '0'],
    [
      'lines that overlap',
      () => ({ terms: [termOf('1'), termOf('0.5')] }),
      'terms.1.performedFrom',
      'the beginning to any day',
    ],
    ['a notice to replace that is not there', () => ({ replacesId: UNKNOWN }), 'replacesId', UNKNOWN],
  ])('is 422 for %s, with the value received', async (_, changes, field, received) => {
    const reply = await post(changes());
    expect(reply.status, reply.text).toBe(422);
    expect(Object.keys(reply.body.fields)).toEqual([field]);
    expect(reply.body.fields[field].received).toBe(received);
  });

  it('is 422 for a laboratory that is no national institute', async () => {
    const person = await makePerson(app, 'signatory', scene.home.id);
    const reply = await post(
      { issuerId: scene.home.id, password: person.password },
      await app.signIn(person),
    );
    expect(reply.status).toBe(422);
    expect(reply.body.fields.issuerId.message).toContain('published by the national institute');
  });

  it('publishes, records one act, and says where a back-dated one is', async () => {
    const other = await makeScale(app);
    const reply = await post({ fromScaleId: other.id, effectiveOn: '2024-10-31' });
    expect(reply.status, reply.text).toBe(201);
    expect(reply.body).toMatchObject({ isBackDated: true, newScaleId: null });
    const act = await readRow<{ kind: string; content: string }>(
      app.database,
      'SELECT kind, content FROM act WHERE subject_id = :id',
      { id: reply.body.id },
    );
    expect(act!.kind).toBe('notice.publish');
    expect(act!.content).not.toContain(signatory.password);
    const shown = await agent.get(`/api/notices/${reply.body.id}`);
    expect(shown.body).toMatchObject({
      isBackDated: true,
      state: 'in force',
      abilities: { 'notice:publish': true },
    });
  });

  it('makes the scale version that it leads to in the same act', async () => {
    const other = await makeScale(app);
    const name = `${other.name} b`;
    const newScale = { name, basis: 'a consensus value', validFrom: '2025-01-01' };
    const reply = await post({ fromScaleId: other.id, kind: 'consensus value', newScale });
    expect(reply.status, reply.text).toBe(201);
    const { body } = await agent.get('/api/scale-versions');
    expect(body.scaleVersions).toContainEqual({
      id: reply.body.newScaleId,
      ...newScale,
      validTo: null,
      values: 0,
    });
    const scaleAct = await readRow<{ kind: string }>(
      app.database,
      'SELECT a.kind FROM scale_version s JOIN act a ON a.seq = s.act_seq WHERE s.id = :id',
      { id: reply.body.newScaleId },
    );
    expect(scaleAct!.kind).toBe('notice.publish');
  });

  it('refuses a number twice, and the same values twice by one kind; a later notice replaces it', async () => {
    const own = await makeScale(app);
    const first = await post({ fromScaleId: own.id, number: `A ${own.name}` });
    expect(first.status).toBe(201);
    expect((await post({ fromScaleId: own.id, number: `A ${own.name}` })).status).toBe(409);
    const again = { fromScaleId: own.id, number: `B ${own.name}`, effectiveOn: '2025-06-01' };
    const refused = await post(again);
    expect(refused.status).toBe(422);
    expect(refused.body.fields['terms.0.performedFrom'].message).toContain(
      'moved twice. Replace that notice',
    );
    expect((await post({ ...again, kind: 'uncertainty added', terms: [termOf('0', 1e-5)] })).status).toBe(
      201,
    );
    const early = await post({
      ...again,
      number: `C ${own.name}`,
      replacesId: first.body.id,
      effectiveOn: '2024-12-31',
    });
    expect(Object.keys(early.body.fields)).toEqual(['effectiveOn']);
    const later = await post({ ...again, number: `D ${own.name}`, replacesId: first.body.id });
    expect(later.status, later.text).toBe(201);
    const shown = (await agent.get(`/api/notices/${first.body.id}`)).body as NoticeResponse;
    expect(shown).toMatchObject({ state: 'replaced', replacedBy: { id: later.body.id } });
    const secondEnd = await post({ ...again, number: `E ${own.name}`, replacesId: first.body.id });
    expect(Object.keys(secondEnd.body.fields)).toEqual(['replacesId']);
  });

  it('of two that replace one notice at once, one is published', async () => {
    const own = await makeScale(app);
    const first = await post({ fromScaleId: own.id });
    const replies = await Promise.all(
      ['X', 'Y'].map((letter) =>
        post({ fromScaleId: own.id, number: `${letter} ${own.name}`, replacesId: first.body.id }),
      ),
    );
    expect(replies.map((reply) => reply.status).sort()).toEqual([201, 422]);
  });
});

const UNKNOWN = '01900000-0000-7000-8000-000000000001';

describe('a notice in the chain', () => {
  it('is one source, enters once on the oldest covered value and reaches the end with its mass over 1 kg', async () => {
    const own = await ownScene();
    const before = await chainAt(own.below.id);
    const uBefore = before.numbers.propagation.standardUncertainty!;
    const { id } = await makeNotice(app, own.institute.id, scale.id, {
      terms: [termOf('-0.00002', 0.00003)],
    });
    const after = await chainAt(own.below.id);
    const u = after.numbers.propagation.standardUncertainty!;
    expect(u ** 2 - uBefore ** 2).toBeCloseTo(0.00003 ** 2, 16);
    const carrying = after.closure.values.filter((value) =>
      value.sources.some((link) => after.closure.sources.get(link.sourceId)!.uid === id),
    );
    expect(carrying.map((value) => value.uid)).toEqual([own.root.uid]);
    expect(after.numbers.varianceAsCertified(own.below.uid)).toBeCloseTo(uBefore ** 2, 16);
    // What certificates carry is not judged by what was published since.
    const failing = after.judgement.checks.filter(
      ({ outcome, rule }) => outcome === 'fails' && rule !== 'B-24',
    );
    const failingBefore = before.judgement.checks.filter(({ outcome }) => outcome === 'fails');
    expect(failing.map(({ rule }) => rule)).toEqual(failingBefore.map(({ rule }) => rule));
  });

  it('is in the reply as a source of the kind scale version, with its u for everybody to read', async () => {
    const own = await ownScene();
    const { id, number } = await makeNotice(app, own.institute.id, scale.id, {
      terms: [termOf('-0.00002', 0.00003)],
    });
    const customer = await app.signIn(own.people.customer);
    const { body } = await customer.get(`/api/chains/${own.below.uid}`);
    const node = body.nodes.find(({ uid }: { uid: string }) => uid === id);
    expect(node).toMatchObject({ type: 'source', kind: 'scale version', u: 0.00003, unit: 'g' });
    expect(node.name).toBe(`${number}, The maintained unit is corrected`);
    expect(node.share).toBeCloseTo((0.00003 / body.uncertainty.standard) ** 2, 8);
    const links = body.links.filter(({ parentUid }: { parentUid: string }) => parentUid === id);
    expect(links).toMatchObject([{ childUid: own.root.uid, role: 'source', sensitivity: 1 }]);
  });

  it('counts from its effective day, as known on the knowledge day', async () => {
    const own = await ownScene();
    const ahead = await makeNotice(app, own.institute.id, scale.id, {
      effectiveOn: '2099-01-01',
      terms: [termOf('0', 0.0001)],
    });
    const sourcesOn = async (day?: string, known?: string) => {
      const chain = await chainAt(own.below.id, day, known);
      return [...chain.closure.sources.values()].some(({ uid }) => uid === ahead.id);
    };
    expect(await sourcesOn()).toBe(false);
    expect(await sourcesOn('2098-12-31', '2099-01-01')).toBe(false);
    expect(await sourcesOn('2099-01-01', '2099-01-01')).toBe(true);
    expect(await sourcesOn('2099-01-01', '2020-01-01')).toBe(false);
    const replacing = await makeNotice(app, own.institute.id, scale.id, {
      effectiveOn: '2099-06-01',
      replacesId: ahead.id,
      terms: [termOf('0', 0.00002)],
    });
    expect(await sourcesOn('2099-05-31', '2099-06-01')).toBe(true);
    expect(await sourcesOn('2099-06-01', '2099-06-01')).toBe(false);
    const chain = await chainAt(own.below.id, '2099-06-01', '2099-06-01');
    expect([...chain.closure.sources.values()].map(({ uid }) => uid)).toContain(replacing.id);
  });

  it('covers values of its issuer only: a chain of another institute is as it was', async () => {
    const own = await ownScene();
    const other = await ownScene();
    const before = await chainAt(other.below.id);
    await makeNotice(app, own.institute.id, scale.id, { terms: [termOf('0', 0.001)] });
    const after = await chainAt(other.below.id);
    expect(after.numbers.propagation.standardUncertainty).toBe(
      before.numbers.propagation.standardUncertainty,
    );
    expect(after.closure.sources.size).toBe(before.closure.sources.size);
  });

  it('does not shift a result a second time that used the corrected value, and keeps its uncertainty', async () => {
    const own = await ownScene();
    const notice = await makeNotice(app, own.institute.id, scale.id, {
      terms: [termOf('-0.00002', 0.00003)],
    });
    const sheet = { issuer: own.home, holder: own.home, deviation: '0.0001', expandedU: '0.0004' };
    const [printed, corrected] = [
      await issueValue(app, { ...sheet, day: '2025-03-01', leansOn: own.homes.uid }),
      await issueValue(app, { ...sheet, day: '2025-03-01', leansOn: own.homes.uid, usedAs: 'by notice' }),
    ];
    const findings = async (id: number, uid: string) => {
      const chain = await chainAt(id);
      const { shift, u } = noticeShifts(chain.closure, storeOf(app.database).notices).get(uid)![0]!;
      const check = chain.judgement.checks.find(
        ({ rule, subject, verdict }) =>
          rule === 'B-24' && verdict === 'conduct' && subject.type === 'link' && subject.childUid === uid,
      )!;
      return { shift, u, outcome: check.outcome, severity: check.severity, text: check.parameters.notices };
    };
    expect(await findings(printed.id, printed.uid)).toMatchObject({
      shift: -0.00002,
      u: 0.00003,
      outcome: 'fails',
      // 30 ug and 20 ug beside u = 200 ug: 1.6 % of u.
      severity: 'information',
      text: notice.number,
    });
    expect(await findings(corrected.id, corrected.uid)).toMatchObject({
      shift: 0,
      u: 0.00003,
      outcome: 'holds',
    });
  });

  it('fixes on the link what was used by notice, and infers the local part with its u', async () => {
    const own = await ownScene();
    await makeNotice(app, own.institute.id, scale.id, { terms: [termOf('-0.00002', 0.00003)] });
    const used = await issueValue(app, {
      issuer: own.home,
      holder: own.home,
      day: '2025-03-01',
      deviation: '0.0001',
      expandedU: '0.0004',
      leansOn: own.homes.uid,
      usedAs: 'by notice',
    });
    const link = await readRow<Record<string, string>>(
      app.database,
      'SELECT used_deviation AS deviation, used_expanded_u AS expandedU, used_k AS k FROM value_link WHERE child_id = :id',
      { id: used.id },
    );
    // Home's reference: 133 ug, u = 150 ug.
    expect(Number(link!.deviation)).toBeCloseTo(0.000113, 12);
    expect(Number(link!.expandedU)).toBeCloseTo(2 * Math.hypot(0.00015, 0.00003), 11);
    expect(Number(link!.k)).toBe(2);
    const chain = await chainAt(used.id);
    // Its U is what its chain gives, the notice counted once.
    expect(2 * chain.numbers.propagation.standardUncertainty!).toBeCloseTo(0.0004, 9);
    expect(
      chain.judgement.checks.filter(({ rule, outcome }) => rule === 'B-21' && outcome === 'fails'),
    ).toEqual([]);
  });

  it('is missed once: what leans on the result that left it out is not asked again', async () => {
    const own = await ownScene();
    await makeNotice(app, own.institute.id, scale.id, { terms: [termOf('-0.0002')] });
    const parts = { issuer: own.home, holder: own.home, deviation: '0.0001', expandedU: '0.0004' };
    const first = await issueValue(app, { ...parts, day: '2025-03-01', leansOn: own.homes.uid });
    const second = await issueValue(app, {
      ...parts,
      day: '2025-04-01',
      leansOn: first.uid,
      weightClass: 'M1',
    });
    const chain = await chainAt(second.id);
    const failing = chain.judgement.checks.filter(
      ({ rule, outcome }) => rule === 'B-24' && outcome === 'fails',
    );
    expect(failing.map(({ subject, verdict }) => [subject, verdict])).toEqual([
      [{ type: 'link', childUid: first.uid, parentUid: own.homes.uid }, 'conduct'],
      [{ type: 'link', childUid: first.uid, parentUid: own.homes.uid }, 'today'],
    ]);
    const shifts = noticeShifts(chain.closure, storeOf(app.database).notices);
    expect(shifts.get(second.uid)![0]!.shift).toBeCloseTo(-0.0002, 12);
  });
});

describe('the record', () => {
  it('finds a notice, a term or a shift that was changed behind the product', async () => {
    const own = await makeScale(app);
    const { id } = await makeNotice(app, scene.institute.id, own.id);
    const { seq } = (await readRow<{ seq: number }>(
      app.database,
      'SELECT act_seq AS seq FROM notice WHERE id = :id',
      { id },
    ))!;
    const problems = async () =>
      (await verifyRecord(app.database)).problems
        .filter(({ actSeq }) => actSeq === seq)
        .map(({ where }) => where);
    expect(await problems()).toEqual([]);
    await app.owner.query(`UPDATE notice SET effective_on = '2026-01-01' WHERE id = '${id}'`);
    expect(await problems()).toEqual(['notice']);
    await app.owner.query(`UPDATE notice_term SET added_u = 1e-5 WHERE notice_id = '${id}'`);
    await app.owner.query(`UPDATE notice_shift SET shift = -0.00001 WHERE notice_id = '${id}'`);
    expect((await problems()).sort()).toEqual(['notice', 'notice_shift', 'notice_term']);
  });
});

describe('GET /api/notices', () => {
  it('names the institutes in whose name a person may publish', async () => {
    expect((await agent.get('/api/notices')).body.publishesFor).toEqual([scene.institute]);
    const home = await app.signIn(scene.people.home);
    expect((await home.get('/api/notices')).body.publishesFor).toEqual([]);
  });

  it('is 404 for a notice that is not there', async () => {
    const { id } = await makeLaboratory(app);
    expect((await agent.get(`/api/notices/${id}`)).status).toBe(404);
    expect((await agent.get('/api/notices/none')).status).toBe(404);
  });
});

import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { AuditFindingsResponse, AuditListResponse, AuditResponse } from '#shared/contracts/audits.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { withdrawCalibration } from '#server/modules/calibrations/index.ts';
import { chainOf, storeOf } from '#server/modules/chains/index.ts';
import { addJob, auditJob, stopJob } from '#server/modules/audits/audit-job.queries.ts';
import { AuditRunner } from '#server/modules/audits/audit-runner.ts';
import { auditRunnerOf } from '#server/modules/audits/index.ts';
import { performAudit } from '#server/modules/audits/perform-audit.ts';
import { storeAudit } from '#server/modules/audits/store-audit.service.ts';
import { verifyRecord } from '#server/modules/record/index.ts';
import { inputOf, lineOf, makeStandard, useOf } from '#tests/support/calibration-factories.ts';
import { issueCalibration } from '#server/modules/calibrations/index.ts';
import { issueValue } from '#tests/support/downstream-scene.ts';
import { makeLaboratory, makePerson, type TestPerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const runner = auditRunnerOf(app.context());

type Agent = Awaited<ReturnType<typeof app.signIn>>;

/**
 * The institute's root and its working standard; home's reference from it, and home's own weight from that; a weight
 * of another laboratory from the same working standard. The working standard states less than it carries, and home uses
 * its reference after the two years of its own programme.
 */
async function makeNetwork() {
  const [institute, home, other] = [
    await makeLaboratory(app, 'national institute'),
    await makeLaboratory(app),
    await makeLaboratory(app),
  ];
  const at = { deviation: '0.000011', expandedU: '0.0004' };
  const root = await issueValue(app, {
    ...at,
    issuer: institute,
    holder: institute,
    day: '2023-01-10',
    leansOn: null,
  });
  const working = await issueValue(app, {
    ...{ issuer: institute, holder: institute, day: '2023-02-10', leansOn: root.uid },
    ...{ deviation: '0.000022', expandedU: '0.0003' },
  });
  const reference = await issueValue(app, {
    ...{ issuer: institute, holder: home, day: '2023-03-10', leansOn: working.uid },
    ...{ deviation: '0.000033', expandedU: '0.0006' },
  });
  // Used after the two years of home's own programme: the step breaks.
  const own = await issueValue(app, {
    ...{ issuer: home, holder: home, day: '2026-01-15', leansOn: reference.uid },
    ...{ deviation: '0.000044', expandedU: '0.0009' },
  });
  const elsewhere = await issueValue(app, {
    ...{ issuer: institute, holder: other, day: '2023-04-10', leansOn: working.uid },
    ...{ deviation: '0.000055', expandedU: '0.0007' },
  });
  return { institute, home, other, root, working, reference, own, elsewhere };
}

async function audited(agent: Agent, body: object): Promise<AuditResponse> {
  const asked = await agent.post('/api/audits').send(body);
  expect(asked.status, asked.text).toBe(201);
  expect(asked.headers.location).toBe(`/api/audits/${asked.body.id}`);
  return finished(agent, asked.body.id as string);
}

async function finished(agent: Agent, id: string): Promise<AuditResponse> {
  runner.wake();
  await runner.idle();
  return AuditResponse.parse((await agent.get(`/api/audits/${id}`)).body);
}

async function findingsOf(agent: Agent, id: string, query: object = {}) {
  const reply = await agent.get(`/api/audits/${id}/findings`).query(query);
  expect(reply.status, reply.text).toBe(200);
  return AuditFindingsResponse.parse(reply.body);
}

const network = await makeNetwork();
const metrologist = await makePerson(app, 'metrologist', network.home.id);
const agent = await app.signIn(metrologist);
const ofHome = { scope: 'laboratory', laboratoryId: network.home.id };

describe('an audit of a laboratory', () => {
  it('judges each step of its chains once, and says the same as each chain by itself', async () => {
    const audit = await audited(agent, ofHome);
    expect(audit).toMatchObject({ state: 'done', done: 2, total: 2, message: null });
    expect(audit.result).toMatchObject({ chains: 2, values: 4, links: 3 });
    const { findings, total } = await findingsOf(agent, audit.id);
    expect(total).toBe(findings.length);
    expect(audit.result!.findings).toBe(total);

    const expected = new Set<string>();
    let judged = 0;
    for (const focus of [network.reference, network.own]) {
      const chain = await chainOf(app.context(), storeOf(app.database), focus.id, {});
      if (focus === network.own) judged = chain.judgement.checks.length;
      for (const check of chain.judgement.checks) {
        if (check.outcome !== 'fails' && check.outcome !== 'cannot be judged') continue;
        const { subject } = check;
        const about =
          subject.type === 'link'
            ? `${subject.childUid} ${subject.parentUid}`
            : subject.type === 'value'
              ? subject.uid
              : `chain ${focus.uid}`;
        expected.add([check.rule, check.verdict, check.outcome, check.severity, about].join(' | '));
      }
    }
    const found = findings.map((finding) => {
      const about = finding.subject === 'chain' ? `chain ${finding.value.uid}` : finding.value.uid;
      const pair = finding.reference ? `${about} ${finding.reference.uid}` : about;
      return [finding.rule, finding.verdict, finding.outcome, finding.severity, pair].join(' | ');
    });
    expect(found.sort()).toEqual([...expected].sort());
    expect(found.some((one) => one.startsWith('B-14 | conduct | fails | critical'))).toBe(true);
    // The own chain holds every step; the rules about a chain as a whole are asked of both.
    const counted = audit.result!.counts.reduce((sum, { count }) => sum + count, 0);
    const wholes = audit.result!.rules.filter((rule) => rule.scope === 'chain').length;
    expect(counted).toBeGreaterThanOrEqual(judged + wholes);
  });

  it('leads each finding to its chain, filters them, and gives them as a file', async () => {
    const audit = await audited(agent, ofHome);
    const late = await findingsOf(agent, audit.id, { rule: 'B-14', outcome: 'fails', verdict: 'conduct' });
    expect(late.findings).toHaveLength(1);
    const [finding] = late.findings;
    expect(finding).toMatchObject({
      subject: 'link',
      value: { uid: network.own.uid, registryNo: network.own.registryNo },
      reference: { uid: network.reference.uid },
      focusUid: network.own.uid,
      laboratory: { id: network.home.id },
    });
    const chain = await agent
      .get(`/api/chains/${finding!.focusUid}`)
      .query({ day: audit.day, known: audit.known });
    expect(chain.body.links).toContainEqual(
      expect.objectContaining({
        childUid: network.own.uid,
        parentUid: network.reference.uid,
        conduct: 'broken',
      }),
    );
    const whose = async (which: string) =>
      new Set((await findingsOf(agent, audit.id, { whose: which })).findings.map((one) => one.laboratory.id));
    expect(await whose('own')).toEqual(new Set([network.home.id]));
    expect((await whose('above')).has(network.home.id)).toBe(false);
    const file = await agent.get(`/api/audits/${audit.id}/findings.csv`).query({ rule: 'B-14' });
    expect(file.headers['content-type']).toBe('text/csv; charset=utf-8');
    expect(file.headers['content-disposition']).toMatch(/^attachment; filename=audit-.*\.csv$/);
    expect(
      file.text
        .split('\r\n')
        .some((line) => line.startsWith('B-14,') && line.includes(network.own.registryNo)),
    ).toBe(true);
    const facts = await agent.get(`/api/audits/${audit.id}/findings/${finding!.n}/facts`);
    expect(facts.body.facts).toMatchObject({
      child: { uid: network.own.uid },
      parent: { uid: network.reference.uid },
      usedEnd: '2026-01-15',
    });
  });

  it('is of the day asked about, as known on the knowledge day', async () => {
    const before = await audited(agent, { ...ofHome, day: '2025-06-01' });
    expect(before.result).toMatchObject({ chains: 1, values: 3 });
    const unknown = await audited(agent, { ...ofHome, known: '2023-01-10' });
    expect(unknown.result).toMatchObject({ chains: 0, values: 0, findings: 0, counts: [] });
    const tomorrow = new Date(Date.now() + 2 * 86_400_000).toISOString().slice(0, 10);
    const refused = await agent.post('/api/audits').send({ ...ofHome, known: tomorrow });
    expect(refused.status).toBe(422);
    expect(refused.body.fields.known).toMatchObject({ received: tomorrow });
    const bad = await agent.post('/api/audits').send({ ...ofHome, day: '2026-02-30' });
    expect(bad.status).toBe(400);
    expect(Object.keys(bad.body.fields)).toEqual(['day']);
  });
});

describe('an audit asked again', () => {
  async function scene() {
    const made = await makeNetwork();
    const person = await makePerson(app, 'metrologist', made.home.id);
    return {
      ...made,
      agent: await app.signIn(person),
      body: { scope: 'laboratory', laboratoryId: made.home.id },
    };
  }

  it('finds the same, whatever was recorded since; asked anew, it finds what changed', async () => {
    const made = await scene();
    const first = await audited(made.agent, made.body);
    // Later the same day: a withdrawal above, an earlier calibration of the own weight, a further weight.
    await withdrawCalibration(app.context(), made.working.revisionId, {
      reason: 'The balance was not level',
      effectiveOn: '2023-03-01',
    });
    await issueCalibration(
      app.context(),
      inputOf(made.home.id, '2024-05-05', [
        lineOf(made.own.standardId, {
          deviation: '0.009',
          references: [useOf(made.reference.uid, '2024-05-05')],
        }),
      ]),
    );
    const further = await makeStandard(app, made.home.id);
    await issueCalibration(
      app.context(),
      inputOf(made.home.id, '2024-05-06', [
        lineOf(further.id, { references: [useOf(made.reference.uid, '2024-05-06')] }),
      ]),
    );

    const asked = await made.agent.post(`/api/audits/${first.id}/repeat`);
    expect(asked.status).toBe(201);
    const repeated = await finished(made.agent, asked.body.id as string);
    expect(repeated.comparison).toMatchObject({
      of: first.id,
      isSame: true,
      sameFacts: true,
      isIntact: true,
    });
    expect(repeated.result!.resultSha256).toBe(first.result!.resultSha256);
    expect(repeated.result!.factsSha256).toBe(first.result!.factsSha256);
    expect(repeated).toMatchObject({ asOf: first.asOf, asOfAct: first.asOfAct, repeatOf: first.id });
    const again = AuditResponse.parse((await made.agent.get(`/api/audits/${first.id}`)).body);
    expect(again.repeatedBy).toBe(repeated.id);

    const anew = await audited(made.agent, made.body);
    expect(anew.result!.resultSha256).not.toBe(first.result!.resultSha256);
    const withdrawn = await findingsOf(made.agent, anew.id, {
      rule: 'B-15',
      verdict: 'today',
      outcome: 'fails',
    });
    expect(withdrawn.findings.map((one) => one.reference?.uid)).toContain(made.working.uid);
  });

  it('says where a stored finding was changed behind the product', async () => {
    const made = await scene();
    const first = await audited(made.agent, made.body);
    const { actSeq } = first.result!;
    const problems = async () =>
      (await verifyRecord(app.database)).problems.filter((problem) => problem.actSeq === actSeq);
    expect(await problems()).toEqual([]);
    await app.owner.query(
      "UPDATE audit_finding SET severity = 'minor' WHERE run_id = :id AND rule = 'B-14' AND outcome = 'fails'",
      { replacements: { id: first.id } },
    );
    expect((await problems()).map((problem) => problem.where)).toEqual(['audit_finding']);
    const asked = await made.agent.post(`/api/audits/${first.id}/repeat`);
    const repeated = await finished(made.agent, asked.body.id as string);
    expect(repeated.comparison).toMatchObject({ isSame: false, isIntact: false, sameFacts: true });
    expect(repeated.comparison!.differences).toContainEqual({
      rule: 'B-14',
      verdict: 'conduct',
      registryNo: made.own.registryNo,
      then: { outcome: 'fails', severity: 'minor' },
      now: { outcome: 'fails', severity: 'critical' },
    });
    await app.owner.query('DELETE FROM audit_facts WHERE run_id = :id', { replacements: { id: first.id } });
    expect((await problems()).map((problem) => problem.where).sort()).toEqual([
      'audit_facts',
      'audit_finding',
    ]);
  });

  it('tells of another rule set', async () => {
    const made = await scene();
    const first = await audited(made.agent, made.body);
    await app.owner.query("UPDATE audit_run SET rule_set = '2020-01-01.1' WHERE id = :id", {
      replacements: { id: first.id },
    });
    const asked = await made.agent.post(`/api/audits/${first.id}/repeat`);
    const { comparison } = await finished(made.agent, asked.body.id as string);
    expect(comparison).toMatchObject({ isSame: false, differenceCount: 0, sameFacts: true });
    expect(comparison!.ruleSet).toEqual({ then: '2020-01-01.1', now: first.result!.ruleSet });
  });
});

describe('who sees what', () => {
  const HISTORY = /0\.0000(11|22|55)/;

  async function person(role: Parameters<typeof makePerson>[1], laboratoryId: string | null = null) {
    const made: TestPerson = await makePerson(app, role, laboratoryId);
    return app.signIn(made);
  }

  it('opens an audit to its laboratory, its assessor and the registrar, and hides it from others', async () => {
    const audit = await audited(agent, ofHome);
    const open = [
      await person('reader', network.home.id),
      await person('assessor', network.home.id),
      await person('registrar'),
    ];
    const hidden = [
      await person('metrologist', network.institute.id),
      await person('metrologist', network.other.id),
      await person('comparison pilot'),
    ];
    const parts = ['', '/findings', '/findings.csv', '/findings/0/facts'];
    for (const someone of open) {
      for (const part of parts.slice(0, 3)) {
        expect((await someone.get(`/api/audits/${audit.id}${part}`)).status).toBe(200);
      }
      const { audits } = AuditListResponse.parse((await someone.get('/api/audits')).body);
      expect(audits.map(({ id }) => id)).toContain(audit.id);
    }
    for (const someone of hidden) {
      for (const part of parts)
        expect((await someone.get(`/api/audits/${audit.id}${part}`)).status).toBe(404);
      expect((await someone.post('/api/audits').send(ofHome)).status).toBe(403);
      const { audits } = AuditListResponse.parse((await someone.get('/api/audits')).body);
      expect(audits.map(({ id }) => id)).not.toContain(audit.id);
    }
  });

  it('keeps the network to the registrar, and a chain to who may read it', async () => {
    expect((await agent.post('/api/audits').send({ scope: 'network' })).status).toBe(403);
    const stranger = await person('metrologist', network.other.id);
    const ofOwn = { scope: 'value', valueUid: network.own.uid };
    expect((await stranger.post('/api/audits').send(ofOwn)).status).toBe(404);
    const chain = await audited(agent, ofOwn);
    expect(chain).toMatchObject({ subject: { scope: 'value', registryNo: network.own.registryNo } });
    expect((await stranger.get(`/api/audits/${chain.id}`)).status).toBe(404);
    // The working standard is above home's: its chain is open as a statement, its words are not.
    const above = await audited(agent, { scope: 'value', valueUid: network.working.uid });
    const { findings } = await findingsOf(agent, above.id, { rule: 'B-21' });
    expect(findings).toHaveLength(1);
    expect(findings[0]).toMatchObject({ outcome: 'fails', sentence: null, parameters: {} });
  });

  it('tells a laboratory nothing of the values above but what a statement tells', async () => {
    const audit = await audited(agent, ofHome);
    const { findings } = await findingsOf(agent, audit.id);
    const about = (uid: string) => findings.filter((one) => one.subject === 'value' && one.value.uid === uid);
    const factsOf = async ({ n }: { n: number }) => agent.get(`/api/audits/${audit.id}/findings/${n}/facts`);
    expect(about(network.working.uid).length).toBeGreaterThan(0);
    for (const finding of about(network.working.uid)) {
      expect(finding).toMatchObject({ sentence: null, parameters: {} });
      expect((await factsOf(finding)).status).toBe(404);
    }
    const everything = JSON.stringify(findings);
    expect(everything).not.toMatch(HISTORY);
    expect(everything).not.toContain(network.elsewhere.registryNo);
  });

  it('lets who asked stop it, and nobody else of the laboratory', async () => {
    const asked = await agent.post('/api/audits').send(ofHome);
    const reader = await person('reader', network.home.id);
    expect((await reader.post(`/api/audits/${asked.body.id}/stop`)).status).toBe(403);
    const stopped = await agent.post(`/api/audits/${asked.body.id}/stop`);
    expect(stopped.status).toBe(200);
    await runner.idle();
    const state = (await agent.get(`/api/audits/${asked.body.id}`)).body.state as string;
    expect(['stopped', 'done']).toContain(state);
    expect(stopped.body.state).toBe(state);
  });
});

describe('the queue', () => {
  it('takes up what a process that ended has left, and gives up after the third time', async () => {
    const first = await audited(agent, ofHome);
    const leave = (attempts: number) =>
      app.owner.query(
        `UPDATE audit_job SET state = 'running', runner = UUID(), attempts = :attempts,
           heartbeat = '2020-01-01 00:00:00' WHERE id = :id`,
        { replacements: { id: left, attempts } },
      );
    const copy = await agent.post(`/api/audits/${first.id}/repeat`);
    const left = copy.body.id as string;
    await runner.idle();
    await app.owner.query('DELETE FROM audit_finding WHERE run_id = :id', { replacements: { id: left } });
    await app.owner.query('DELETE FROM audit_facts WHERE run_id = :id', { replacements: { id: left } });
    await app.owner.query('DELETE FROM audit_run WHERE id = :id', { replacements: { id: left } });
    await leave(1);
    const taken = await finished(agent, left);
    expect(taken).toMatchObject({ state: 'done', comparison: { isSame: true } });
    await leave(3);
    const given = await finished(agent, left);
    expect(given).toMatchObject({ state: 'failed', message: expect.stringContaining('3 times') });
  });

  it('answers a question asked twice with the audit under way, and asks anew once that has ended', async () => {
    await runner.idle();
    const [one, two] = await Promise.all([1, 2].map(() => agent.post('/api/audits').send(ofHome)));
    expect([one!.status, two!.status]).toEqual([201, 201]);
    expect(two!.body.id).toBe(one!.body.id);
    const done = await finished(agent, one!.body.id as string);
    const repeats = await Promise.all([1, 2].map(() => agent.post(`/api/audits/${done.id}/repeat`)));
    expect(repeats[0]!.body.id).toBe(repeats[1]!.body.id);
    expect(repeats[0]!.body.id).not.toBe(done.id);
    await runner.idle();
    expect((await audited(agent, ofHome)).id).not.toBe(done.id);
  });

  it('goes back into the queue when the server is told to end, and does not count as an attempt', async () => {
    const first = await audited(agent, ofHome);
    const id = randomUUID();
    await addJob(app.context(), { ...(await auditJob(app.database, first.id))!, id, repeatOf: null });
    const leaving = new AuditRunner(app.database, app.context().clock);
    leaving.wake();
    await leaving.leave();
    expect(await auditJob(app.database, id)).toMatchObject({
      state: 'waiting',
      attempts: 0,
      message: expect.stringContaining('begins again'),
    });
    expect((await finished(agent, id)).state).toBe('done');
  });

  it('keeps nothing of an audit that is stopped while it runs', async () => {
    const first = await audited(agent, ofHome);
    const job = (await auditJob(app.database, first.id))!;
    expect(await performAudit(app.database, job, async (done) => done === 0)).toBeNull();

    const performed = await performAudit(app.database, job, async () => true);
    expect(performed!.resultSha256).toBe(first.result!.resultSha256);
    const id = randomUUID();
    await addJob(app.context(), { ...job, id, repeatOf: null });
    expect(await stopJob(app.database, id)).toBe('stopped');
    const context = app.context(metrologist.user);
    expect(await storeAudit(context, { ...job, id }, performed!, new Date())).toBe(false);
    const kept = await readRows(app.database, 'SELECT 1 FROM audit_finding WHERE run_id = :id', { id });
    const run = await readRow(app.database, 'SELECT 1 AS yes FROM audit_run WHERE id = :id', { id });
    expect([kept, run]).toEqual([[], null]);
    const { problems } = await verifyRecord(app.database);
    expect(problems.filter(({ actSeq }) => actSeq > first.result!.actSeq)).toEqual([]);
  });

  it('never says that anything is compliant', async () => {
    const audit = await audited(agent, ofHome);
    const reply = JSON.stringify((await agent.get(`/api/audits/${audit.id}`)).body);
    expect(reply).not.toMatch(/complian/i);
  });
});

describe('what an audit is found by', () => {
  it('stands on the desk of its laboratory, and in the list of chains that fail', async () => {
    const audit = await audited(agent, ofHome);
    const { audits } = (await agent.get('/api/desk')).body as { audits: { id: string; figures: object }[] };
    expect(audits).toHaveLength(1);
    expect(audits[0]).toMatchObject({
      id: audit.id,
      laboratory: { id: network.home.id },
      figures: audit.figures,
    });

    const failing = await agent.get('/api/chains').query({ failing: '1' });
    const uids = (failing.body.values as { uid: string }[]).map(({ uid }) => uid);
    const { findings } = await findingsOf(agent, audit.id, { outcome: 'fails' });
    const failed = findings
      .filter(({ severity }) => severity !== 'information')
      .map(({ value }) => value.uid);
    const held = [network.reference.uid, network.own.uid];
    expect(new Set(uids)).toEqual(new Set(held.filter((uid) => failed.includes(uid))));
    expect(uids).toContain(network.own.uid);
    const all = await agent.get('/api/chains');
    expect((all.body.values as { uid: string }[]).map(({ uid }) => uid).sort()).toEqual([...held].sort());
    const wrong = await agent.get('/api/chains').query({ failing: 'yes' });
    expect(wrong.status).toBe(400);
    expect(wrong.body.fields.failing.message).toContain('Expected 1');
    const stranger = await app.signIn(await makePerson(app, 'metrologist', network.other.id));
    expect((await stranger.get('/api/chains').query({ failing: '1' })).body.values).toEqual([]);
    expect((await stranger.get('/api/desk')).body.audits).toEqual([]);
  });

  it.each([
    ['day', '0001-01-01', 'The earliest certificate'],
    ['known', '0001-01-01', 'The earliest certificate'],
    ['day', '9999-12-31', 'more than 50 years ahead'],
  ])('refuses %s %s, of which the register can say nothing', async (field, day, words) => {
    const reply = await agent.post('/api/audits').send({ ...ofHome, [field]: day });
    expect([reply.status, Object.keys(reply.body.fields as object)]).toEqual([422, [field]]);
    expect(reply.body.fields[field].message).toContain(words);
  });

  it('refuses what it cannot read, each by its field', async () => {
    const bad = await agent.post('/api/audits').send({ scope: 'country' });
    expect(bad.status).toBe(400);
    expect(Object.keys(bad.body.fields as object)).toEqual(['scope']);
    const more = await agent.post('/api/audits').send({ ...ofHome, valueUid: network.own.uid });
    expect(more.status).toBe(400);
    const nowhere = { scope: 'laboratory', laboratoryId: randomUUID() };
    expect((await agent.post('/api/audits').send(nowhere)).status).toBe(404);
    expect((await agent.get('/api/audits/nothing')).status).toBe(404);
    expect((await agent.get(`/api/audits/${randomUUID()}`)).status).toBe(404);
    const { id } = await audited(agent, ofHome);
    for (const query of [
      { outcome: 'holds' },
      { severity: 'dreadful' },
      { cursor: 'bm90aGluZw' },
      { whose: 'mine' },
    ]) {
      const reply = await agent.get(`/api/audits/${id}/findings`).query(query);
      expect([reply.status, Object.keys(reply.body.fields as object)]).toEqual([400, Object.keys(query)]);
    }
    expect((await agent.get(`/api/audits/${id}/findings/999999/facts`)).status).toBe(404);
    expect((await agent.get(`/api/audits/${id}/findings/-1/facts`)).status).toBe(404);
  });
});

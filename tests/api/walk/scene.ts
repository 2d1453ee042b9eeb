import { randomUUID } from 'node:crypto';
import supertest from 'supertest';
import type { Role } from '#shared/contracts/identity.ts';
import { auditRunnerOf } from '#server/modules/audits/index.ts';
import { addDocument } from '#server/modules/documents/index.ts';
import {
  inputOf,
  lineOf,
  makeCalibration,
  makeStandard,
  useOf,
} from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson, type TestPerson } from '#tests/support/factories.ts';
import type { TestApp } from '#tests/support/test-app.ts';

/** Everybody who walks: without sign-in, each role at home, and two who work elsewhere. */
export const WALKERS = [
  'nobody',
  'registrar',
  'laboratory administrator',
  'metrologist',
  'signatory',
  'reader',
  'assessor',
  'comparison pilot',
  'metrologist elsewhere',
  'metrologist of the institute',
] as const;
export type Walker = (typeof WALKERS)[number];

type Agent = Awaited<ReturnType<TestApp['signIn']>>;

/** Three laboratories and one short chain: home's weight leans on the institute's. */
export interface Scene {
  app: TestApp;
  home: { id: string };
  elsewhere: { id: string };
  institute: { id: string };
  /** The weight of home, its value, and the sheet it stands on. */
  standardId: string;
  valueUid: string;
  revisionId: string;
  /** The institute's value that home's leans on. */
  referenceUid: string;
  referenceNo: string;
  referenceRevisionId: string;
  documentId: string;
  person(walker: Walker): TestPerson;
  agent(walker: Walker): Agent;
  /** Another agent of the same person, for what ends a session. */
  freshAgent(walker: Walker): Promise<Agent>;
}

export async function makeScene(app: TestApp): Promise<Scene> {
  const home = await makeLaboratory(app);
  const elsewhere = await makeLaboratory(app);
  const institute = await makeLaboratory(app, 'national institute');
  const reference = await makeStandard(app, institute.id);
  const top = await makeCalibration(app, institute.id, '2024-01-10', [lineOf(reference.id)]);
  const standard = await makeStandard(app, home.id);
  const line = lineOf(standard.id, {
    references: [useOf(top.valueUids[0]!, '2024-06-10')],
    expandedU: '0.0009',
  });
  const below = await makeCalibration(app, home.id, '2024-06-10', [line]);
  const document = await addDocument(
    { ...app.context(), dataDir: app.dataDir },
    { laboratoryId: home.id, name: 'walk.pdf', content: Buffer.from(`%PDF-1.7 ${randomUUID()} %%EOF`) },
  );
  const places: [Exclude<Walker, 'nobody'>, Role, string | null][] = [
    ['registrar', 'registrar', null],
    ['laboratory administrator', 'laboratory administrator', home.id],
    ['metrologist', 'metrologist', home.id],
    ['signatory', 'signatory', home.id],
    ['reader', 'reader', home.id],
    ['assessor', 'assessor', home.id],
    ['comparison pilot', 'comparison pilot', null],
    ['metrologist elsewhere', 'metrologist', elsewhere.id],
    ['metrologist of the institute', 'metrologist', institute.id],
  ];
  const people = new Map<Walker, TestPerson>();
  const stranger = () =>
    supertest.agent(app.app.express).set('X-Requested-With', 'exagium') as unknown as Agent;
  const agents = new Map<Walker, Agent>([['nobody', stranger()]]);
  for (const [walker, role, laboratoryId] of places) {
    const person = await makePerson(app, role, laboratoryId);
    people.set(walker, person);
    agents.set(walker, await app.signIn(person));
  }
  return {
    app,
    home,
    elsewhere,
    institute,
    standardId: standard.id,
    valueUid: below.valueUids[0]!,
    revisionId: below.revisionId,
    referenceUid: top.valueUids[0]!,
    referenceNo: reference.registryNo,
    referenceRevisionId: top.revisionId,
    documentId: document.id,
    person: (walker) => people.get(walker === 'nobody' ? 'metrologist' : walker)!,
    agent: (walker) => agents.get(walker)!,
    freshAgent: async (walker) => (walker === 'nobody' ? stranger() : app.signIn(people.get(walker)!)),
  };
}

/** A calibration of home that nobody leans on, for what ends one. */
export async function looseCalibration({
  app,
  home,
}: Scene): Promise<{ revisionId: string; calibrationId: string; valueUids: string[] }> {
  const standard = await makeStandard(app, home.id);
  return makeCalibration(app, home.id, '2024-07-01', [lineOf(standard.id)]);
}

/** The content of a sheet of home as the form would hold it, complete enough to be issued. */
export async function fullSheet({ app, home, referenceUid }: Scene): Promise<Record<string, unknown>> {
  const standard = await makeStandard(app, home.id);
  const { certificateNo } = inputOf(home.id, '2024-08-01', []);
  return {
    issuerId: home.id,
    certificateNo,
    issuedOn: '2024-08-01',
    performedBegin: '2024-08-01',
    performedEnd: '2024-08-01',
    method: 'Substitution weighing',
    lines: [
      {
        key: 'a',
        standardId: standard.id,
        value: '0.123',
        expandedU: '0.90',
        references: [{ valueUid: referenceUid, sensitivity: '1' }],
      },
    ],
  };
}

/** A draft of home with that content, begun by its metrologist. */
export async function makeDraft(scene: Scene): Promise<{ id: string; version: number; content: unknown }> {
  const body = { laboratoryId: scene.home.id, content: await fullSheet(scene) };
  const reply = await scene.agent('metrologist').post('/api/drafts').send(body);
  if (reply.status !== 201) throw new Error(`The draft was not begun: ${reply.text}`);
  return { id: reply.body.id, version: reply.body.version, content: reply.body.content };
}

/** A dry run to keep for home: what if its weight were heavier. */
export function dryRunOf({ home, valueUid }: Scene): object {
  return {
    laboratoryId: home.id,
    name: 'A heavier weight',
    question: { changes: [{ kind: 'shift', valueUid, shift: '0.0001' }] },
  };
}

/** That dry run, kept by home's metrologist. */
export async function makeDryRun(scene: Scene): Promise<string> {
  const reply = await scene.agent('metrologist').post('/api/dry-runs').send(dryRunOf(scene));
  if (reply.status !== 201) throw new Error(`The dry run was not kept: ${reply.text}`);
  return reply.body.id;
}

const audits = new WeakMap<Scene, Promise<string>>();

/** An audit of home, asked for by its metrologist and done. */
export function makeAudit(scene: Scene): Promise<string> {
  const known = audits.get(scene);
  if (known) return known;
  const made = askAndWait(scene);
  audits.set(scene, made);
  return made;
}

async function askAndWait({ app, home, agent }: Scene): Promise<string> {
  const body = { scope: 'laboratory', laboratoryId: home.id };
  const reply = await agent('metrologist').post('/api/audits').send(body);
  if (reply.status !== 201) throw new Error(`The audit was not asked for: ${reply.text}`);
  await auditRunnerOf(app.context()).idle();
  return reply.body.id as string;
}

/** Number of a finding about a value of home. */
export async function ownFindingOf({ agent }: Scene, auditId: string): Promise<number> {
  const reply = await agent('metrologist').get(`/api/audits/${auditId}/findings`).query({ whose: 'own' });
  const [first] = reply.body.findings as { n: number }[];
  if (!first) throw new Error('The audit of home found nothing: the scene holds no fault any more');
  return first.n;
}

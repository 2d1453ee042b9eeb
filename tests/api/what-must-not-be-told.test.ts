import type { Test } from 'supertest';
import { describe, expect, it, vi } from 'vitest';
import { auditRunnerOf } from '#server/modules/audits/index.ts';
import { routes } from '#server/routes.ts';
import { makeStandard } from '#tests/support/calibration-factories.ts';
import { freeRegistryNo } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';
import {
  changesOf,
  generalQuestions,
  longQuestions,
  searchesFor,
  shortQuestions,
  type Question,
} from './telling/questions.ts';
import { laboratoryOf, makeTellingScene, TELLERS, type Teller } from './telling/scene.ts';
import { foundIn, secretsFrom, sightOf, type Told } from './telling/told.ts';

/*
 * Every question that is answered with something of a value, asked by everybody about everything; the reply as it was
 * sent is searched for what this person must not be told.
 */
const app = await testApp();
const scene = await makeTellingScene(app);
const values = Object.values(scene.values);
vi.setConfig({ testTimeout: 120_000 });
const agents = new Map(
  await Promise.all(TELLERS.map(async (teller) => [teller, await app.signIn(scene.people[teller])] as const)),
);
const asked = new Set<string>();

/** One person of each sight asks in every wording; for the others each route once. */
const thorough = new Set(
  TELLERS.filter(
    (teller, at) =>
      teller !== 'registrar' && TELLERS.findIndex((other) => sightOf(other) === sightOf(teller)) === at,
  ),
);

interface Answer extends Told {
  status: number;
  question: Question;
}

async function ask(teller: Teller, question: Question): Promise<Answer> {
  asked.add(question.route);
  const agent = agents.get(teller)!;
  const sent: Test = question.route.startsWith('GET')
    ? agent.get(question.path).query(question.query ?? {})
    : agent.post(question.path).send(question.body);
  const reply = await sent.buffer(true).parse((response, done) => {
    const parts: Buffer[] = [];
    response.on('data', (part: Buffer) => parts.push(Buffer.from(part)));
    response.on('end', () => done(null, Buffer.concat(parts)));
  });
  const body = reply.body as Buffer;
  expect(reply.status, `${question.route}: ${body.toString('utf8').slice(0, 300)}`).toBeLessThan(500);
  const isDocument = reply.status === 200 && /\.(svg|pdf|html|csv)$/.test(question.path);
  return {
    status: reply.status,
    headers: reply.headers as Record<string, string>,
    body,
    isDocument,
    question,
  };
}

/** What a reply tells of what this person must not know; what they asked with they knew. */
function leaks(teller: Teller, answer: Answer): string[] {
  const { path, query, body } = answer.question;
  const known = `${path} ${Object.values(query ?? {}).join(' ')} ${JSON.stringify(body ?? {})}`;
  const secrets = secretsFrom(teller, scene).filter(({ text }) => !known.includes(text));
  return foundIn(answer, secrets).map((what) => `${teller}: ${answer.question.route} ${known} tells ${what}`);
}

function json<Body>(answer: Answer): Body {
  return JSON.parse(answer.body.toString('utf8')) as Body;
}

/** The groups of an answer, each opened: whole, and in each order a row at a time, so that cursors come. */
async function openedGroups(teller: Teller, answer: Answer): Promise<Answer[]> {
  if (answer.status !== 200 || answer.isDocument || !thorough.has(teller)) return [];
  const { groups = [] } = json<{ groups?: { key: string }[] }>(answer);
  const { question } = answer;
  if (!/downstream|exposure|what-if$/.test(question.path)) return [];
  const wordings: Record<string, unknown>[] = question.body
    ? [{}, ...['word', 'shift', 'ratio', 'u'].map((sort) => ({ sort, limit: 1 }))]
    : [{}, { limit: '1' }];
  const opened: Answer[] = [];
  for (const { key: group } of groups) {
    for (const wording of wordings) {
      const more = { group, ...wording };
      const { body, query } = question;
      const next = body
        ? { body: { ...body, ...more } }
        : { query: { ...query, ...more } as Record<string, string> };
      opened.push(await ask(teller, { ...question, ...next }));
    }
  }
  return opened;
}

async function told(teller: Teller, questions: readonly Question[]): Promise<string[]> {
  const found: string[] = [];
  for (const question of questions) {
    const answer = await ask(teller, question);
    for (const each of [answer, ...(await openedGroups(teller, answer))]) found.push(...leaks(teller, each));
  }
  return found;
}

/** Of an audit that this person may ask for: all that is found, and what each rule saw. */
async function toldOfAudit(teller: Teller, body: Record<string, unknown>): Promise<string[]> {
  const begun = await ask(teller, { route: 'POST /api/audits', path: '/api/audits', body });
  if (begun.status !== 201) return leaks(teller, begun);
  await auditRunnerOf(app.context()).idle();
  const path = `/api/audits/${json<{ id: string }>(begun).id}`;
  const findings = await ask(teller, {
    route: 'GET /api/audits/:auditId/findings',
    path: `${path}/findings`,
  });
  const rows = json<{ findings: { n: number }[] }>(findings).findings;
  const rest = [
    { route: 'GET /api/audits/:auditId', path },
    { route: 'GET /api/audits/:auditId/findings.csv', path: `${path}/findings.csv` },
    ...rows.map(({ n }) => ({
      route: 'GET /api/audits/:auditId/findings/:n/facts',
      path: `${path}/findings/${n}/facts`,
    })),
  ];
  return [...leaks(teller, findings), ...(await told(teller, rest))];
}

describe.each(TELLERS)('what must not be told to: %s', (teller) => {
  it('of each value, by each route once', async () => {
    const { customers, again, unseen } = scene.values;
    const about = thorough.has(teller) ? values : [customers, again, unseen];
    const questions = about.flatMap((value) => shortQuestions(value, scene));
    expect(await told(teller, questions)).toEqual([]);
  });

  it('by lists, searches, the desk, notices', async () => {
    const questions = [
      ...generalQuestions(scene),
      ...(thorough.has(teller) ? values.flatMap((value) => searchesFor(value, scene)) : []),
    ];
    // That a laboratory is there, everybody may know: the box that finds laboratories names them.
    const found = await told(teller, questions);
    expect(found.filter((line) => !/\/api\/find .* laboratory /.test(line))).toEqual([]);
  });

  it('by an audit', async () => {
    const home = laboratoryOf(teller);
    const scopes = [
      ...(home ? [{ scope: 'laboratory', laboratoryId: scene.laboratories[home].id }] : []),
      ...(thorough.has(teller) ? values.map(({ uid }) => ({ scope: 'value', valueUid: uid })) : []),
      { scope: 'laboratory', laboratoryId: scene.laboratories.beyond.id },
    ];
    for (const body of scopes) expect(await toldOfAudit(teller, body)).toEqual([]);
  });

  it('by a dry run that somebody else kept', async () => {
    const kept = await Promise.all(
      changesOf(scene.values.customers).map((change) => keptDryRun('metrologist of the holder', change)),
    );
    const questions = kept.map((id) => ({ route: 'GET /api/dry-runs/:id', path: `/api/dry-runs/${id}` }));
    const found = await told(teller, questions);
    // Who has its address may know whose it is.
    expect(found.filter((line) => !line.includes('laboratory customer'))).toEqual([]);
  });
});

async function keptDryRun(teller: Teller, change: Record<string, unknown>): Promise<string> {
  const body = {
    laboratoryId: scene.laboratories[laboratoryOf(teller)!].id,
    name: 'A question of our own',
    question: { changes: [change] },
  };
  const reply = await ask(teller, { route: 'POST /api/dry-runs', path: '/api/dry-runs', body });
  expect(reply.status).toBe(201);
  return json<{ run?: { id: string }; id: string }>(reply).id;
}

describe.each([...thorough])('in every wording, to: %s', (teller) => {
  it.each(Object.keys(scene.values))('of %s', async (name) => {
    const value = scene.values[name as keyof typeof scene.values];
    const isOpen = (await ask(teller, shortQuestions(value, scene)[0]!)).status === 200;
    expect(isOpen ? await told(teller, longQuestions(value, scene)) : []).toEqual([]);
  });
});

const WRITERS = TELLERS.filter((teller) => /^(metrologist|administrator)/.test(teller));

describe.each(WRITERS)('numbers that must not be told while a certificate is entered, to: %s', (teller) => {
  const own = () => scene.laboratories[laboratoryOf(teller)!].id;
  // By its whole number a weight may be named as reference, as a certificate names it: no number of it is told.
  const ofNumbers = (found: string[]) => found.filter((line) => / tells (deviation|U) of /.test(line));

  it('by looking for a reference', async () => {
    const questions = values.flatMap(({ registryNo, certificateNo, holder }) =>
      [registryNo, certificateNo].map((q) => ({
        ...{ route: 'GET /api/references', path: '/api/references' },
        query: { laboratory: own(), issuer: scene.laboratories[holder].id, q },
      })),
    );
    expect(ofNumbers(await told(teller, questions))).toEqual([]);
  });

  it('by naming it in a draft', async () => {
    const standard = await makeStandard(app, own());
    const questions = values.map(({ uid, holder }) => ({
      ...{ route: 'POST /api/drafts', path: '/api/drafts' },
      body: {
        laboratoryId: own(),
        content: {
          ...{ issuerId: scene.laboratories[holder].id, certificateNo: freeRegistryNo() },
          ...{ issuedOn: '2025-02-03', performedBegin: '2025-02-03', performedEnd: '2025-02-03' },
          method: 'Substitution weighing',
          lines: [
            {
              ...{ key: 'a', standardId: standard.id, value: '0.1', expandedU: '0.01' },
              references: [{ valueUid: uid, sensitivity: '1' }],
            },
          ],
        },
      },
    }));
    expect(ofNumbers(await told(teller, questions))).toEqual([]);
  });
});

/** Routes that were not asked, and why they tell nothing of a value to who may not know it. */
const NOT_ASKED = [
  /^(GET|POST|DELETE) \/api\/session$/,
  /^GET \/api\/health/,
  // Who is in the network is known to everybody in it.
  /^(GET|PUT) \/api\/laboratories/,
  // Acts and drafts of one's own laboratory: the permission walk holds them, and their own tests.
  /^(POST|PUT|GET) \/api\/(drafts|documents|sets)/,
  /^POST \/api\/(standards|notices|calibrations|dry-runs\/:id\/notes|audits\/)/,
];

it('asked every route that tells of values', () => {
  const declared = routes.map(({ method, path }) => `${method.toUpperCase()} ${path}`);
  const left = declared.filter(
    (route) => !asked.has(route) && !NOT_ASKED.some((pattern) => pattern.test(route)),
  );
  expect(left).toEqual([]);
});

/**
 * Prints how the product lives with a country's register: `npm run bench -- country [sizes]`. For each size the
 * database is filled anew and a server of the built product started on it. Not a test: nothing fails because a machine
 * is slow. What the figures were is kept in README.md beside this file.
 */
import { cpus, totalmem } from 'node:os';
import { QueryTypes } from 'sequelize';
import { seedCountry } from '#seeders/country/seed-country.ts';
import { migrate } from '#server/db/migrator.ts';
import { openDatabase } from '#server/db/sequelize.ts';
import { demoSession } from '#tests/support/signed-in-client.ts';
import { asker, chainRound, ROUND_HEAD, roundInWords } from './chain-rounds.ts';
import {
  countByQuery,
  laboratoryWith,
  randomValues,
  requester,
  timed,
  timesInWords,
  type Request,
  type Times,
} from './country-measures.ts';
import { startCountryServer } from './country-server.ts';

const SIZES = [10_000, 100_000, 1_000_000];
const CHAINS = 200;
/** Any number: another one draws other values. */
const SEED = 20_260_520;
const AUDITED_VALUES = 2_000;
const BETWEEN_LOOKS_MS = 50;
/** As seldom as a person's screen: each look takes its time from the audit. */
const BETWEEN_AUDIT_LOOKS_MS = 500;

const { DATABASE_URL, DATABASE_OWNER_URL, TEST_DATABASE_OWNER_URL } = process.env;
if (!DATABASE_URL || !DATABASE_OWNER_URL || !TEST_DATABASE_OWNER_URL) {
  throw new Error('No database: run "npm run bench -- country", which starts one.');
}
const name = new URL(DATABASE_URL).pathname.slice(1);
const adminUrl = new URL(`/${name}`, TEST_DATABASE_OWNER_URL).href;
const sizes = process.argv.slice(2).map(Number);

console.log(
  `${cpus().length} processors (${cpus()[0]?.model.trim()}), ${(totalmem() / 2 ** 30).toFixed(0)} GB, Node.js ${process.version}`,
);
for (const size of sizes.length > 0 ? sizes : SIZES) await benchSize(size);

async function benchSize(size: number): Promise<void> {
  console.log(`\n${size} assigned values`);
  const country = await fill(size);
  const database = openDatabase(DATABASE_URL!, 2);
  const uids = await randomValues(database, CHAINS, SEED);
  const laboratory = await laboratoryWith(database, AUDITED_VALUES);
  const server = await startCountryServer(process.env);
  try {
    const { cookie } = await demoSession(server.baseUrl, 'registrar@network.example');
    const ask = asker(server.baseUrl, cookie);
    const request = requester(server.baseUrl, cookie);
    console.log(`server answers after ${server.startedIn.toFixed(0)} ms`);
    const cold = await ask(`/api/chains/${uids[0]}`);
    console.log(`first chain after the start, the graph still loading: ${cold.milliseconds.toFixed(0)} ms`);
    console.log(
      `graph loaded after ${((await untilLoaded(server.baseUrl, cookie, country.rootUid)) / 1000).toFixed(1)} s more`,
    );
    memoryNow('with the graph loaded');
    console.log(ROUND_HEAD);
    console.log(roundInWords('chain, for the first time', await chainRound(ask, uids)));
    console.log(roundInWords('chain, again', await chainRound(ask, uids)));
    const ofUids = uids.values();
    const above = await timed('ancestors of each by a plain recursive query', CHAINS, () =>
      countByQuery(database, ofUids.next().value!, 'above'),
    );
    console.log(`${''.padEnd(58)}    median       longest`);
    console.log(timesInWords(above));
    for (const times of await wide(request, country)) console.log(timesInWords(times));
    for (const [what, uid, runs] of [
      ['one', country.wideUid, 3],
      ['the root', country.rootUid, 1],
    ] as const) {
      const below = await timed(
        `descendants of ${what} by a plain recursive query`,
        runs,
        () => countByQuery(database, uid, 'below'),
        (count) => `${count} values`,
      );
      console.log(timesInWords(below));
    }
    memoryNow('after the wide questions');
    const audited = await timed(
      `audit of ${laboratory.code}, with ${laboratory.values} values held or issued`,
      1,
      () => audit(request, laboratory.id),
      (found) => found,
    );
    console.log(timesInWords(audited));
    memoryNow('after the audit');
    for (const times of await lists(request, '')) console.log(timesInWords(times));
    const own = await demoSession(server.baseUrl, `metrologist@${laboratory.code.toLowerCase()}.example`);
    const asOwn = requester(server.baseUrl, own.cookie);
    for (const times of await lists(asOwn, ` of ${laboratory.code}`)) console.log(timesInWords(times));
    memoryNow('at the end');
  } finally {
    await server.stop();
    await database.close();
  }

  function memoryNow(when: string): void {
    console.log(
      `memory of the server ${when}: ${server.memory().toFixed(0)} MB, at most ${server.peak().toFixed(0)} MB so far`,
    );
  }
}

async function fill(size: number): Promise<Awaited<ReturnType<typeof seedCountry>>> {
  const admin = openDatabase(TEST_DATABASE_OWNER_URL!.replace(/\/[^/]*$/, '/mysql'), 1);
  await admin.query(`DROP DATABASE IF EXISTS \`${name}\``);
  await admin.query(`CREATE DATABASE \`${name}\` CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_520_ci`);
  const [version] = await admin.query<{ version: string }>('SELECT VERSION() AS version', {
    type: QueryTypes.SELECT,
  });
  console.log(`MariaDB ${version?.version}`);
  await admin.close();
  await migrate(DATABASE_OWNER_URL!, DATABASE_URL!);
  return seedCountry({ url: adminUrl, valueCount: size, say: (line) => console.log(line) });
}

/** Milliseconds until the root's descendants are told: until the whole graph is in memory, where it is large. */
async function untilLoaded(baseUrl: string, cookie: string, rootUid: string): Promise<number> {
  const begin = performance.now();
  let quarter = 0;
  let reply = await fetch(`${baseUrl}/api/downstream/${rootUid}`, { headers: { cookie } });
  while (reply.status === 503) {
    const { progress } = (await reply.json()) as { progress: { done: number; total: number } };
    const now = Math.floor((4 * progress.done) / Math.max(1, progress.total));
    if (now !== quarter) console.log(`  read ${progress.done} of ${progress.total} values and links`);
    quarter = now;
    await new Promise((resolve) => setTimeout(resolve, BETWEEN_LOOKS_MS));
    reply = await fetch(`${baseUrl}/api/downstream/${rootUid}`, { headers: { cookie } });
  }
  if (!reply.ok) throw new Error(`The root's descendants gave ${reply.status}: ${await reply.text()}`);
  return performance.now() - begin;
}

/** Audits a laboratory and waits for the end of the job. */
async function audit(request: Request, laboratoryId: string): Promise<string> {
  const asked = await request('/api/audits', { scope: 'laboratory', laboratoryId });
  const { id } = asked.reply as { id: string };
  for (;;) {
    const { reply } = await request(`/api/audits/${id}`);
    const { state, run } = reply as {
      state: string;
      run?: { chains: number; values: number; links: number };
    };
    if (state === 'done') return run ? `${run.chains} chains, ${run.values} values, ${run.links} links` : '';
    if (state === 'failed' || state === 'stopped') throw new Error(`The audit ${state}.`);
    await new Promise((resolve) => setTimeout(resolve, BETWEEN_AUDIT_LOOKS_MS));
  }
}

interface Uids {
  rootUid: string;
  wideUid: string;
}

async function wide(request: Request, { rootUid, wideUid }: Uids): Promise<Times[]> {
  const total = ({ reply }: { reply: unknown }) => {
    const { count } = (reply as { total: { count: number } }).total;
    return `${count} rows`;
  };
  const downstream = (uid: string, by: string) => () => request(`/api/downstream/${uid}?by=${by}`);
  const whatIf = (uid: string) => () =>
    request('/api/what-if', {
      changes: [
        { kind: 'shift', valueUid: uid, shift: '0.0000002' },
        { kind: 'raise', valueUid: uid, addedU: 0.0001 },
      ],
    });
  return [
    await timed('downstream of one, by laboratory', 9, downstream(wideUid, 'laboratory'), total),
    await timed('downstream of one, by class', 9, downstream(wideUid, 'class'), total),
    await timed('downstream of the root, by laboratory', 5, downstream(rootUid, 'laboratory'), total),
    await timed('what if, on one', 9, whatIf(wideUid), total),
    await timed('what if, on the root', 3, whatIf(rootUid), total),
  ];
}

async function lists(request: Request, whose: string): Promise<Times[]> {
  const paths: [string, string][] = [
    ['desk', '/api/desk'],
    ['standards, first page', '/api/standards'],
    ['standards, searched', '/api/standards?q=500'],
    ['calibrations, first page', '/api/calibrations'],
    ['find', '/api/find?q=L012'],
  ];
  const found: Times[] = [];
  for (const [what, path] of paths) {
    found.push(await timed(`${what}${whose}`, 5, () => request(path)));
  }
  return found;
}

import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { pino } from 'pino';
import type { Sequelize } from 'sequelize';
import supertest from 'supertest';
import { afterAll, inject } from 'vitest';
import { createApp, type App } from '#server/app.ts';
import { openDatabase } from '#server/db/sequelize.ts';
import { makeContext, systemClock, type Clock, type Context } from '#server/http/context.ts';
import type { User } from '#server/policy/user.ts';

export interface TestApp {
  app: App;
  /** As the application: the least-privileged account. */
  database: Sequelize;
  /** As the owner: only to look at the catalogue, or to tamper behind the product's back. */
  owner: Sequelize;
  /** Where this application keeps documents. */
  dataDir: string;
  /** A context for calling services directly. */
  context(user?: User | null, clock?: Clock): Context;
  /** Requests without sign-in; unsafe ones carry the header that the browser client sends. */
  request: supertest.Agent;
  /** A signed-in agent with its own cookies. */
  signIn(person: { email: string; password: string }): Promise<supertest.Agent>;
}

/** The database of this worker, chosen by vitest's pool number. */
export function workerDatabase(): { ownerUrl: string; applicationUrl: string } {
  const databases = inject('databases');
  const worker = Number(process.env.VITEST_POOL_ID ?? '1');
  const chosen = databases[(worker - 1) % databases.length];
  if (!chosen) throw new Error('No test database was made for this worker');
  return chosen;
}

/** The real application on the worker's MariaDB. Call at the top of a test file; it is closed after the file. */
export async function testApp(clock: Clock = systemClock): Promise<TestApp> {
  const urls = workerDatabase();
  const database = openDatabase(urls.applicationUrl, 6);
  const owner = openDatabase(urls.ownerUrl, 2);
  const dataDir = await mkdtemp(path.join(tmpdir(), 'exagium-test-'));
  const app = createApp({
    database,
    logger: pino({ level: process.env.TEST_LOG_LEVEL ?? 'silent' }),
    sessionSecret: 'a secret that only the tests know, of 32+',
    isBehindTls: false,
    clock,
    dataDir,
  });
  afterAll(async () => {
    app.close();
    await database.close();
    await owner.close();
    await rm(dataDir, { recursive: true, force: true });
  });
  const agent = () =>
    supertest.agent(app.express).set('X-Requested-With', 'exagium') as unknown as supertest.Agent;
  return {
    app,
    database,
    owner,
    dataDir,
    context: (user = null, contextClock = clock) => makeContext({ database, user, clock: contextClock }),
    request: agent(),
    signIn: async ({ email, password }) => {
      const signedIn = agent();
      const reply = await signedIn.post('/api/session').send({ email, password });
      if (reply.status >= 300) throw new Error(`Sign-in of ${email} gave ${reply.status}: ${reply.text}`);
      return signedIn;
    },
  };
}

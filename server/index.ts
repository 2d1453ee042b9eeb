import type { AddressInfo } from 'node:net';
import path from 'node:path';
import { pino } from 'pino';
import { createApp } from './app.ts';
import { readConfig } from './config.ts';
import { openDatabase } from './db/sequelize.ts';
import { builtClient, developmentClient } from './http/client-files.ts';
import { systemClock } from './http/context.ts';
import { auditRunnerOf } from './modules/audits/index.ts';
import { storeOf } from './modules/chains/index.ts';
import { memoryOf } from './modules/downstream/index.ts';

/** Longest wait for requests under way when the process is told to stop. */
const DRAIN_MILLISECONDS = 8_000;

const config = readConfig();
const logger = pino({ level: config.logLevel });
const database = openDatabase(config.databaseUrl, config.poolSize);
await database.authenticate();

const development = config.isDevelopment ? await developmentClient() : null;
const audits = auditRunnerOf({ database, clock: systemClock });
const app = createApp({
  database,
  logger,
  sessionSecret: config.sessionSecret,
  isBehindTls: config.isBehindTls,
  dataDir: config.dataDir,
  isDevelopment: config.isDevelopment,
  checksEveryReply: config.isDevelopment,
  client: development?.handlers ?? builtClient(path.resolve('dist/client')),
});

const server = app.express.listen(config.port, config.host, (error?: Error) => {
  if (error) {
    logger.fatal({ err: error }, `Cannot listen on ${config.host}:${config.port}`);
    process.exit(1);
  }
  const { port } = server.address() as AddressInfo;
  logger.info(`Listening on http://${config.host}:${port}`);
  warmUp();
  audits.watch((error) => logger.error({ err: error }, 'An audit broke off'));
});

/** Reads what the first visitor would wait for. Until it is there, and where it fails, the database answers. */
function warmUp(): void {
  const note = (error: unknown) => logger.warn({ err: error }, 'The register was not read ahead');
  storeOf(database)
    .catchUp()
    .then(() => memoryOf(database).load())
    .catch(note);
}

let isStopping = false;
/** Stops accepting, lets requests under way end, closes the pool, leaves. */
async function stop(): Promise<void> {
  if (isStopping) return;
  isStopping = true;
  const drained = new Promise<void>((resolve) => server.close(() => resolve()));
  server.closeIdleConnections();
  const deadline = setTimeout(() => server.closeAllConnections(), DRAIN_MILLISECONDS);
  const laidDown = audits.leave();
  await drained;
  await laidDown;
  clearTimeout(deadline);
  app.close();
  await development?.close();
  await database.close();
  process.exit(0);
}
for (const signal of ['SIGTERM', 'SIGINT', 'SIGHUP'] as const) process.on(signal, () => void stop());

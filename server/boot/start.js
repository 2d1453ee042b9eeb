import { ensureBuild } from './build.js';
import { BootError } from './boot-error.js';
import { credentialsOf } from './credentials.js';
import { discardUnfinishedDemoData, ensureDemoData } from './demo-data.js';
import { ensureDependencies } from './dependencies.js';
import { lockDataFolder, withSetupLock } from './folder-lock.js';
import { ensureMariadb } from './mariadb-programs.js';
import { startMariadb } from './mariadb-server.js';
import { migrate } from './migrate.js';
import { checkNodeVersion } from './node-version.js';
import { isOneAccount, startOptions } from './options.js';
import { checkPortIsFree } from './ports.js';
import { serverEnvironment } from './server-environment.js';
import { duration, say } from './step.js';
import { superviseCommand } from './supervise.js';
import { startWebServer } from './web-server.js';

// A stop that was asked for is a success: npm has nothing to complain about.
superviseCommand(start, { signalExitCode: 0 });

/**
 * Everything from a fresh clone to a product that answers, then waits for its end.
 * @returns {Promise<number>}
 */
async function start() {
  const begin = performance.now();
  checkNodeVersion();
  const options = startOptions(process.env, process.argv.slice(2));
  const { host, port, isDev, dataFolder } = options;
  const { descriptor: lock } = await lockDataFolder(dataFolder);
  await checkPortIsFree(host, port);
  await withSetupLock(async () => {
    await ensureDependencies();
    if (!isDev) await ensureBuild();
    if (!options.database) await ensureMariadb();
  });
  /** @type {import('./options.js').GivenDatabase & { ended?: Promise<void> }} */
  const database = options.database ?? (await ownDatabase(dataFolder, lock));
  if (isOneAccount(database)) {
    say(
      '! DATABASE_URL and DATABASE_OWNER_URL name one account: nothing keeps issued values from being altered.',
    );
  }
  const { sessionSecret } = credentialsOf(dataFolder);
  const env = serverEnvironment({ database, dataFolder, sessionSecret, host, port, isDev });
  await migrate({ env, isDev });
  if (options.wantsDemoData) await ensureDemoData({ folder: dataFolder, env, isDev });
  const server = await startWebServer({ env, isDev, lock });
  say(
    `\nExagium is ready at ${server.address} (after ${duration(performance.now() - begin)}). Ctrl-C stops it.\n`,
  );
  throw await firstEnd(server.ended, database.ended, dataFolder);
}

/**
 * @param {string} folder
 * @param {number} lock
 */
function ownDatabase(folder, lock) {
  discardUnfinishedDemoData(folder);
  return startMariadb({ folder, lock });
}

/**
 * @param {import('./web-server.js').WebServer['ended']} serverEnded
 * @param {Promise<void> | undefined} databaseEnded only of a database of our own
 * @param {string} dataFolder
 * @returns {Promise<BootError>} what ended though nobody asked it to
 */
function firstEnd(serverEnded, databaseEnded, dataFolder) {
  const ends = [
    serverEnded.then(({ code, signal }) => `The server ended by itself (${signal ?? `exit code ${code}`}).`),
    ...(databaseEnded
      ? [databaseEnded.then(() => `The database ended by itself; its log is ${dataFolder}/mariadb.log.`)]
      : []),
  ];
  return Promise.race(ends).then((message) => new BootError(message, 'Start again.'));
}

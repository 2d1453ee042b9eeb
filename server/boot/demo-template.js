import { cpSync, existsSync, mkdirSync, readdirSync, renameSync, rmSync } from 'node:fs';
import path from 'node:path';
import { credentialsOf } from './credentials.js';
import { entryCommand, hasEntry } from './entries.js';
import { lockDataFolder, takeLock } from './folder-lock.js';
import { startMariadb } from './mariadb-server.js';
import { migrate } from './migrate.js';
import { testDataFolder } from './paths.js';
import { runOrFail } from './run-command.js';
import { serverEnvironment } from './server-environment.js';
import { sourceHash } from './source-hash.js';
import { say, step } from './step.js';

/**
 * A stopped data folder that holds the demo network, made once for the sources that shape it; tests, benchmarks
 * and screenshots each work on a copy.
 * @returns {Promise<string>} its folder; nothing in it is ever changed
 */
async function demoTemplate() {
  const name = `demo-${sourceHash(['server', 'shared', 'seeders', 'migrations', 'package-lock.json'])}`;
  const folder = path.join(testDataFolder, name);
  const lock = await takeLock(path.join(testDataFolder, 'demo.lock'), {
    waitSeconds: 1200,
    onBusy: () => say('- Waiting for another command that makes the demo network ...'),
  });
  try {
    if (!existsSync(folder)) await makeTemplate(folder);
  } finally {
    lock.release();
  }
  return folder;
}

/** @param {string} folder */
async function makeTemplate(folder) {
  for (const name of readdirSync(testDataFolder)) {
    if (/^demo-[0-9a-f]+/.test(name)) rmSync(path.join(testDataFolder, name), { recursive: true });
  }
  const unfinished = `${folder}.new`;
  const { descriptor, release } = await lockDataFolder(unfinished);
  const database = await startMariadb({ folder: unfinished, lock: descriptor, isThrowaway: true });
  const { sessionSecret } = credentialsOf(unfinished);
  const settings = {
    database,
    dataFolder: unfinished,
    sessionSecret,
    host: '127.0.0.1',
    port: 0,
    isDev: false,
  };
  const env = serverEnvironment(settings);
  await migrate({ env, isDev: true });
  if (hasEntry('seed-demo'))
    await step('Making the demo network (once for these sources; a minute or two)', async () => {
      await runOrFail('Making the demo network', ...entryCommand('seed-demo', { isDev: true }), { env });
    });
  await database.stop();
  release();
  renameSync(unfinished, folder);
}

/**
 * A running MariaDB on a fresh copy of the demo network.
 * @param {string} name of the data folder in .data-test; one command at a time may use it
 * @returns {Promise<{ folder: string, lock: number, database: import('./mariadb-server.js').Mariadb, stop: () => Promise<void> }>}
 */
export async function startDemoCopy(name) {
  const template = await demoTemplate();
  const folder = path.join(testDataFolder, name);
  mkdirSync(folder, { recursive: true });
  const { descriptor, release } = await lockDataFolder(folder);
  for (const old of readdirSync(folder)) {
    if (old !== 'lock') rmSync(path.join(folder, old), { recursive: true });
  }
  for (const part of readdirSync(template)) {
    const isWanted = !['lock', 'credentials.json', 'mariadb.log', 'mariadb.sock'].includes(part);
    if (isWanted) cpSync(path.join(template, part), path.join(folder, part), { recursive: true });
  }
  const database = await startMariadb({ folder, lock: descriptor, isThrowaway: true, withAdmin: true });
  const stop = async () => {
    await database.stop();
    release();
  };
  return { folder, lock: descriptor, database, stop };
}

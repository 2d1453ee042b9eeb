import { closeSync, mkdirSync, openSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import net from 'node:net';
import path from 'node:path';
import { accountsSql, adminName, applicationName, databaseName, ownerName } from './accounts.js';
import { BootError } from './boot-error.js';
import { startChild } from './child-process.js';
import { credentialsOf } from './credentials.js';
import { ensureMariadbFolder, mariadbFolder } from './mariadb-folder.js';
import { mariadbProgram, mariadbUser } from './mariadb-programs.js';
import { freePort } from './ports.js';
import { lastLines } from './run-command.js';
import { discardSocketFolder, socketPath } from './socket-path.js';
import { closeAtEnd, isStopping } from './supervise.js';

/**
 * @typedef {object} MariadbOptions
 * @property {string} folder the data folder, locked by the caller
 * @property {number} lock descriptor of that lock; mariadbd holds it as long as it runs
 * @property {boolean} [isThrowaway] data that a power cut may cost: faster, for tests and benchmarks
 * @property {boolean} [withAdmin] also an account that may make databases and users, for tests
 */

/**
 * @typedef {object} Mariadb
 * @property {string} url as the application
 * @property {string} ownerUrl as the owner of the database
 * @property {string} adminUrl works where `withAdmin` was asked
 * @property {Promise<void>} ended
 * @property {() => Promise<void>} stop
 */

/**
 * Starts a MariaDB of the project's own on the loopback address and waits until it answers.
 * @param {MariadbOptions} options
 * @returns {Promise<Mariadb>}
 * @throws {BootError} with the end of its log
 */
export async function startMariadb(options) {
  const { folder } = options;
  await ensureMariadbFolder(folder);
  const credentials = credentialsOf(folder);
  const port = await freePort();
  const socket = socketPath(folder);
  // A server that starts clears abandoned tables from its temporary folder: never one that it shares.
  const temporary = path.join(folder, 'database-tmp');
  mkdirSync(temporary, { recursive: true, mode: 0o700 });
  const accountsFile = path.join(folder, 'accounts.sql');
  writeFileSync(accountsFile, accountsSql(credentials, { withAdmin: options.withAdmin ?? false }), {
    mode: 0o600,
  });
  const logFile = path.join(folder, 'mariadb.log');
  const log = openSync(logFile, 'w', 0o600);
  const child = startChild(
    mariadbProgram('mariadbd'),
    mariadbArguments(options, { port, socket, accountsFile, temporary }),
    {
      cwd: folder,
      stdio: ['ignore', log, log, options.lock],
    },
  );
  closeSync(log);
  void child.ended.then(() => discardSocketFolder(folder, socket));
  // A stop may take as long as writing every changed page does.
  const stop = () => child.end(60_000);
  const forget = closeAtEnd('the database', stop);
  await waitUntilAnswering(port, child.ended, logFile);
  rmSync(accountsFile, { force: true });
  const address = `127.0.0.1:${port}/${databaseName}`;
  return {
    url: `mariadb://${applicationName}:${credentials.applicationPassword}@${address}`,
    ownerUrl: `mariadb://${ownerName}:${credentials.ownerPassword}@${address}`,
    adminUrl: `mariadb://${adminName}:${credentials.adminPassword}@${address}`,
    ended: child.ended.then(() => undefined),
    stop: async () => {
      forget();
      await stop();
    },
  };
}

/**
 * @param {MariadbOptions} options
 * @param {{ port: number, socket: string, accountsFile: string, temporary: string }} places
 * @returns {string[]}
 */
function mariadbArguments({ folder, isThrowaway = false }, { port, socket, accountsFile, temporary }) {
  return [
    '--no-defaults',
    ...mariadbUser(),
    `--datadir=${mariadbFolder(folder)}`,
    `--tmpdir=${temporary}`,
    `--socket=${socket}`,
    `--port=${port}`,
    `--init-file=${accountsFile}`,
    '--bind-address=127.0.0.1',
    '--skip-name-resolve',
    '--character-set-server=utf8mb4',
    '--collation-server=utf8mb4_unicode_520_ci',
    '--default-time-zone=+00:00',
    '--local-infile=OFF',
    '--skip-symbolic-links',
    '--max-connections=200',
    '--innodb-buffer-pool-size=256M',
    // Pages that the small pool let go are still in the system's cache: a large register is read faster.
    '--innodb-flush-method=fsync',
    // The wide walks of the graph are several times faster when their work table stays in memory.
    '--tmp-memory-table-size=256M',
    '--max-heap-table-size=256M',
    ...(isThrowaway ? ['--innodb-flush-log-at-trx-commit=0', '--innodb-doublewrite=0'] : []),
  ];
}

/**
 * @param {number} port
 * @param {Promise<unknown>} ended
 * @param {string} logFile
 */
async function waitUntilAnswering(port, ended, logFile) {
  let hasEnded = false;
  void ended.then(() => (hasEnded = true));
  const until = Date.now() + 120_000;
  while (!(await isAnswering(port))) {
    if (isStopping()) throw new BootError('A stop is under way.');
    if (hasEnded || Date.now() > until) {
      const said = lastLines(readFileSync(logFile, 'utf8'), 15);
      throw new BootError(`${said}\n\nThe database did not start; its log is ${logFile}.`);
    }
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}

/**
 * @param {number} port
 * @returns {Promise<boolean>} whether a server greets there; its protocol lets the server speak first
 */
function isAnswering(port) {
  return new Promise((resolve) => {
    const socket = net.connect({ host: '127.0.0.1', port, timeout: 2000 });
    /** @param {boolean} answer */
    const finish = (answer) => {
      socket.destroy();
      resolve(answer);
    };
    socket.once('data', () => finish(true));
    socket.once('error', () => finish(false));
    socket.once('end', () => finish(false));
    socket.once('timeout', () => finish(false));
  });
}

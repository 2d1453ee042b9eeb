import { spawnSync } from 'node:child_process';
import { mkdirSync, openSync, closeSync, readFileSync, ftruncateSync, writeSync } from 'node:fs';
import path from 'node:path';
import { BootError } from './boot-error.js';
import { findProgram } from './find-program.js';
import { cacheFolder } from './paths.js';
import { say } from './step.js';

/**
 * Takes a lock that the kernel gives back when the last process holding the returned descriptor is gone, so
 * none is ever left behind. A database server that inherits the descriptor keeps the lock until it has ended,
 * even if its starter was killed.
 * @param {string} file
 * @param {{ onBusy: (holder: number | undefined) => void, waitSeconds: number }} options onBusy may refuse by throwing
 * @returns {Promise<{ descriptor: number, release: () => void }>}
 * @throws {BootError} when the lock does not come free in time
 */
export async function takeLock(file, { onBusy, waitSeconds }) {
  mkdirSync(path.dirname(file), { recursive: true, mode: 0o700 });
  const descriptor = openSync(file, 'a+');
  const flock = findProgram('flock');
  if (flock && !tryLock(flock, descriptor)) {
    onBusy(livingHolder(file));
    const until = Date.now() + waitSeconds * 1000;
    while (!tryLock(flock, descriptor)) {
      if (Date.now() > until) throw new BootError(`${file} is still locked after ${waitSeconds} s.`);
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
  }
  ftruncateSync(descriptor);
  writeSync(descriptor, `${process.pid}\n`);
  return { descriptor, release: () => closeSync(descriptor) };
}

/**
 * flock(1) locks the open file that it shares with us, and the lock stays ours when it exits.
 * @param {string} flock
 * @param {number} descriptor
 * @returns {boolean} false when another process has it
 */
function tryLock(flock, descriptor) {
  const { status, error } = spawnSync(flock, ['--nonblock', '3'], {
    stdio: ['ignore', 'ignore', 'ignore', descriptor],
  });
  if (status === 0 || status === 1) return status === 0;
  throw error ?? new Error(`flock ended with exit code ${status}`);
}

/**
 * @param {string} file
 * @returns {number | undefined} the process that wrote the lock, where it still runs
 */
function livingHolder(file) {
  const pid = Number(readFileSync(file, 'utf8'));
  try {
    if (Number.isInteger(pid) && pid > 0) return process.kill(pid, 0) ? pid : undefined;
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EPERM') return pid;
  }
  return undefined;
}

/**
 * One command at a time uses a data folder; a database that is still stopping is waited for.
 * @param {string} folder
 * @returns {Promise<{ descriptor: number, release: () => void }>}
 */
export function lockDataFolder(folder) {
  return takeLock(path.join(folder, 'lock'), {
    waitSeconds: 90,
    onBusy: (holder) => {
      if (holder !== undefined) {
        throw new BootError(
          `Process ${holder} already uses the data folder ${folder}, or is just stopping.`,
          'Where it was just stopped, try again in a few seconds. Else stop it, or give this one a folder of its own: DATA_DIR=.data-2 PORT=4001 npm start',
        );
      }
      say('- Waiting for a database of an earlier run to stop ...');
    },
  });
}

/**
 * `npm start` and `npm test` may begin together in a fresh clone: one sets up, the other waits and finds it done.
 * @template T
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function withSetupLock(work) {
  const lock = await takeLock(path.join(cacheFolder, 'setup.lock'), {
    waitSeconds: 1200,
    onBusy: () => say('- Waiting for another command that is setting up ...'),
  });
  try {
    return await work();
  } finally {
    lock.release();
  }
}

import { errorText } from './boot-error.js';
import { say } from './step.js';

/** @typedef {{ name: string, close: () => Promise<void> }} Closer */

/** @type {Closer[]} in the order they were opened; closed from the end */
const closers = [];
let stopReason = '';

/**
 * Registers what must be closed before this process ends.
 * @param {string} name
 * @param {() => Promise<void>} close
 * @returns {() => void} takes it off the list again
 */
export function closeAtEnd(name, close) {
  const closer = { name, close };
  closers.push(closer);
  return () => {
    const index = closers.indexOf(closer);
    if (index >= 0) closers.splice(index, 1);
  };
}

/**
 * Work that goes on while a stop is under way must begin nothing new.
 * @returns {boolean}
 */
export function isStopping() {
  return stopReason !== '';
}

/**
 * Runs a command of ours from beginning to end: whatever ends it (its own end, an error, a signal, the death
 * of npm), everything it opened is closed in reverse order before the process exits.
 * @param {() => Promise<number>} main answers the exit code
 * @param {{ signalExitCode: number }} options what a requested stop counts as
 * @returns {void}
 */
export function superviseCommand(main, { signalExitCode }) {
  ignoreClosedTerminal();
  // A Ctrl-C arrives twice, from the terminal and from npm: the first begins the stop, the others are no news.
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
    process.on(signal, () => void stop(`${signal} received`, signalExitCode));
  }
  watchParent(() => void stop('the npm that started this is gone', signalExitCode));
  main().then(
    (code) => stop('ended', code),
    (error) => {
      if (isStopping()) return undefined;
      report(error);
      return stop('failed', 1);
    },
  );
}

/**
 * @param {string} reason
 * @param {number} exitCode
 */
async function stop(reason, exitCode) {
  if (isStopping()) return;
  stopReason = reason;
  if (reason !== 'ended' && reason !== 'failed') say(`\nStopping: ${reason}.`);
  for (let closer = closers.pop(); closer; closer = closers.pop()) {
    await closer.close().catch((error) => say(`Stopping ${closer?.name} failed: ${String(error)}`));
  }
  if (reason !== 'ended' && reason !== 'failed') say('Stopped.');
  process.exit(exitCode);
}

/**
 * npm may be killed without a chance to pass the signal on. Only npm is watched: whoever starts this program
 * from a shell may close that shell.
 * @param {() => void} onGone
 */
function watchParent(onGone) {
  if (!process.env.npm_lifecycle_event) return;
  const parent = process.ppid;
  setInterval(() => process.ppid !== parent && onGone(), 200).unref();
}

/** Writing to a terminal that was closed fails; that must not cut the orderly stop short. */
function ignoreClosedTerminal() {
  process.stdout.on('error', () => {});
  process.stderr.on('error', () => {});
}

/** @param {unknown} error */
function report(error) {
  process.stderr.write(`\n${errorText(error)}\n`);
}

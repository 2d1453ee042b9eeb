import { spawn } from 'node:child_process';
import { findProgram } from './find-program.js';

/** @typedef {{ code: number | null, signal: NodeJS.Signals | null }} Ending */

/**
 * @typedef {object} Child
 * @property {import('node:child_process').ChildProcess} process
 * @property {Promise<Ending>} ended never rejects; a program that cannot be started ends with code 127
 * @property {(graceMs: number) => Promise<void>} end TERM to the child's whole session, KILL after the grace time
 */

/**
 * Starts a child in a session of its own, so that a Ctrl-C on the terminal reaches the starter alone, and asks
 * the kernel to send it TERM should the starter be killed.
 * @param {string} program
 * @param {string[]} args
 * @param {import('node:child_process').SpawnOptions} [options]
 * @returns {Child}
 */
export function startChild(program, args, options = {}) {
  const setpriv = findProgram('setpriv');
  const [file, fileArgs] = setpriv
    ? [setpriv, ['--pdeathsig', 'TERM', '--', program, ...args]]
    : [program, args];
  const child = spawn(file, fileArgs, { ...options, detached: true });
  /** @type {Promise<Ending>} */
  const ended = new Promise((resolve) => {
    child.on('error', () => resolve({ code: 127, signal: null }));
    child.on('close', (code, signal) => resolve({ code, signal }));
  });
  return {
    process: child,
    ended,
    end: async (graceMs) => {
      signalSession(child.pid, 'SIGTERM');
      const timer = setTimeout(() => signalSession(child.pid, 'SIGKILL'), graceMs);
      await ended;
      clearTimeout(timer);
    },
  };
}

/**
 * @param {number | undefined} pid
 * @param {NodeJS.Signals} signal
 */
function signalSession(pid, signal) {
  if (pid === undefined) return;
  try {
    process.kill(-pid, signal);
  } catch {
    // Already gone, which is what was asked for.
  }
}

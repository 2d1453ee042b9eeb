import { readFileSync, readdirSync } from 'node:fs';

/** @typedef {{ pid: number, parent: number, state: string, command: string }} RunningProcess */

/**
 * The processes that carry a mark in their environment: every descendant of a command started with it, wherever
 * it was moved to and whoever its parent is now.
 * @param {string} mark such as "BOOT_TEST=abc"
 * @returns {RunningProcess[]}
 */
export function processesMarked(mark) {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .flatMap((name) => {
      try {
        const isMarked = readFileSync(`/proc/${name}/environ`, 'utf8').split('\0').includes(mark);
        if (!isMarked) return [];
        const [state = '', parent] = readFileSync(`/proc/${name}/stat`, 'utf8')
          .replace(/^.*\) /s, '')
          .split(' ');
        const command = readFileSync(`/proc/${name}/cmdline`, 'utf8').replaceAll('\0', ' ').trim();
        return [{ pid: Number(name), parent: Number(parent), state, command }];
      } catch {
        return []; // Gone meanwhile, or of another user.
      }
    });
}

/**
 * @param {string} mark
 * @param {RegExp} pattern of the command line
 * @returns {number} pid of the one process that fits
 */
export function processMarked(mark, pattern) {
  const found = processesMarked(mark).filter(({ command }) => pattern.test(command));
  if (found.length !== 1) throw new Error(`${found.length} processes fit ${pattern}, one was expected.`);
  return /** @type {RunningProcess} */ (found[0]).pid;
}

/**
 * @param {string} mark
 * @param {number} [seconds]
 * @returns {Promise<string[]>} command lines of those that are still there then
 */
export async function leftOver(mark, seconds = 20) {
  const until = Date.now() + seconds * 1000;
  for (;;) {
    const left = processesMarked(mark).map(({ command }) => command);
    if (left.length === 0 || Date.now() > until) return left;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}

import { BootError } from './boot-error.js';
import { startChild } from './child-process.js';
import { closeAtEnd, isStopping } from './supervise.js';
import { projectFolder } from './paths.js';

/**
 * @typedef {object} CommandOptions
 * @property {NodeJS.ProcessEnv} [env]
 * @property {string} [cwd] the project folder unless told
 * @property {number} [limitMs] it is stopped then
 * @property {'keep' | 'show'} [output] kept for the case of failure, or shown as it comes
 */

/**
 * Runs a program to its end. It is stopped with us, and none is begun while a stop is under way.
 * @param {string} program
 * @param {string[]} args
 * @param {CommandOptions} [options]
 * @returns {Promise<{ code: number, output: string }>} code is 128 or more when a signal ended it
 */
export async function runCommand(
  program,
  args,
  { env = process.env, cwd = projectFolder, output = 'keep', limitMs } = {},
) {
  if (isStopping()) throw new BootError('A stop is under way.');
  const child = startChild(program, args, { env, cwd, stdio: ['ignore', 'pipe', 'pipe'] });
  /** @type {Buffer[]} */
  const chunks = [];
  for (const stream of [child.process.stdout, child.process.stderr]) {
    stream?.on('data', (/** @type {Buffer} */ chunk) => {
      chunks.push(chunk);
      if (output === 'show') process.stdout.write(chunk);
    });
  }
  const forget = closeAtEnd(program, () => child.end(10_000));
  const timer = limitMs && setTimeout(() => void child.end(10_000), limitMs);
  const { code } = await child.ended;
  if (timer) clearTimeout(timer);
  forget();
  return { code: code ?? 128, output: Buffer.concat(chunks).toString('utf8') };
}

/**
 * @param {string} text
 * @param {number} [count]
 * @returns {string} the last lines, where programs say what went wrong
 */
export function lastLines(text, count = 30) {
  return text.trimEnd().split('\n').slice(-count).join('\n');
}

/**
 * Runs a program that has to succeed.
 * @param {string} what for the message
 * @param {string} program
 * @param {string[]} args
 * @param {CommandOptions & { next?: string }} [options]
 * @returns {Promise<string>} its output
 * @throws {BootError} with the last lines of its output
 */
export async function runOrFail(what, program, args, options = {}) {
  const { code, output } = await runCommand(program, args, options);
  if (code === 0) return output;
  const shown = options.output === 'show' ? '' : `${lastLines(output)}\n\n`;
  throw new BootError(`${shown}${what} failed (exit code ${code}).`, options.next);
}

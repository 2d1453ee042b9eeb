import { spawn } from 'node:child_process';
import { findProgram } from '../../../server/boot/find-program.js';

/**
 * @typedef {object} Terminal
 * @property {() => string} screen all that was shown so far
 * @property {(pattern: RegExp, seconds?: number) => Promise<void>} shows waits until it is on the screen
 * @property {(text: string) => void} type
 * @property {() => void} hangUp closes the terminal's window
 * @property {Promise<number | null>} ended exit code of the command
 */

/**
 * Runs a command on a pseudo-terminal of its own with script(1), which every Debian has.
 * @param {string} command for the shell
 * @param {{ cwd: string, env: NodeJS.ProcessEnv }} options
 * @returns {Terminal}
 */
export function openTerminal(command, { cwd, env }) {
  const script = findProgram('script');
  if (!script)
    throw new Error('script (package bsdutils) was not found: these tests need a pseudo-terminal.');
  // "exec": the shell must not stand between the terminal and the command.
  const child = spawn(
    script,
    ['--quiet', '--return', '--flush', '--command', `exec ${command}`, '/dev/null'],
    {
      cwd,
      env,
      stdio: ['pipe', 'pipe', 'inherit'],
    },
  );
  let screen = '';
  child.stdout.on('data', (chunk) => (screen += String(chunk)));
  /** @type {Promise<number | null>} */
  const ended = new Promise((resolve) => child.on('close', resolve));
  return {
    screen: () => screen,
    shows: async (pattern, seconds = 60) => {
      const until = Date.now() + seconds * 1000;
      while (!pattern.test(screen)) {
        const isOver = Date.now() > until || child.exitCode !== null || child.signalCode !== null;
        if (isOver) throw new Error(`${pattern} is not on the screen:\n${screen}`);
        await new Promise((resolve) => setTimeout(resolve, 20));
      }
    },
    type: (text) => child.stdin.write(text),
    hangUp: () => child.kill('SIGKILL'),
    ended,
  };
}

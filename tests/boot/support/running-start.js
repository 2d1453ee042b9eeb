import { randomUUID } from 'node:crypto';
import { freePort } from '../../../server/boot/ports.js';
import { openTerminal } from './terminal.js';

/**
 * `npm start` on a pseudo-terminal, its processes marked.
 * @param {string} folder of the project
 * @param {NodeJS.ProcessEnv} [settings]
 * @param {string} [command]
 */
export async function openStart(folder, settings = {}, command = 'npm start') {
  const mark = `BOOT_TEST=${randomUUID()}`;
  const port = Number(settings.PORT ?? (await freePort()));
  const env = {
    ...plainEnvironment(),
    ...settings,
    PORT: String(port),
    BOOT_TEST: mark.slice('BOOT_TEST='.length),
  };
  const terminal = openTerminal(command, { cwd: folder, env });
  return {
    ...terminal,
    mark,
    port,
    isReady: () => terminal.shows(/is ready at/, 120),
    health: async () => (await fetch(`http://127.0.0.1:${port}/api/health`)).json(),
  };
}

/**
 * What a person's shell has: nothing of the npm that runs these tests.
 * @returns {NodeJS.ProcessEnv}
 */
export function plainEnvironment() {
  const { PATH, HOME, USER, LANG, TMPDIR } = process.env;
  return Object.fromEntries(Object.entries({ PATH, HOME, USER, LANG, TMPDIR }).filter(([, value]) => value));
}

import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { entryCommand, hasEntry } from './entries.js';
import { mariadbFolder } from './mariadb-folder.js';
import { runOrFail } from './run-command.js';
import { say, step } from './step.js';

/** @param {string} folder */
function markerFile(folder) {
  return path.join(folder, 'demo-data');
}

/**
 * A demo network that was cut short half-way is no network. Nobody has worked in such a register yet (the
 * server starts after the demo data), so it is begun anew.
 * @param {string} folder the data folder, locked, with no database running
 * @returns {void}
 */
export function discardUnfinishedDemoData(folder) {
  const marker = markerFile(folder);
  if (!existsSync(mariadbFolder(folder))) return rmSync(marker, { force: true });
  if (!existsSync(marker) || readFileSync(marker, 'utf8') !== 'begun') return;
  say('- The demo data was cut short last time; beginning again with an empty register.');
  rmSync(mariadbFolder(folder), { recursive: true });
  rmSync(marker);
}

/**
 * Fills an empty register with the demo network, once. The program itself leaves a register with content alone.
 * @param {{ folder: string, env: NodeJS.ProcessEnv, isDev: boolean }} options
 * @returns {Promise<void>}
 */
export async function ensureDemoData({ folder, env, isDev }) {
  const marker = markerFile(folder);
  if (existsSync(marker) && readFileSync(marker, 'utf8') === 'done') return;
  if (!hasEntry('seed-demo')) return;
  await step('Making the demo network (once; a minute or two)', async () => {
    writeFileSync(marker, 'begun');
    await runOrFail('Making the demo network', ...entryCommand('seed-demo', { isDev }), {
      env,
      output: 'show',
    });
    writeFileSync(marker, 'done');
  });
}

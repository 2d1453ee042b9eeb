import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { projectFolder } from './paths.js';
import { runOrFail } from './run-command.js';
import { step } from './step.js';

/** @param {string} folder of a project */
function stampFile(folder) {
  return path.join(folder, 'node_modules/.installed-from');
}

/**
 * @param {string} folder of a project
 * @returns {string} the same as long as the lock file says the same, for one kind of machine
 */
function lockHash(folder) {
  const hash = createHash('sha256').update(`${process.platform} ${process.arch}\n`);
  return hash.update(readFileSync(path.join(folder, 'package-lock.json'))).digest('hex');
}

/**
 * Remembers which lock file the installed packages come from. The note goes with node_modules.
 * @param {string} [folder]
 * @returns {void}
 */
export function noteInstalled(folder = projectFolder) {
  writeFileSync(stampFile(folder), lockHash(folder));
}

/**
 * Judged by content: a lock file that was merely touched costs nothing. npm's own list of what it installed is no
 * measure (it leaves out optional packages and peers that the lock file names), except for what must be there:
 * npm writes it last, so an installation that was cut short has none.
 * @param {string} [folder]
 * @returns {string | undefined} why `npm ci` is needed
 */
export function staleDependencies(folder = projectFolder) {
  const list = path.join(folder, 'node_modules/.package-lock.json');
  if (!existsSync(list)) return 'node_modules is missing or incomplete';
  if (!existsSync(stampFile(folder))) return 'node_modules does not say which lock file it is from';
  if (readFileSync(stampFile(folder), 'utf8') !== lockHash(folder)) return 'package-lock.json has changed';
  const { packages = {} } = JSON.parse(readFileSync(list, 'utf8'));
  const lost = Object.keys(packages).find((location) => !existsSync(path.join(folder, location)));
  return lost && `${lost} is missing`;
}

/**
 * Installs exactly what the lock file says where that is not already so. Development packages are included
 * whatever NODE_ENV says: the build needs them.
 * @returns {Promise<void>}
 */
export async function ensureDependencies() {
  const reason = staleDependencies();
  if (!reason) return;
  await step(`Installing the dependencies with npm ci (${reason})`, async () => {
    const args = ['ci', '--include=dev', '--no-audit', '--no-fund'];
    const npm = process.env.npm_execpath;
    const [program, programArgs] = npm?.endsWith('.js') ? [process.execPath, [npm, ...args]] : ['npm', args];
    await runOrFail('npm ci', program, programArgs, {
      next: 'Check the network and the npm registry setting (npm config get registry), then start again.',
    });
    noteInstalled();
  });
}

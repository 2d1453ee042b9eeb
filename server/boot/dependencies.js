import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { runOrFail } from './run-command.js';
import { projectFolder } from './paths.js';
import { step } from './step.js';

/** @typedef {{ version?: string, integrity?: string, link?: boolean, optional?: boolean, devOptional?: boolean, peer?: boolean }} LockedPackage */

/**
 * @param {string} file
 * @returns {Map<string, LockedPackage>} by path such as "node_modules/zod", without the project itself
 */
function lockedPackages(file) {
  const { packages = {} } = JSON.parse(readFileSync(file, 'utf8'));
  return new Map(Object.entries(packages).filter(([location]) => location !== ''));
}

/**
 * Compares what is installed with the lock file by content: a lock file that was merely touched costs nothing.
 * npm writes its own list last, so an installation that was cut short has none.
 * @param {string} [folder]
 * @returns {string | undefined} why `npm ci` is needed
 */
export function staleDependencies(folder = projectFolder) {
  const wanted = lockedPackages(path.join(folder, 'package-lock.json'));
  if (wanted.size === 0) return undefined;
  const listFile = path.join(folder, 'node_modules/.package-lock.json');
  if (!existsSync(listFile)) return 'node_modules is missing or incomplete';
  const installed = lockedPackages(listFile);
  for (const [location, { version, integrity, optional }] of wanted) {
    const found = installed.get(location);
    // Optional packages are made for one platform each; those of other platforms are rightly absent.
    if (!found && optional) continue;
    if (found?.version !== version || found?.integrity !== integrity) return `${location} is not as locked`;
    if (!existsSync(path.join(folder, location))) return `${location} is missing`;
  }
  for (const location of installed.keys())
    if (!wanted.has(location)) return `${location} is no longer locked`;
  return undefined;
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
  });
}

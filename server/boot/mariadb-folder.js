import { existsSync, renameSync, rmSync } from 'node:fs';
import path from 'node:path';
import { mariadbProgram, mariadbUser } from './mariadb-programs.js';
import { runOrFail } from './run-command.js';
import { step } from './step.js';

/**
 * @param {string} folder
 * @returns {string} MariaDB's data directory in a data folder
 */
export function mariadbFolder(folder) {
  return path.join(folder, 'mariadb');
}

/**
 * Makes an empty data directory under another name and renames it when complete: what bears the name is whole.
 * @param {string} folder
 * @returns {Promise<void>}
 */
export async function ensureMariadbFolder(folder) {
  if (existsSync(mariadbFolder(folder))) return;
  await step('Making the data directory of the database', async () => {
    const unfinished = `${mariadbFolder(folder)}.new`;
    rmSync(unfinished, { recursive: true, force: true });
    // Its installer is a shell script that cannot bear spaces in a path: it is given a relative one.
    const args = ['--no-defaults', ...mariadbUser(), '--datadir=./mariadb.new', '--skip-test-db'];
    await runOrFail(
      'mariadb-install-db',
      mariadbProgram('mariadb-install-db'),
      [...args, '--skip-name-resolve', '--auth-root-authentication-method=socket'],
      { cwd: folder, next: `Check that ${folder} is writable and has room (about 200 MB).` },
    );
    renameSync(unfinished, mariadbFolder(folder));
  });
}

import os from 'node:os';
import { BootError } from './boot-error.js';
import { installDebianPackages } from './debian-packages.js';
import { findProgram } from './find-program.js';

const otherwise =
  'Or point at a MariaDB that you have: DATABASE_URL and DATABASE_OWNER_URL (server/boot/README.md).';

/**
 * Only the core packages: no system service, no data directory of the system.
 * @returns {Promise<void>}
 */
export async function ensureMariadb() {
  if (findProgram('mariadbd') && findProgram('mariadb-install-db')) return;
  await installDebianPackages({
    what: 'MariaDB (mariadbd)',
    why: 'the register is kept in it',
    packages: ['mariadb-server-core', 'mariadb-client-core'],
    otherwise,
  });
}

/**
 * @param {string} name
 * @returns {string}
 * @throws {BootError} where it is missing
 */
export function mariadbProgram(name) {
  const found = findProgram(name);
  if (!found) throw new BootError(`${name} was not found on this machine.`, otherwise);
  return found;
}

/**
 * mariadbd refuses to run as root unless told so, and changes to another user only as root.
 * @returns {string[]} its option for the current user
 */
export function mariadbUser() {
  return process.getuid?.() === 0 ? [`--user=${os.userInfo().username}`] : [];
}

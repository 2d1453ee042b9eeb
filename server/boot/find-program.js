import { accessSync, constants, statSync } from 'node:fs';
import path from 'node:path';

/** Debian leaves these out of the PATH of ordinary users, yet mariadbd lives there. */
const systemFolders = ['/usr/local/sbin', '/usr/local/bin', '/usr/sbin', '/usr/bin', '/sbin', '/bin'];

/**
 * @param {string} name
 * @param {string[]} [folders] where to look; the PATH and the system folders unless told
 * @returns {string | undefined} absolute path of an executable file
 */
export function findProgram(name, folders = [...(process.env.PATH ?? '').split(':'), ...systemFolders]) {
  return folders
    .filter((folder) => path.isAbsolute(folder))
    .map((folder) => path.join(folder, name))
    .find(isExecutable);
}

/** @param {string} file */
function isExecutable(file) {
  try {
    accessSync(file, constants.X_OK);
    return statSync(file).isFile();
  } catch {
    return false;
  }
}

import { accessSync, constants, statSync } from 'node:fs';
import path from 'node:path';

/**
 * Debian keeps mariadbd in an sbin folder, which the PATH of ordinary users leaves out: each bin folder of the
 * PATH stands for its sbin neighbour too.
 * @param {string} name
 * @param {string} [searchPath]
 * @returns {string | undefined} absolute path of an executable file
 */
export function findProgram(name, searchPath = process.env.PATH ?? '') {
  return searchPath
    .split(':')
    .filter((folder) => path.isAbsolute(folder))
    .flatMap((folder) =>
      path.basename(folder) === 'bin' ? [folder, path.join(folder, '../sbin')] : [folder],
    )
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

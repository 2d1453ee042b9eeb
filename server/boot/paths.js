import path from 'node:path';

/** The folder of the project: everything the boot makes stays inside it. */
export const projectFolder = path.resolve(import.meta.dirname, '../..');

/** Built client and server, see build.js. */
export const distFolder = path.join(projectFolder, 'dist');

/** Data of `npm test`, `npm run bench` and `npm run look`, so that they run beside `npm start`. */
export const testDataFolder = path.join(projectFolder, '.data-test');

/** Things that may be thrown away at any time, locks of the set-up among them. */
export const cacheFolder = path.join(projectFolder, '.cache');

/**
 * @param {string[]} parts relative to the project
 * @returns {string} absolute path
 */
export function inProject(...parts) {
  return path.join(projectFolder, ...parts);
}

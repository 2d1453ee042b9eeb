import { existsSync } from 'node:fs';
import path from 'node:path';
import { distFolder, inProject } from './paths.js';

/** The programs of the server, each a file of this name in server/. */
export const entryNames = /** @type {const} */ (['index', 'migrate', 'seed-demo']);

/** @typedef {(typeof entryNames)[number]} EntryName */

/**
 * @param {EntryName} name
 * @returns {string} its source
 */
export function entrySource(name) {
  return inProject('server', `${name}.ts`);
}

/**
 * @param {EntryName} name
 * @returns {boolean}
 */
export function hasEntry(name) {
  return existsSync(entrySource(name));
}

/**
 * Heap of the built server, MB. With a bound V8 lets far less garbage stand; the graph of the register lies outside
 * the heap, and what is kept in it is bounded by use (server/modules/chains/recent-map.ts).
 */
const HEAP = '--max-old-space-size=512';

/**
 * @param {EntryName} name
 * @param {{ isDev: boolean }} options from the sources while developing, from the build otherwise
 * @returns {[string, string[]]} program and arguments
 */
export function entryCommand(name, { isDev }) {
  if (isDev) return [process.execPath, ['--import', 'tsx', entrySource(name), '--dev']];
  const program = path.join(distFolder, 'server', `${name}.js`);
  return [process.execPath, name === 'index' ? [HEAP, program] : [program]];
}

import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs';
import path from 'node:path';
import { inProject } from './paths.js';

/**
 * @param {string[]} places files and folders of the project; missing ones count as empty
 * @returns {string} the same for the same contents, whatever was touched or checked out anew
 */
export function sourceHash(places) {
  const hash = createHash('sha256');
  for (const place of places)
    for (const file of filesIn(place)) hash.update(`${file}\0`).update(readFileSync(inProject(file)));
  return hash.digest('hex').slice(0, 16);
}

/**
 * @param {string} place
 * @returns {string[]} in a fixed order, tests left out: they shape nothing that runs
 */
function filesIn(place) {
  const absolute = inProject(place);
  if (!existsSync(absolute)) return [];
  if (statSync(absolute).isFile()) return /\.test\.[jt]sx?$/.test(place) ? [] : [place];
  return readdirSync(absolute)
    .sort()
    .flatMap((name) => filesIn(path.join(place, name)));
}

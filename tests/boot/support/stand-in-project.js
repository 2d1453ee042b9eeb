import { cpSync, mkdirSync, mkdtempSync, rmSync, symlinkSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { projectFolder } from '../../../server/boot/paths.js';

/**
 * A small project around the real boot, in a folder of its own: the real package.json, lock file and
 * dependencies, and stand-ins for client and server that take no time to build or to fill.
 * @param {string} [name] of the folder, below a fresh temporary one
 * @returns {{ folder: string, remove: () => void }}
 */
export function standInProject(name = 'project') {
  const parent = mkdtempSync(path.join(os.tmpdir(), 'exagium-boot-'));
  const folder = path.join(parent, name);
  mkdirSync(folder, { recursive: true });
  cpSync(path.join(import.meta.dirname, 'stand-in'), folder, { recursive: true });
  cpSync(path.join(projectFolder, 'server/boot'), path.join(folder, 'server/boot'), { recursive: true });
  for (const file of ['package.json', 'package-lock.json']) {
    cpSync(path.join(projectFolder, file), path.join(folder, file));
  }
  symlinkSync(path.join(projectFolder, 'node_modules'), path.join(folder, 'node_modules'));
  return { folder, remove: () => rmSync(parent, { recursive: true, force: true }) };
}

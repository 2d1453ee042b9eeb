import { createHash } from 'node:crypto';
import { lstatSync, mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';

/** The kernel's limit for the path of a socket, without its closing zero. */
const longestSocketPath = 107;

/**
 * A socket lies in its data folder; where that path is too long for the kernel, in a private folder of the
 * temporary directory that the same data folder finds again, so that killed runs do not pile folders up.
 * @param {string} folder
 * @param {string} [temporaryFolder]
 * @returns {string}
 */
export function socketPath(folder, temporaryFolder = os.tmpdir()) {
  const wished = path.join(folder, 'mariadb.sock');
  if (Buffer.byteLength(wished) <= longestSocketPath) return wished;
  const name = `exagium-${createHash('sha256').update(folder).digest('hex').slice(0, 16)}`;
  const privateFolder = path.join(temporaryFolder, name);
  try {
    mkdirSync(privateFolder, { mode: 0o700 });
  } catch {
    // There already; used again only if nobody else can reach into it.
  }
  const { uid, mode } = lstatSync(privateFolder);
  const isOurs = uid === process.getuid?.() && (mode & 0o170777) === 0o040700;
  return path.join(
    isOurs ? privateFolder : mkdtempSync(path.join(temporaryFolder, 'exagium-')),
    'mariadb.sock',
  );
}

/**
 * @param {string} folder the data folder, which stays
 * @param {string} socket of a database that has ended
 * @returns {void}
 */
export function discardSocketFolder(folder, socket) {
  if (path.dirname(socket) !== folder) rmSync(path.dirname(socket), { recursive: true, force: true });
}

import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';

/**
 * @typedef {object} Credentials
 * @property {string} ownerPassword
 * @property {string} applicationPassword
 * @property {string} adminPassword used by tests only, which make databases and users
 * @property {string} sessionSecret
 */

/**
 * Reads the generated credentials of a data folder, or makes them, readable by this user alone. The database is
 * brought in line with them at every start (accounts.js), so losing the file loses sessions and nothing else.
 * @param {string} folder
 * @returns {Credentials}
 */
export function credentialsOf(folder) {
  const file = path.join(folder, 'credentials.json');
  if (existsSync(file)) return JSON.parse(readFileSync(file, 'utf8'));
  /** @type {Credentials} */
  const credentials = {
    ownerPassword: secret(),
    applicationPassword: secret(),
    adminPassword: secret(),
    sessionSecret: secret(),
  };
  mkdirSync(folder, { recursive: true });
  const unfinished = `${file}.${process.pid}`;
  writeFileSync(unfinished, `${JSON.stringify(credentials, null, 2)}\n`, { mode: 0o600 });
  renameSync(unfinished, file);
  return credentials;
}

/** @returns {string} 256 bits in letters that need no quoting in SQL or in a URL */
function secret() {
  return randomBytes(32).toString('base64url');
}

import assert from 'node:assert/strict';
import { chmodSync, mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, test } from 'node:test';
import { findProgram } from '../../server/boot/find-program.js';
import { leftOver } from './support/processes.js';
import { openStart } from './support/running-start.js';
import { standInProject } from './support/stand-in-project.js';

const command =
  'apt-get update && sudo apt-get install -y --no-install-recommends mariadb-server-core mariadb-client-core';

let programs = '';
/** @type {ReturnType<typeof standInProject>} */
let project;

/** A machine without MariaDB: a PATH of one folder, with what plain Debian and Node.js bring. */
beforeEach(() => {
  programs = path.join(mkdtempSync(path.join(os.tmpdir(), 'exagium-path-')), 'bin');
  mkdirSync(programs);
  for (const name of ['sh', 'npm', 'setpriv', 'flock', 'env', 'ln']) link(name);
  symlinkSync(process.execPath, path.join(programs, 'node'));
  project = standInProject();
});
afterEach(() => {
  rmSync(path.dirname(programs), { recursive: true });
  project.remove();
});

/** @param {string} name */
function link(name) {
  const found = findProgram(name);
  assert.ok(found, `${name} was not found on this machine`);
  symlinkSync(found, path.join(programs, name));
}

/**
 * @param {string} name
 * @param {string} script
 */
function fake(name, script) {
  writeFileSync(path.join(programs, name), `#!/bin/sh\n${script}\n`);
  chmodSync(path.join(programs, name), 0o755);
}

/** npm start as an ordinary user: what asks for the user id is told another one. */
const asOrdinaryUser = { NODE_OPTIONS: '--import=data:text/javascript,process.getuid=()=>1000' };

/** @param {NodeJS.ProcessEnv} [settings] */
async function failedStart(settings = {}) {
  const started = await openStart(project.folder, { ...settings, PATH: programs });
  assert.equal(await started.ended, 1, started.screen());
  return started.screen().replaceAll('\r', '');
}

test('an ordinary user without sudo is told the exact command and the other way', async () => {
  fake('apt-get', 'exit 99');
  const screen = await failedStart(asOrdinaryUser);
  assert.match(screen, /MariaDB \(mariadbd\) was not found/);
  assert.ok(screen.includes(`Run: sudo ${command}`), screen);
  assert.match(screen, /DATABASE_URL and DATABASE_OWNER_URL/);
});

test('a sudo that asks for a password counts as none', async () => {
  fake('apt-get', 'exit 99');
  fake('sudo', 'echo "sudo: a password is required" >&2; exit 1');
  assert.ok((await failedStart(asOrdinaryUser)).includes(`Run: sudo ${command}`));
});

test('a machine without apt-get is told so', async () => {
  assert.match(await failedStart(), /this machine has no apt-get\.\s+Or point at a MariaDB that you have/);
});

test('an installation that fails shows what apt said and the command to try', async () => {
  fake('apt-get', 'echo "E: Unable to locate package"; exit 100');
  const screen = await failedStart(process.getuid?.() === 0 ? {} : asOrdinaryUser);
  if (process.getuid?.() === 0) assert.match(screen, /E: Unable to locate package/);
  assert.ok(screen.includes(`sudo ${command}`), screen);
});

test('a machine without MariaDB gets it, as root or with a sudo that asks nothing, and starts', async () => {
  const real = ['mariadbd', 'mariadb-install-db'].map((name) => findProgram(name));
  fake('apt-get', `case "$*" in *install*) ln -s ${real.join(' ')} ${programs};; esac`);
  fake('sudo', 'while [ "${1#-}" != "$1" ]; do shift; done; exec "$@"');
  // The installer of the data directory is a shell script that needs the usual tools.
  for (const name of ['dirname', 'basename', 'uname', 'grep', 'sed', 'cat', 'mkdir', 'chown', 'chmod', 'rm'])
    link(name);
  for (const name of ['my_print_defaults', 'id', 'ls', 'cut', 'tr', 'head']) link(name);
  const started = await openStart(project.folder, { PATH: programs });
  await started.isReady();
  assert.match(started.screen(), /Installing mariadb-server-core and mariadb-client-core from Debian/);
  started.type('\x03');
  assert.deepEqual(await leftOver(started.mark), []);
});

import assert from 'node:assert/strict';
import { mkdirSync, mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, test } from 'node:test';
import { staleDependencies } from '../../server/boot/dependencies.js';

const locked = {
  'node_modules/one': { version: '1.0.0', integrity: 'sha512-one' },
  'node_modules/two': { version: '2.0.0', integrity: 'sha512-two' },
  'node_modules/two-for-another-platform': { version: '2.0.0', integrity: 'sha512-other', optional: true },
};

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(path.join(os.tmpdir(), 'exagium-dependencies-'));
  lock('package-lock.json', { '': { name: 'project' }, ...locked });
  for (const name of ['one', 'two']) mkdirSync(path.join(folder, 'node_modules', name), { recursive: true });
  const { one, two } = { one: locked['node_modules/one'], two: locked['node_modules/two'] };
  lock('node_modules/.package-lock.json', { 'node_modules/one': one, 'node_modules/two': two });
});
afterEach(() => rmSync(folder, { recursive: true }));

/**
 * @param {string} file
 * @param {object} packages
 */
function lock(file, packages) {
  writeFileSync(path.join(folder, file), JSON.stringify({ lockfileVersion: 3, packages }));
}

test('installed as locked: nothing to do, also when the lock file was touched', () => {
  utimesSync(path.join(folder, 'package-lock.json'), new Date(), new Date());
  assert.equal(staleDependencies(folder), undefined);
});

test('no node_modules, or one whose installation was cut short', () => {
  rmSync(path.join(folder, 'node_modules/.package-lock.json'));
  assert.match(staleDependencies(folder) ?? '', /missing or incomplete/);
  rmSync(path.join(folder, 'node_modules'), { recursive: true });
  assert.match(staleDependencies(folder) ?? '', /missing or incomplete/);
});

test('another version, another content, a new package, a dropped package, a deleted folder', () => {
  const other = (/** @type {object} */ change) => {
    lock('package-lock.json', { ...locked, ...change });
    return staleDependencies(folder) ?? '';
  };
  assert.match(
    other({ 'node_modules/one': { version: '1.0.1', integrity: 'sha512-one' } }),
    /one is not as locked/,
  );
  assert.match(
    other({ 'node_modules/one': { version: '1.0.0', integrity: 'sha512-new' } }),
    /one is not as locked/,
  );
  assert.match(other({ 'node_modules/three': { version: '3.0.0' } }), /three is not as locked/);
  lock('package-lock.json', { 'node_modules/one': locked['node_modules/one'] });
  assert.match(staleDependencies(folder) ?? '', /two is no longer locked/);
  lock('package-lock.json', locked);
  rmSync(path.join(folder, 'node_modules/two'), { recursive: true });
  assert.match(staleDependencies(folder) ?? '', /two is missing/);
});

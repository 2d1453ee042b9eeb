import assert from 'node:assert/strict';
import { mkdirSync, mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, test } from 'node:test';
import { noteInstalled, staleDependencies } from '../../server/boot/dependencies.js';

let folder = '';
/** An installation of two packages; a third one in the lock file is for another kind of machine. */
beforeEach(() => {
  folder = mkdtempSync(path.join(os.tmpdir(), 'exagium-dependencies-'));
  lock('package-lock.json', ['one', 'two', 'for-another-machine']);
  for (const name of ['one', 'two']) mkdirSync(path.join(folder, 'node_modules', name), { recursive: true });
  lock('node_modules/.package-lock.json', ['one', 'two']);
  noteInstalled(folder);
});
afterEach(() => rmSync(folder, { recursive: true }));

/**
 * @param {string} file
 * @param {string[]} names
 */
function lock(file, names) {
  const packages = Object.fromEntries(names.map((name) => [`node_modules/${name}`, { version: '1.0.0' }]));
  writeFileSync(path.join(folder, file), JSON.stringify({ lockfileVersion: 3, packages }));
}

test('installed from this lock file: nothing to do, also when it was touched', () => {
  utimesSync(path.join(folder, 'package-lock.json'), new Date(), new Date());
  assert.equal(staleDependencies(folder), undefined);
});

test('no node_modules, or one whose installation was cut short', () => {
  rmSync(path.join(folder, 'node_modules/.package-lock.json'));
  assert.match(staleDependencies(folder) ?? '', /missing or incomplete/);
  rmSync(path.join(folder, 'node_modules'), { recursive: true });
  assert.match(staleDependencies(folder) ?? '', /missing or incomplete/);
});

test('a lock file that says something else', () => {
  lock('package-lock.json', ['one', 'two', 'three', 'for-another-machine']);
  assert.equal(staleDependencies(folder), 'package-lock.json has changed');
});

test('a package that was deleted by hand', () => {
  rmSync(path.join(folder, 'node_modules/two'), { recursive: true });
  assert.equal(staleDependencies(folder), 'node_modules/two is missing');
});

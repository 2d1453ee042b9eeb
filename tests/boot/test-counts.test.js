import assert from 'node:assert/strict';
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { after, before, test } from 'node:test';
import { playwrightCounts, tapCounts, vitestCounts } from '../../server/boot/test-counts.js';
import { plainEnvironment } from './support/running-start.js';
import { standInProject } from './support/stand-in-project.js';

let folder = '';
before(() => (folder = mkdtempSync(path.join(os.tmpdir(), 'exagium-counts-'))));
after(() => rmSync(folder, { recursive: true }));

/** @param {string} text */
function report(text) {
  const file = path.join(folder, 'report');
  writeFileSync(file, text);
  return file;
}

test('counts are those of the reports', () => {
  const vitest = report(JSON.stringify({ numPassedTests: 7, numFailedTests: 2 }));
  assert.deepEqual(vitestCounts(vitest, 1), { passed: 7, failed: 2 });
  const tap = report('1..9\n# tests 9\n# pass 6\n# fail 2\n# cancelled 1\n');
  assert.deepEqual(tapCounts(tap, 1), { passed: 6, failed: 3 });
});

test('a journey that passed only at the second try has failed', () => {
  const playwright = report(JSON.stringify({ stats: { expected: 5, unexpected: 1, flaky: 2, skipped: 0 } }));
  assert.deepEqual(playwrightCounts(playwright, 1), { passed: 5, failed: 3 });
});

test('a runner that fails without a failed test, or without a report, is one failure', () => {
  const vitest = report(JSON.stringify({ numPassedTests: 7, numFailedTests: 0 }));
  assert.deepEqual(vitestCounts(vitest, 1), { passed: 7, failed: 1 });
  const none = path.join(folder, 'none');
  for (const counts of [vitestCounts, playwrightCounts, tapCounts]) {
    assert.deepEqual(counts(none, 1), { passed: 0, failed: 1 });
  }
});

test('the last line is the count, and a failure is the exit code, also for a set-up that fails', () => {
  const project = standInProject();
  for (const part of ['lint', 'no-such-part']) {
    const run = spawnSync('npm', ['test', '--', part], {
      cwd: project.folder,
      env: plainEnvironment(),
      encoding: 'utf8',
    });
    assert.equal(run.status, 1, run.stdout);
    assert.equal(run.stdout.trimEnd().split('\n').at(-1), '0 passed, 1 failed');
  }
  project.remove();
});

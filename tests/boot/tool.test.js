import assert from 'node:assert/strict';
import { readdirSync } from 'node:fs';
import path from 'node:path';
import { test } from 'node:test';
import { leftOver } from './support/processes.js';
import { openStart } from './support/running-start.js';
import { standInProject } from './support/stand-in-project.js';

test('a tool works on a copy of the demo network, with a server that comes back when killed', async () => {
  const { folder, remove } = standInProject();
  const notes = '{"status":"ready","notes":["first half","second half"]}';
  for (const run of ['first', 'second']) {
    const started = await openStart(folder, {}, 'npm run bench');
    assert.equal(await started.ended, 0, started.screen());
    assert.deepEqual(await leftOver(started.mark), []);
    const screen = started.screen();
    assert.ok(screen.includes(`before ${notes}`) && screen.includes(`after ${notes}`), screen);
    // The demo network is made once for the same sources.
    assert.equal(/Making the demo network/.test(screen), run === 'first');
  }
  assert.equal(
    readdirSync(path.join(folder, '.data-test')).filter((name) => name.startsWith('demo-')).length,
    1,
  );
  assert.equal(readdirSync(folder).includes('.data'), false);
  remove();
});

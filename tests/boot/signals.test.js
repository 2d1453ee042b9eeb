import assert from 'node:assert/strict';
import { after, before, test } from 'node:test';
import { leftOver, processesMarked, processMarked } from './support/processes.js';
import { openStart } from './support/running-start.js';
import { standInProject } from './support/stand-in-project.js';

/** @type {ReturnType<typeof standInProject>} */
let project;
before(() => (project = standInProject()));
after(() => project.remove());

const npm = /^npm start/;
const starter = /node server\/boot\/start\.js$/;

/** @typedef {Awaited<ReturnType<typeof openStart>>} Started */

/** @type {[string, (started: Started) => void][]} */
const ends = [
  ['Ctrl-C on the terminal', ({ type }) => type('\x03')],
  ['Ctrl-C pressed five times', ({ type }) => type('\x03\x03\x03\x03\x03')],
  ['closing the terminal', ({ hangUp }) => hangUp()],
  ...['SIGINT', 'SIGTERM', 'SIGHUP', 'SIGKILL'].flatMap((signal) =>
    /** @type {[string, RegExp][]} */ ([
      ['npm', npm],
      ['the starter', starter],
    ]).map(
      ([name, pattern]) =>
        /** @type {[string, (started: Started) => void]} */ ([
          `${signal} to ${name}`,
          ({ mark }) => process.kill(processMarked(mark, pattern), /** @type {NodeJS.Signals} */ (signal)),
        ]),
    ),
  ),
];

for (const [name, end] of ends) {
  test(`${name} leaves no process, and the next start works`, async () => {
    const first = await openStart(project.folder);
    await first.isReady();
    end(first);
    assert.deepEqual(await leftOver(first.mark), [], first.screen());

    const second = await openStart(project.folder, { PORT: String(first.port) });
    await second.isReady();
    assert.equal((await second.health()).status, 'ready');
    second.type('\x03');
    assert.deepEqual(await leftOver(second.mark), [], second.screen());
  });
}

test('a start right after the starter was killed waits for the old database and works', async () => {
  const first = await openStart(project.folder);
  await first.isReady();
  process.kill(processMarked(first.mark, starter), 'SIGKILL');
  const second = await openStart(project.folder, { PORT: String(first.port) });
  await second.isReady();
  assert.equal((await second.health()).status, 'ready');
  second.type('\x03');
  assert.deepEqual(await leftOver(second.mark), []);
  assert.deepEqual(await leftOver(first.mark), []);
});

test('Ctrl-C is an orderly stop, for npm too: exit code 0', async () => {
  const started = await openStart(project.folder);
  await started.isReady();
  started.type('\x03');
  assert.equal(await started.ended, 0, started.screen());
  assert.match(started.screen(), /Stopping: SIGINT received\.\s+Stopped\./);
});

test('a server that dies by itself ends the whole with a message', async () => {
  const started = await openStart(project.folder);
  await started.isReady();
  process.kill(processMarked(started.mark, /dist\/server\/index\.js$/), 'SIGKILL');
  assert.equal(await started.ended, 1);
  assert.match(started.screen(), /The server ended by itself \(SIGKILL\)/);
  assert.deepEqual(await leftOver(started.mark), []);
});

test('a database that dies by itself ends the whole with a message', async () => {
  const started = await openStart(project.folder);
  await started.isReady();
  process.kill(processMarked(started.mark, /^\S*mariadbd /), 'SIGKILL');
  assert.equal(await started.ended, 1);
  assert.match(started.screen(), /The database ended by itself; its log is .*mariadb\.log/);
  assert.deepEqual(await leftOver(started.mark), []);
});

for (const signal of ['SIGINT', 'SIGKILL']) {
  test(`${signal} while the demo network is made: the next start begins it anew`, async () => {
    const cut = standInProject();
    const first = await openStart(cut.folder, { STAND_IN_SEED_MS: '60000' });
    await first.shows(/first half stored/);
    process.kill(processMarked(first.mark, starter), /** @type {NodeJS.Signals} */ (signal));
    assert.deepEqual(await leftOver(first.mark), [], first.screen());

    const second = await openStart(cut.folder);
    await second.isReady();
    assert.match(second.screen(), /was cut short last time/);
    assert.deepEqual((await second.health()).notes, ['first half', 'second half']);
    second.type('\x03');
    assert.deepEqual(await leftOver(second.mark), []);
    cut.remove();
  });
}

test('Ctrl-C to the tests ends them and what they started', async () => {
  const started = await openStart(project.folder, {}, 'npm test -- boot');
  await started.shows(/- boot \.\.\./);
  while (!processesMarked(started.mark).some(({ command }) => command.includes('endless.test.js'))) {
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
  started.type('\x03');
  assert.deepEqual(await leftOver(started.mark), [], started.screen());
});

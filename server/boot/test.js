import path from 'node:path';
import { BootError, errorText } from './boot-error.js';
import { ensureChromium } from './chromium.js';
import { ensureDependencies } from './dependencies.js';
import { takeLock, withSetupLock } from './folder-lock.js';
import { ensureMariadb } from './mariadb-programs.js';
import { checkNodeVersion } from './node-version.js';
import { testDataFolder } from './paths.js';
import { duration, say } from './step.js';
import { isStopping, superviseCommand } from './supervise.js';
import { keepOutput, testParts } from './test-parts.js';

superviseCommand(() => test().catch(failedSetUp), { signalExitCode: 130 });

/**
 * Sets up, runs every part even when one fails, and ends with one plain line that counts.
 * @returns {Promise<number>}
 */
async function test() {
  const begin = performance.now();
  checkNodeVersion();
  const parts = chosenParts(process.argv.slice(2));
  await takeLock(path.join(testDataFolder, 'lock'), { onBusy: refuseSecondRun, waitSeconds: 60 });
  const tools = await setUp(parts);
  const total = { passed: 0, failed: 0 };
  const rows = [];
  for (const part of parts) {
    const { passed, failed, row } = await runPart(part, tools);
    total.passed += passed;
    total.failed += failed;
    rows.push(row);
  }
  say(
    `\n${rows.join('\n')}\n${'all'.padEnd(10)}${duration(performance.now() - begin).padStart(12)}, set-up included\n`,
  );
  say(`${total.passed} passed, ${total.failed} failed`);
  return total.failed === 0 && total.passed > 0 ? 0 : 1;
}

/**
 * The last line is a count whatever happens.
 * @param {unknown} error
 * @returns {number}
 */
function failedSetUp(error) {
  if (isStopping()) throw error;
  say(`\n${errorText(error)}\n\n0 passed, 1 failed`);
  return 1;
}

/**
 * @param {string[]} names
 * @throws {BootError} for a name that is none
 */
function chosenParts(names) {
  const unknown = names.find((name) => !testParts.some((part) => part.name === name));
  if (unknown) {
    throw new BootError(
      `There is no part "${unknown}".`,
      `Parts: ${testParts.map(({ name }) => name).join(', ')}.`,
    );
  }
  return testParts.filter(({ name }) => names.length === 0 || names.includes(name));
}

/** @param {number | undefined} holder */
function refuseSecondRun(holder) {
  if (holder !== undefined)
    throw new BootError(`Process ${holder} is running the tests here already.`, 'Wait for it.');
}

/**
 * @param {import('./test-parts.js').TestPart[]} parts
 * @returns {Promise<{ chromium: string }>}
 */
async function setUp(parts) {
  const needs = new Set(parts.flatMap((part) => part.needs));
  return withSetupLock(async () => {
    await ensureDependencies();
    if (needs.has('mariadb')) await ensureMariadb();
    const chromium = needs.has('chromium') ? await ensureChromium() : '';
    return { chromium };
  });
}

/**
 * @param {import('./test-parts.js').TestPart} part
 * @param {{ chromium: string }} tools
 */
async function runPart(part, tools) {
  const begin = performance.now();
  say(`- ${part.name} ...`);
  const { counts, output } = await part.run(tools).catch((error) => ({
    counts: { passed: 0, failed: 1 },
    output: errorText(error),
  }));
  const file = keepOutput(part.name, output);
  if (counts.failed > 0) say(`${output.trimEnd()}\n  ${part.name} failed; this output is kept in ${file}`);
  const time = duration(performance.now() - begin);
  say(`  ${counts.passed} passed, ${counts.failed} failed in ${time}`);
  return {
    ...counts,
    row: `${part.name.padEnd(10)}${time.padStart(12)}   ${counts.passed} passed, ${counts.failed} failed`,
  };
}

/**
 * Prints the product's speed as ratios within one run, against the demo network: `npm run bench`.
 * Not a test: nothing here fails because a machine is slow.
 */
import { spawnSync } from 'node:child_process';
import path from 'node:path';
import { openDatabase } from '#server/db/sequelize.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { MOST_PLATES_ONE_BY_ONE } from '#shared/drawing/as-drawn.ts';
import { restartServer } from '#tests/support/restart-server.ts';
import { demoSession } from '#tests/support/signed-in-client.ts';
import { toolEnvironment } from '#tests/support/tool-environment.ts';
import { asker, chainRound, ROUND_HEAD, roundInWords } from './chain-rounds.ts';
import { firstLoad } from './first-load.ts';
import { FRAMES_HEAD, framesInWords, frameTimes } from './frames.ts';

const VALUES = 200;
/** Any number: another one draws other values. */
const SEED = 20_260_520;
const LIMIT_KB = 200;

const { baseUrl, databaseUrl, pidFile, chromium } = toolEnvironment();

await benchChains();
benchFirstLoad();
await benchFrames();
benchEngine();

async function benchChains(): Promise<void> {
  const database = openDatabase(databaseUrl, 2);
  const size = await readRow<{ standards: number; values: number; links: number }>(
    database,
    `SELECT (SELECT COUNT(*) FROM standard) AS standards, (SELECT COUNT(*) FROM assigned_value) AS \`values\`,
            (SELECT COUNT(*) FROM value_link) AS links`,
  );
  const rows = await readRows<{ uid: string }>(
    database,
    'SELECT uid FROM assigned_value ORDER BY MD5(CONCAT(uid, :seed)) LIMIT :count',
    { seed: SEED, count: VALUES },
  );
  await database.close();
  const uids = rows.map((row) => row.uid);
  console.log(
    `\nChains of ${uids.length} random values; the register holds ${size?.standards} standards, ${size?.values} assigned values, ${size?.links} links`,
  );
  if (pidFile) await restartServer(pidFile, baseUrl);
  else
    console.log('No SERVER_PID_FILE: the server is not restarted, and the first round is as cold as it is.');
  const { cookie } = await demoSession(baseUrl, 'registrar@network.example');
  const ask = asker(baseUrl, cookie);
  const first = await ask(`/api/chains/${uids[0]}`);
  console.log(`first chain after a start, which reads the register: ${first.milliseconds.toFixed(0)} ms`);
  console.log(ROUND_HEAD);
  console.log(roundInWords('each for the first time', await chainRound(ask, uids)));
  console.log(roundInWords('each again', await chainRound(ask, uids)));
  console.log('aim: p95 at most 3 times that of select 1');
}

function benchFirstLoad(): void {
  const { entry, screens } = firstLoad(path.resolve('dist/client'));
  console.log(`\nFirst-load JavaScript, gzip, the chain's drawing apart; aim: below ${LIMIT_KB} kB`);
  console.log(`  entry ${entry.toFixed(1)} kB`);
  for (const { chunk, kilobytes } of screens) {
    const name = chunk.replace(/-[\w-]{8}\.js$/, '');
    console.log(`  ${name} ${kilobytes.toFixed(1)} kB${kilobytes > LIMIT_KB ? ', above the aim' : ''}`);
  }
}

async function benchFrames(): Promise<void> {
  const { cookie } = await demoSession(baseUrl, 'registrar@network.example');
  const { plates, links, layoutMs, shownMs, moves } = await frameTimes(
    { baseUrl, cookie, chromium },
    MOST_PLATES_ONE_BY_ONE,
  );
  console.log(
    `\nA drawing of ${plates} plates and ${links} links moved, ms; layout ${layoutMs.toFixed(0)} ms in its worker, on screen after ${shownMs.toFixed(0)} ms`,
  );
  console.log(FRAMES_HEAD);
  for (const move of moves) console.log(framesInWords(move));
  console.log(
    '  aim: no frame above 50 ms; the longest task is processor time, without waiting for other programs',
  );
}

function benchEngine(): void {
  console.log('\nExact variances of a generated register');
  const program = path.resolve('tests/bench/network-variances.ts');
  const { status } = spawnSync(process.execPath, ['--import', 'tsx', program], { stdio: 'inherit' });
  if (status !== 0) process.exitCode = 1;
}

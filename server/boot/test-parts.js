import { mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { ensureBuild } from './build.js';
import { startDemoCopy } from './demo-template.js';
import { startDemoServer } from './demo-server.js';
import { withSetupLock } from './folder-lock.js';
import { inProject, testDataFolder } from './paths.js';
import { runCommand } from './run-command.js';
import { oneCheck, playwrightCounts, tapCounts, vitestCounts } from './test-counts.js';

/** @typedef {{ counts: import('./test-counts.js').Counts, output: string }} PartResult */

/**
 * @typedef {object} TestPart
 * @property {string} name as given to `npm test -- <name>`
 * @property {('mariadb' | 'chromium')[]} needs set up before the first part begins
 * @property {(tools: { chromium: string }) => Promise<PartResult>} run
 */

/** A part that hangs is a failed part, and its output says where. */
const longestPart = 15 * 60_000;

/** @type {TestPart[]} in the order they run: what fails fastest and explains most comes first */
export const testParts = [
  { name: 'lint', needs: [], run: () => check('eslint/bin/eslint.js', ['.', '--max-warnings=0']) },
  { name: 'format', needs: [], run: () => check('prettier/bin/prettier.cjs', ['--check', '.']) },
  { name: 'types', needs: [], run: () => check('typescript/bin/tsc', ['-p', '.', '--noEmit']) },
  { name: 'unit', needs: [], run: () => vitest('unit', process.env) },
  { name: 'client', needs: [], run: () => vitest('client', process.env) },
  { name: 'api', needs: ['mariadb'], run: api },
  { name: 'boot', needs: ['mariadb'], run: boot },
  { name: 'journeys', needs: ['mariadb', 'chromium'], run: journeys },
];

/**
 * @param {string} program in node_modules
 * @param {string[]} args
 * @returns {Promise<PartResult>}
 */
async function check(program, args) {
  const { code, output } = await runTool(program, args, process.env);
  return { counts: oneCheck(code), output };
}

/**
 * @param {string} project of vite.config.ts
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<PartResult>}
 */
async function vitest(project, env) {
  const report = freshReport(`${project}.json`);
  const args = [
    'run',
    '--project',
    project,
    '--reporter=dot',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ];
  const { code, output } = await runTool('vitest/vitest.mjs', args, env);
  return { counts: vitestCounts(report, code), output };
}

/** The API tests make their databases beside one that holds the demo network. */
async function api() {
  const { database, stop } = await startDemoCopy('api');
  try {
    return await vitest('api', {
      ...process.env,
      TEST_DATABASE_OWNER_URL: database.adminUrl,
      TEST_DEMO_DATABASE_URL: database.url,
      TEST_DEMO_DATABASE_OWNER_URL: database.ownerUrl,
    });
  } finally {
    await stop();
  }
}

/** Starting and stopping, on pseudo-terminals. */
async function boot() {
  const files = readdirSync(inProject('tests/boot'))
    .filter((name) => name.endsWith('.test.js'))
    .map((name) => inProject('tests/boot', name));
  const tap = freshReport('boot.tap');
  const reporters = ['tap', 'spec'].map((name) => `--test-reporter=${name}`);
  const destinations = [tap, 'stdout'].map((name) => `--test-reporter-destination=${name}`);
  const args = [
    '--test',
    '--test-concurrency=1',
    '--test-timeout=900000',
    ...reporters,
    ...destinations,
    ...files,
  ];
  const { code, output } = await runCommand(process.execPath, args, { limitMs: longestPart });
  return { counts: tapCounts(tap, code), output };
}

/**
 * Whole journeys in a browser, on the built product.
 * @param {{ chromium: string }} tools
 * @returns {Promise<PartResult>}
 */
async function journeys({ chromium }) {
  await withSetupLock(ensureBuild);
  const server = await startDemoServer('journeys');
  try {
    const report = freshReport('journeys.json');
    const args = ['test', '--config', 'tests/e2e/playwright.config.ts', '--reporter=list,json'];
    const env = { ...server.env, CHROMIUM_PATH: chromium, PLAYWRIGHT_JSON_OUTPUT_FILE: report };
    const { code, output } = await runTool('@playwright/test/cli.js', args, env);
    return { counts: playwrightCounts(report, code), output };
  } finally {
    await server.stop();
  }
}

/**
 * @param {string} program in node_modules
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} env
 */
function runTool(program, args, env) {
  return runCommand(process.execPath, [inProject('node_modules', program), ...args], {
    env,
    limitMs: longestPart,
  });
}

/** @param {string} name */
function freshReport(name) {
  const file = path.join(testDataFolder, 'reports', name);
  mkdirSync(path.dirname(file), { recursive: true });
  rmSync(file, { force: true });
  return file;
}

/**
 * @param {string} name
 * @param {string} output
 * @returns {string} the file that keeps the whole output of a part
 */
export function keepOutput(name, output) {
  const file = freshReport(`${name}.log`);
  writeFileSync(file, output);
  return file;
}

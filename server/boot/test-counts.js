import { existsSync, readFileSync } from 'node:fs';

/** @typedef {{ passed: number, failed: number }} Counts */

/**
 * A check that is one thing: it passes or fails as a whole.
 * @param {number} code
 * @returns {Counts}
 */
export function oneCheck(code) {
  return code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 };
}

/**
 * A runner that failed without a failed test (a file that does not load, no file at all, a crash) still failed.
 * @param {Counts} counts
 * @param {number} code
 * @returns {Counts}
 */
function withExitCode({ passed, failed }, code) {
  return { passed, failed: code !== 0 && failed === 0 ? 1 : failed };
}

/**
 * @param {string} file written by vitest's JSON reporter
 * @param {number} code
 * @returns {Counts}
 */
export function vitestCounts(file, code) {
  const { numPassedTests = 0, numFailedTests = 0 } = readReport(file);
  return withExitCode({ passed: numPassedTests, failed: numFailedTests }, code);
}

/**
 * A flaky test passed only when it was asked again: that is a failure.
 * @param {string} file written by Playwright's JSON reporter
 * @param {number} code
 * @returns {Counts}
 */
export function playwrightCounts(file, code) {
  const { expected = 0, unexpected = 0, flaky = 0 } = readReport(file).stats ?? {};
  return withExitCode({ passed: expected, failed: unexpected + flaky }, code);
}

/**
 * @param {string} file written by the TAP reporter of Node's own runner
 * @param {number} code
 * @returns {Counts}
 */
export function tapCounts(file, code) {
  const tap = existsSync(file) ? readFileSync(file, 'utf8') : '';
  /** @param {string} name */
  const sum = (name) => Number(new RegExp(`^# ${name} (\\d+)$`, 'm').exec(tap)?.[1] ?? 0);
  return withExitCode({ passed: sum('pass'), failed: sum('fail') + sum('cancelled') }, code);
}

/** @param {string} file */
function readReport(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : {};
}

import { BootError } from './boot-error.js';
import { findProgram } from './find-program.js';
import { runCommand, lastLines } from './run-command.js';
import { step } from './step.js';

const aptEnvironment = { ...process.env, DEBIAN_FRONTEND: 'noninteractive', LC_ALL: 'C' };
// Another apt (a fresh machine updates itself) is waited for, not tripped over.
const aptOptions = ['-o', 'DPkg::Lock::Timeout=300', '-o', 'Acquire::Retries=3'];

/**
 * @param {string[]} packages
 * @returns {string} for a person to copy
 */
export function installCommand(packages) {
  return `sudo apt-get update && sudo apt-get install -y --no-install-recommends ${packages.join(' ')}`;
}

/**
 * Installs Debian packages as root, else with a sudo that asks no password.
 * @param {{ what: string, why: string, packages: string[], otherwise: string }} need `otherwise`: the way without them
 * @returns {Promise<void>}
 * @throws {BootError} with the exact command where this user may not install, or where apt fails
 */
export async function installDebianPackages({ what, why, packages, otherwise }) {
  const apt = findProgram('apt-get');
  if (!apt)
    throw new BootError(`${what} was not found (${why}), and this machine has no apt-get.`, otherwise);
  const prefix = await rootPrefix();
  const command = installCommand(packages);
  if (!prefix) {
    throw new BootError(
      `${what} was not found (${why}), and installing it needs root, which this user cannot become unasked.`,
      `Run: ${command}\nThen start again. ${otherwise}`,
    );
  }
  await step(`Installing ${packages.join(' and ')} from Debian (${why})`, async () => {
    const updated = await updateLists([...prefix, apt]);
    const args = [...prefix, apt, ...aptOptions, 'install', '-y', '--no-install-recommends', ...packages];
    const installed = await runArgs(args);
    if (installed.code !== 0) {
      const said = `${updated.code === 0 ? '' : lastLines(updated.output, 10)}\n${lastLines(installed.output)}`;
      throw new BootError(`${said}\n\nInstalling ${what} failed.`, `Try by hand: ${command}\n${otherwise}`);
    }
  });
}

/** @returns {Promise<string[] | undefined>} what to put before a command to run it as root */
async function rootPrefix() {
  if (process.getuid?.() === 0) return [];
  const sudo = findProgram('sudo');
  if (!sudo) return undefined;
  const { code } = await runArgs([sudo, '-n', 'true']);
  return code === 0 ? [sudo, '-n', '--preserve-env=DEBIAN_FRONTEND,LC_ALL'] : undefined;
}

/**
 * The lists have a lock that apt does not wait for; a failed update is no failure yet, old lists may do.
 * @param {string[]} apt
 */
async function updateLists(apt) {
  for (let attempt = 1; ; attempt += 1) {
    const result = await runArgs([...apt, ...aptOptions, 'update']);
    if (result.code === 0 || attempt === 24 || !result.output.includes('Could not get lock')) return result;
    await new Promise((resolve) => setTimeout(resolve, 5000));
  }
}

/** @param {string[]} command */
function runArgs([program = '', ...args]) {
  return runCommand(program, args, { env: aptEnvironment });
}

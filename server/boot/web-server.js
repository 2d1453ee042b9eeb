import { BootError } from './boot-error.js';
import { startChild } from './child-process.js';
import { entryCommand } from './entries.js';
import { projectFolder } from './paths.js';
import { closeAtEnd, isStopping } from './supervise.js';

/**
 * @typedef {object} WebServer
 * @property {string} address
 * @property {number} pid
 * @property {Promise<import('./child-process.js').Ending>} ended
 * @property {() => Promise<void>} stop it stops accepting, answers what it has begun, and ends
 */

/**
 * Starts the HTTP server and waits until its health route answers 200.
 * @param {object} options
 * @param {NodeJS.ProcessEnv} options.env see server-environment.js
 * @param {boolean} options.isDev
 * @param {number} options.lock kept by the server too, so that the next start waits for its end
 * @param {'inherit' | number} [options.output] a descriptor of a log file, or our own output
 * @returns {Promise<WebServer>}
 * @throws {BootError} where it ends or does not answer
 */
export async function startWebServer({ env, isDev, lock, output = 'inherit' }) {
  const [program, args] = entryCommand('index', { isDev });
  const child = startChild(program, args, {
    env,
    cwd: projectFolder,
    stdio: ['ignore', output, output, lock],
  });
  const stop = () => child.end(15_000);
  const forget = closeAtEnd('the server', stop);
  const address = `http://${reachableHost(env.HOST ?? '127.0.0.1')}:${env.PORT}`;
  await waitUntilHealthy(address, child.ended);
  return {
    address,
    pid: child.process.pid ?? 0,
    ended: child.ended,
    stop: async () => {
      forget();
      await stop();
    },
  };
}

/** @param {string} host an address to listen on, "all addresses" among them */
function reachableHost(host) {
  if (host === '0.0.0.0') return '127.0.0.1';
  if (host === '::') return '[::1]';
  return host.includes(':') ? `[${host}]` : host;
}

/**
 * @param {string} address
 * @param {Promise<import('./child-process.js').Ending>} ended
 */
async function waitUntilHealthy(address, ended) {
  let last = 'no answer yet';
  /** @type {import('./child-process.js').Ending | undefined} */
  let ending;
  void ended.then((value) => (ending = value));
  const until = Date.now() + 60_000;
  for (;;) {
    if (isStopping()) throw new BootError('A stop is under way.');
    if (ending)
      throw new BootError(
        `The server ended while starting (${ending.signal ?? `exit code ${ending.code}`}).`,
      );
    if (Date.now() > until)
      throw new BootError(`${address}/api/health did not answer 200 in 60 s (${last}).`);
    try {
      const response = await fetch(`${address}/api/health`, { signal: AbortSignal.timeout(5000) });
      if (response.ok) return;
      last = `${response.status}: ${(await response.text()).slice(0, 500)}`;
    } catch (error) {
      last = String(error);
    }
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}

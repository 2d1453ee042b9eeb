import { readFile } from 'node:fs/promises';

const LONGEST_WAIT_MS = 60_000;
const BETWEEN_LOOKS_MS = 50;

/**
 * Kills the server and waits until the starter's next one answers at the same address.
 * @param pidFile names the process; the starter rewrites it
 */
export async function restartServer(pidFile: string, baseUrl: string): Promise<void> {
  const before = await pidIn(pidFile);
  process.kill(before, 'SIGKILL');
  const until = Date.now() + LONGEST_WAIT_MS;
  while (Date.now() < until) {
    if ((await pidIn(pidFile)) !== before && (await isReady(baseUrl))) return;
    await new Promise((resolve) => setTimeout(resolve, BETWEEN_LOOKS_MS));
  }
  throw new Error(`No new server answered at ${baseUrl} within ${LONGEST_WAIT_MS / 1000} s.`);
}

async function pidIn(pidFile: string): Promise<number> {
  return Number((await readFile(pidFile, 'utf8')).trim());
}

async function isReady(baseUrl: string): Promise<boolean> {
  return fetch(`${baseUrl}/api/health`).then(
    (reply) => reply.ok,
    () => false,
  );
}

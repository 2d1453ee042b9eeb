import { spawn, type ChildProcess } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { once } from 'node:events';
import { entryCommand } from '#server/boot/entries.js';

const BETWEEN_LOOKS_MS = 20;
const LONGEST_WAIT_MS = 60_000;

/** A server of the built product, started by the bench. */
export interface CountryServer {
  baseUrl: string;
  /** Milliseconds from its start until it answered. */
  startedIn: number;
  /** Resident memory now, MB. */
  memory(): number;
  /** The most resident memory it has had, MB: the kernel's own figure. */
  peak(): number;
  /** Processor time it has taken, s. */
  processorTime(): number;
  stop(): Promise<void>;
}

/**
 * Starts the built server as `npm start` does and waits until it answers.
 * @param env as `server/boot/server-environment.js` makes it
 */
export async function startCountryServer(env: NodeJS.ProcessEnv): Promise<CountryServer> {
  const begin = performance.now();
  const child = spawn(...entryCommand('index', { isDev: false }), {
    env: { ...env, LOG_LEVEL: 'error' },
    stdio: ['ignore', 'inherit', 'inherit'],
  });
  const baseUrl = `http://127.0.0.1:${env.PORT}`;
  await untilHealthy(child, baseUrl);
  return {
    baseUrl,
    startedIn: performance.now() - begin,
    memory: () => kilobytes(child.pid!, 'VmRSS') / 1000,
    peak: () => kilobytes(child.pid!, 'VmHWM') / 1000,
    processorTime: () => processorSeconds(child.pid!),
    stop: async () => {
      const ended = once(child, 'exit');
      child.kill('SIGTERM');
      await ended;
    },
  };
}

async function untilHealthy(child: ChildProcess, baseUrl: string): Promise<void> {
  const until = Date.now() + LONGEST_WAIT_MS;
  while (Date.now() < until && child.exitCode === null) {
    const isUp = await fetch(`${baseUrl}/api/health`).then(
      (reply) => reply.ok,
      () => false,
    );
    if (isUp) return;
    await new Promise((resolve) => setTimeout(resolve, BETWEEN_LOOKS_MS));
  }
  throw new Error(`The server did not answer at ${baseUrl}.`);
}

/** A line of the kernel's account of a process. */
function kilobytes(pid: number, name: 'VmRSS' | 'VmHWM'): number {
  const line = new RegExp(`^${name}:\\s+(\\d+) kB`, 'm').exec(readFileSync(`/proc/${pid}/status`, 'utf8'));
  return Number(line?.[1]);
}

function processorSeconds(pid: number): number {
  const after = readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ')[1]!.split(' ');
  return (Number(after[11]) + Number(after[12])) / 100;
}

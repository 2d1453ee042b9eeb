import { randomBytes } from 'node:crypto';
import type { Sequelize } from 'sequelize';
import { uuidV7 } from '#shared/ids.ts';
import type { User } from '#server/policy/user.ts';

/** Where services take the time from: the past of a seeded register and midnight in a test are one call away. */
export interface Clock {
  now(): Date;
}

export const systemClock: Clock = { now: () => new Date() };

/** How a route signs a person in or out without touching the request: `server/auth/sign-in.ts` gives it. */
export interface SessionControl {
  /** Checks the password, counts failures and opens a session with a new id. */
  signIn(email: string, password: string): Promise<User>;
  /** Ends the session and clears its cookie. */
  signOut(): Promise<void>;
}

/** Who asks, when, and under which request: handed to every service as its first argument. */
export interface Context {
  requestId: string;
  /** The application's pool, as the least-privileged account. */
  database: Sequelize;
  clock: Clock;
  user: User | null;
  /** Where documents are kept; null for work that keeps none. */
  dataDir: string | null;
  /** Null where no browser asks. */
  session: SessionControl | null;
  /** Whether every reply is checked against its contract; in production the large ones are sampled. */
  checksEveryReply: boolean;
  /** Ten bytes for the next identifier; seeded for the demo network, from the system otherwise. */
  randomness(): Uint8Array;
}

/** A context for work that no request started (seeding, migrations, tests). */
export function makeContext(parts: Partial<Context> & { database: Sequelize }): Context {
  return {
    requestId: 'internal',
    clock: systemClock,
    user: null,
    dataDir: null,
    session: null,
    checksEveryReply: true,
    randomness: () => randomBytes(10),
    ...parts,
  };
}

/** The next identifier, ordered by the context's clock. */
export function newId(context: Context): string {
  return uuidV7(context.clock.now().getTime(), context.randomness());
}

/** The context's calendar day, UTC, as ISO 8601. */
export function today(context: Context): string {
  return context.clock.now().toISOString().slice(0, 10);
}

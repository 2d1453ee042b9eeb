import type { Sequelize } from 'sequelize';
import { makeContext, type Context } from '#server/http/context.ts';
import { drawsFor } from './draws.ts';
import { leaveDrafts } from './drafts.ts';
import { makePlan } from './make-plan.ts';
import { publishNotices } from './notices.ts';
import type { DemoPlan } from './plan.ts';
import { admitNetwork, type Admitted } from './seed-network.ts';
import { runStep } from './seed-steps.ts';

/** Says what is being done; one line per phase. */
export type Say = (line: string) => void;

/** What the register holds under the plan's own keys. */
export interface Seeded {
  plan: DemoPlan;
  valueUids: Map<string, string>;
}

/** The day on which the network is admitted. */
const FIRST_DAY = '2016-06-01';

/**
 * Fills an empty register with the demo network: every row through the services, as the application's account,
 * with a clock of the past. The same plan gives the same register, identifiers included, save for password hashes.
 */
export async function seedDemoNetwork(database: Sequelize, say: Say): Promise<Seeded> {
  const plan = makePlan();
  const clock = new PastClock();
  const context = makeContext({ database, clock, randomness: seededBytes(), requestId: 'demo network' });
  clock.turnTo(FIRST_DAY);
  const admitted = await admitNetwork(context);
  say(`  ${admitted.laboratoryIds.size} laboratories and ${admitted.people} people`);
  let year = '';
  for (const step of plan.steps) {
    if (step.day.slice(0, 4) !== year) {
      if (year !== '') say(`  ${year}: ${admitted.valueUids.size} values so far`);
      year = step.day.slice(0, 4);
    }
    clock.turnTo(step.day);
    await runStep(await signedBy(context, admitted, step), step, admitted);
  }
  await leaveDrafts(context, admitted);
  await publishNotices(context, admitted, (day) => clock.turnTo(day));
  say(`  ${year}: ${admitted.valueUids.size} values in all`);
  return { plan, valueUids: admitted.valueUids };
}

/** The person who did it: the signatory of the laboratory that enters it. */
async function signedBy(
  context: Context,
  admitted: Admitted,
  step: DemoPlan['steps'][number],
): Promise<Context> {
  const code =
    step.does === 'issue' || step.does === 'revise'
      ? step.certificate.registeredBy
      : step.does === 'withdraw'
        ? step.laboratory
        : null;
  return { ...context, user: (code && admitted.signatories.get(code)) || null };
}

/** Stands at a day, and moves on by seconds so that the acts of one day keep their order. */
class PastClock {
  #now = 0;

  /** From 08:00 of a day, or on from where it stands. */
  turnTo(day: string): void {
    this.#now = Math.max(Date.parse(`${day}T08:00:00Z`), this.#now + 7_000);
  }

  now(): Date {
    return new Date(this.#now);
  }
}

function seededBytes(): () => Uint8Array {
  const draws = drawsFor('identifiers');
  return () => Uint8Array.from({ length: 10 }, () => Math.floor(256 * draws.uniform()));
}

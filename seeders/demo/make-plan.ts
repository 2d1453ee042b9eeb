import { SUSPENSION } from './capabilities.ts';
import { daysAfter, workday } from './days.ts';
import { addLookAlikes } from './look-alikes.ts';
import { addNetwork } from './network.ts';
import { perform, ready, type Job } from './perform.ts';
import type { DemoPlan } from './plan.ts';
import { LAST_DAY, type Series } from './series.ts';
import { addDamage, addSpecials } from './specials.ts';
import { addStories } from './stories.ts';
import type { Happening } from './story-cast.ts';
import { emptyWorld, type World } from './world.ts';

/**
 * Makes the demo network: weights that drift, laboratories that measure them, and what is wrong on purpose. Pure:
 * the same plan each time.
 */
export function makePlan(): DemoPlan {
  const world = emptyWorld();
  const { series, pools } = addNetwork(world);
  const specials = addSpecials(world, pools);
  const stories = addStories(world, pools);
  addDamage(series);
  world.steps.push({ day: SUSPENSION.from, does: 'suspend scope', ...SUSPENSION });
  work(world, [...series, ...specials, ...stories.series], stories.happenings);
  addLookAlikes(world);
  const inOrder = world.steps.map((step, at) => ({ step, at }));
  inOrder.sort((a, b) => byDay(a.step, b.step) || a.at - b.at);
  return { steps: inOrder.map(({ step }) => step), catalogue: world.catalogue };
}

function byDay(a: { day: string }, b: { day: string }): number {
  return a.day < b.day ? -1 : a.day > b.day ? 1 : 0;
}

type Turn = { day: string } & ({ job: Job } | { happening: Happening });

/** Does the jobs by day; one whose references are not there yet waits. */
function work(world: World, series: readonly Series[], happenings: readonly Happening[]): void {
  const turns: Turn[] = [
    ...happenings.map((happening): Turn => ({ day: happening.day, happening })),
    ...series.flatMap((one) =>
      one.begins.map((begin, round): Turn => ({ day: begin, job: { series: one, round, begin } })),
    ),
  ].sort(byDay);
  for (let turn = turns.shift(); turn; turn = turns.shift()) {
    if ('happening' in turn) {
      turn.happening.happen();
      continue;
    }
    const prepared = ready(turn.job);
    if (prepared) {
      if (prepared.issued <= LAST_DAY) perform(world, prepared);
      continue;
    }
    const { series: waiting, round } = turn.job;
    if (waiting.keepsDays)
      throw new Error(`${waiting.id}, round ${round}: its reference is not there on ${turn.day}`);
    const day = workday(daysAfter(turn.day, 1));
    if (day > LAST_DAY) throw new Error(`${waiting.id}, round ${round} never found its references`);
    const at = turns.findIndex((other) => other.day > day);
    turns.splice(at === -1 ? turns.length : at, 0, { day, job: { ...turn.job, begin: day } });
  }
}

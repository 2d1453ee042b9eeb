import { daysAfter, workday } from './days.ts';
import { addNetwork } from './network.ts';
import { perform, ready, type Job } from './perform.ts';
import type { DemoPlan } from './plan.ts';
import { LAST_DAY } from './series.ts';
import { emptyWorld, type World } from './world.ts';

/**
 * Makes the demo network: weights that drift, laboratories that measure them, and what is wrong on purpose. Pure:
 * the same plan each time.
 */
export function makePlan(): DemoPlan {
  const world = emptyWorld();
  const jobs = addNetwork(world).flatMap((series) =>
    series.begins.map((begin, round): Job => ({ series, round, begin })),
  );
  work(world, jobs);
  const inOrder = world.steps.map((step, at) => ({ step, at }));
  inOrder.sort((a, b) => (a.step.day < b.step.day ? -1 : a.step.day > b.step.day ? 1 : a.at - b.at));
  return { steps: inOrder.map(({ step }) => step), catalogue: world.catalogue };
}

/** Does the jobs by day; one whose references are not there yet waits some days. */
function work(world: World, jobs: Job[]): void {
  const waiting = jobs.toSorted((a, b) => (a.begin < b.begin ? -1 : a.begin > b.begin ? 1 : 0));
  for (let job = waiting.shift(); job; job = waiting.shift()) {
    const prepared = ready(job);
    if (prepared) {
      if (prepared.issued <= LAST_DAY) perform(world, prepared);
      continue;
    }
    const later = { ...job, begin: workday(daysAfter(job.begin, 4)) };
    if (later.begin > LAST_DAY)
      throw new Error(`${job.series.id}, round ${job.round} never found its references`);
    const at = waiting.findIndex((other) => other.begin > later.begin);
    waiting.splice(at === -1 ? waiting.length : at, 0, later);
  }
}

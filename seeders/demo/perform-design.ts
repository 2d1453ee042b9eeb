import { issue, type Entry } from './certificate.ts';
import { combined } from './effects.ts';
import { buoyancy, carriedVariance, leanedError, leanedEffects, type Use } from './leaning.ts';
import type { ReadyJob } from './perform.ts';
import { printed } from './printed.ts';
import { changeRatio, massOfTwin, previousValue, type Result, type Task } from './result.ts';
import type { DemoValue } from './value.ts';
import { trueValue, type Quantity, type Weight } from './weight.ts';
import {
  buildUp,
  columnOf,
  covarianceMatrix,
  designEffects,
  drawErrors,
  solved,
  subdivision,
  type SolvedDesign,
} from './weighing.ts';
import type { World } from './world.ts';

const DESIGNS = { subdivision: solved(subdivision()), 'build-up': solved(buildUp()) };

/** The scatter of the comparator is pooled over so many performances of a design. */
const POOLED = 6;

/** No line of a design may differ from its last value by more than this many U of the difference. */
const QUIET = 1.3;

/** Determines a whole set in one weighing design: its lines share comparisons, so their own parts are correlated. */
export function performDesign(world: World, job: ReadyJob): DemoValue[] {
  const { series } = job;
  const design = DESIGNS[series.how as keyof typeof DESIGNS];
  const performance = `${series.id}/${job.round}`;
  const tasks = series.weights.flatMap((weight) =>
    series.quantities.map((quantity) => taskOf(job, design, weight, quantity)),
  );
  const results = drawQuietly(job, design, tasks, performance);
  const entries = results.map((result): Entry => ({
    result,
    hasBudget: true,
    ownEffects: designEffects(design, columnOf(result.task.weight), performance),
  }));
  return issue(world, {
    issuer: series.issuer,
    registeredBy: series.weights[0]!.owner,
    begin: job.begin,
    end: job.end,
    issued: job.issued,
    method: series.method,
    entries,
    group: {
      covariance: covarianceMatrix(entries.map((entry) => entry.ownEffects!)),
      degreesOfFreedom: POOLED * design.degreesOfFreedom,
      estimate: performance,
    },
  });
}

function taskOf(job: ReadyJob, design: SolvedDesign, weight: Weight, quantity: Quantity): Task {
  const toRestraints = design.toRestraints[design.columns.indexOf(columnOf(weight))]!;
  const uses = job
    .usesOf(weight, quantity)
    .map((use, at): Use => ({ ...use, sensitivity: Number(toRestraints[at]!.toPrecision(12)) }));
  const own = designEffects(design, columnOf(weight), '');
  return {
    issuer: job.series.issuer,
    weight,
    quantity,
    stage: null,
    day: job.end,
    leaning: { uses, sources: buoyancy(weight, quantity, uses, job.air) },
    ownU: Math.sqrt([...own.values()].reduce((sum, grams) => sum + grams ** 2, 0)),
    isAccredited: false,
  };
}

function drawQuietly(job: ReadyJob, design: SolvedDesign, tasks: Task[], performance: string): Result[] {
  for (let attempt = 0; attempt < 60; attempt += 1) {
    const errors = drawErrors(design, job.draws);
    const results: Result[] = [];
    for (const task of tasks) {
      // Conventional mass comes first; the mass of the same weighing keeps its identity with it.
      const twin = task.quantity === 'mass' ? results.at(-1) : undefined;
      results.push(resultOf(task, errors.get(columnOf(task.weight))!, twin));
    }
    const isQuiet = results.every((result) => {
      const previous = previousValue(result.task.weight, result.task.quantity);
      if (!previous) return true;
      const effects = combined([
        { sensitivity: 1, effects: leanedEffects(result.task.leaning, performance) },
        { sensitivity: 1, effects: designEffects(design, columnOf(result.task.weight), performance) },
      ]);
      return changeRatio(result.printed, effects, previous) <= QUIET;
    });
    if (isQuiet) return results;
  }
  throw new Error(`No quiet performance of ${performance}: its weights drift more than its U`);
}

function resultOf(task: Task, ownError: number, twin?: Result): Result {
  const carried = carriedVariance(task.leaning);
  const deviation = twin
    ? massOfTwin(twin)
    : trueValue(task.weight, task.quantity, task.day) + leanedError(task.leaning, task.day) + ownError;
  return {
    task,
    deviation,
    printed: printed(deviation, 2 * Math.sqrt(carried + task.ownU ** 2)),
    localU: task.ownU,
    fillU: 0,
    carried,
  };
}

import type { RandomSource } from '#shared/engine/uncertainty/random.ts';
import { issue, type Entry } from './certificate.ts';
import { daysAfter, workday } from './days.ts';
import { between, drawsFor } from './draws.ts';
import { buoyancy, type Use } from './leaning.ts';
import { measure, type Result } from './result.ts';
import { ADOPTION, CONSENSUS, onConsensusScale, REALIZED } from './scales.ts';
import { answer, type Series } from './series.ts';
import { performDesign } from './perform-design.ts';
import type { DemoValue } from './value.ts';
import { classLimitOf, trueValue, type Quantity, type Weight } from './weight.ts';
import type { World } from './world.ts';

/** One calibration of a series. */
export interface Job {
  series: Series;
  round: number;
  begin: string;
}

/** A job with its days and what its lines lean on. */
export interface ReadyJob extends Job {
  end: string;
  issued: string;
  /** g/cm3. */
  air: number;
  draws: RandomSource;
  usesOf(weight: Weight, quantity: Quantity): Use[];
}

/** Days, references and chance of a job; null while a reference is not there, so that the work has to wait. */
export function ready(job: Job): ReadyJob | null {
  const { series, begin, round } = job;
  const end = workday(daysAfter(begin, series.workDays));
  const uses = new Map<string, Use[]>();
  for (const weight of series.weights) {
    for (const quantity of series.quantities) {
      const found = series.wishesFor(weight, begin).map((wish): Use | null => {
        const value = answer(wish, quantity, begin, end);
        return value && { value, sensitivity: wish.sensitivity, usedAs: wish.usedAs ?? 'certificate' };
      });
      if (found.includes(null)) return null;
      uses.set(`${weight.registryNo} ${quantity}`, found as Use[]);
    }
  }
  const draws = drawsFor(`${series.id} ${round}`);
  return {
    ...job,
    end,
    issued: workday(daysAfter(end, series.issueDays)),
    air: between(draws, 0.001165, 0.001215),
    draws,
    usesOf: (weight, quantity) => uses.get(`${weight.registryNo} ${quantity}`)!,
  };
}

/** Does the work and issues its certificate. */
export function perform(world: World, job: ReadyJob): DemoValue[] {
  const { series } = job;
  if (series.how === 'subdivision' || series.how === 'build-up') return performDesign(world, job);
  const entries = series.weights.flatMap((weight) => entriesFor(world, job, weight));
  return issue(world, {
    issuer: series.issuer,
    registeredBy: series.weights[0]!.owner,
    begin: job.begin,
    end: job.end,
    issued: job.issued,
    method: series.method,
    entries,
  });
}

function entriesFor(world: World, job: ReadyJob, weight: Weight): Entry[] {
  const { series } = job;
  const [first, second] = series.quantities;
  const found = measureIn(job, weight, first!, null);
  if (mayBeAdjusted(job, weight, found)) return adjust(world, job, weight, found);
  if (!second) return [entryOf(series, found)];
  return [entryOf(series, found), entryOf(series, measureIn(job, weight, second, null, found))];
}

function measureIn(
  job: ReadyJob,
  weight: Weight,
  quantity: Quantity,
  stage: 'as found' | 'as left' | null,
  twin: Result | null = null,
): Result {
  const { series } = job;
  const uses = series.how === 'recognized certificate' ? [] : job.usesOf(weight, quantity);
  const isFine = weight.class === null || ['E1', 'E2', 'F1'].includes(weight.class);
  const scale =
    series.how === 'recognized certificate' && job.begin >= ADOPTION ? [onConsensusScale(weight.grams)] : [];
  const task = {
    issuer: series.issuer,
    weight,
    quantity,
    stage,
    day: job.end,
    leaning: {
      uses,
      sources: [...(isFine && uses.length > 0 ? buoyancy(weight, quantity, uses, job.air) : []), ...scale],
    },
    ownU: series.ownU ?? series.ownShare * classLimitOf(weight.class, weight.nominal),
    isAccredited: series.isAccredited,
  };
  return measure(task, job.draws, { twin });
}

function entryOf(series: Series, result: Result): Entry {
  if (series.how !== 'recognized certificate') return { result, hasBudget: series.hasBudget };
  const scale = result.task.leaning.sources.length > 0 ? CONSENSUS : REALIZED;
  return { result, hasBudget: false, rootKind: 'recognized certificate', scale };
}

/** Weights from F2 down are adjusted when they near their limit, unless somebody still works with them. */
function mayBeAdjusted({ begin }: ReadyJob, weight: Weight, { printed }: Result): boolean {
  if (!weight.class || ['E1', 'E2', 'F1'].includes(weight.class) || weight.values.length === 0) return false;
  const limit = classLimitOf(weight.class, weight.nominal);
  return Math.abs(printed.deviation) + printed.expandedU > 0.97 * limit && weight.lastUsedOn < begin;
}

/** As found, then adjusted on the first day, then as left: a new epoch. */
function adjust(world: World, job: ReadyJob, weight: Weight, found: Result): Entry[] {
  const { series, begin } = job;
  const asFound = { ...found, task: { ...found.task, stage: 'as found' as const } };
  const limit = classLimitOf(weight.class, weight.nominal);
  const now = trueValue(weight, 'conventional mass', begin);
  weight.truth.steps.push({ from: begin, by: limit * between(job.draws, 0.05, 0.2) - now });
  weight.epochs.push(begin);
  world.steps.push({
    day: begin,
    does: 'open epoch',
    registryNo: weight.registryNo,
    reason: 'adjusted',
    note: `Adjusted by ${series.issuer} after it was found near or beyond its limit.`,
  });
  const asLeft = measureIn(job, weight, 'conventional mass', 'as left');
  return [entryOf(series, asFound), entryOf(series, asLeft)];
}

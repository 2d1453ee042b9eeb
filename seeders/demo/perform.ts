import type { RandomSource } from '#shared/engine/uncertainty/random.ts';
import { isSuspended } from './capabilities.ts';
import { placeOf } from './catalogue.ts';
import { issue, type Entry } from './certificate.ts';
import { daysAfter, workday } from './days.ts';
import { between, drawsFor } from './draws.ts';
import { buoyancy, type Use } from './leaning.ts';
import { measure, type Result } from './result.ts';
import { ADOPTION, CONSENSUS, onConsensusScale, REALIZED } from './scales.ts';
import { answer, type Series } from './series.ts';
import { withSlips } from './faults.ts';
import { noteOmissions, OMISSIONS } from './omissions.ts';
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

/** Days, references and chance of a job; null while something is not there, so that the work has to wait. */
export function ready(job: Job): ReadyJob | null {
  const { series, begin, round } = job;
  const kept = series.keepsDays ? (day: string) => day : workday;
  const end = kept(daysAfter(begin, series.workDays));
  const issued = kept(daysAfter(end, series.issueDays));
  if (series.isAccredited && !series.ignoresScope && isSuspended(series.issuer, begin, issued)) return null;
  const uses = new Map<string, Use[]>();
  for (const weight of series.weights) {
    for (const quantity of series.quantities) {
      const found = usesFor(job, weight, quantity, end);
      if (!found) return null;
      uses.set(`${weight.registryNo} ${quantity}`, found);
    }
  }
  const draws = drawsFor(`${series.id} ${round}`);
  return {
    ...job,
    end,
    issued,
    air: between(draws, 0.001165, 0.001215),
    draws,
    usesOf: (weight, quantity) => uses.get(`${weight.registryNo} ${quantity}`)!,
  };
}

function usesFor({ series, begin }: Job, weight: Weight, quantity: Quantity, end: string): Use[] | null {
  if (series.how === 'recognized certificate') return [];
  const found = series.wishesFor(weight, begin).map((wish): Use | null => {
    const value = series.picks ? series.picks() : answer(wish, quantity, begin, end);
    return value && { value, sensitivity: wish.sensitivity, usedAs: wish.usedAs ?? 'certificate' };
  });
  return found.includes(null) ? null : (found as Use[]);
}

/** Does the work and issues its certificate. */
export function perform(world: World, job: ReadyJob): DemoValue[] {
  const { series, round } = job;
  const values =
    series.how === 'subdivision' || series.how === 'build-up'
      ? performDesign(world, job)
      : performEach(world, job);
  world.rounds.set(`${series.id}/${round}`, values);
  series.after?.(round, values);
  return values;
}

function performEach(world: World, job: ReadyJob): DemoValue[] {
  const { series } = job;
  const right = series.weights.flatMap((weight) => entriesFor(world, job, weight));
  const omits = series.omits?.(job.round);
  if (omits) right[0] = { ...right[0]!, omits };
  const { entries, slips } = withSlips(world, job, right);
  const values = issue(world, {
    issuer: series.issuer,
    registeredBy: series.weights[0]!.owner,
    begin: job.begin,
    end: job.end,
    issued: job.issued,
    method: series.method,
    entries,
  });
  for (const slip of slips) world.catalogue.push({ ...slip, ...placeOf(values[slip.line - 1]!) });
  noteOmissions(world, entries, values);
  return values;
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
  return measure(task, job.draws, { twin, wanted: isToBeQuestion(job, weight) ? 'question' : 'quiet' });
}

/** Now and then an honest value lies beyond U of the change: one pair in twenty does. */
function isToBeQuestion({ series, round }: Job, weight: Weight): boolean {
  return (
    round > 0 && series.quantities.length === 1 && drawsFor(`${weight.registryNo} ${round}`).uniform() < 0.025
  );
}

function entryOf(series: Series, result: Result): Entry {
  const isUnitConfirmed = followsUnitSlip(result);
  if (series.how !== 'recognized certificate') {
    return { result, hasBudget: series.hasBudget, isUnitConfirmed };
  }
  const scale = result.task.leaning.sources.length > 0 ? CONSENSUS : REALIZED;
  return { result, hasBudget: false, rootKind: 'recognized certificate', scale };
}

/** After a slip of the unit the right value is questioned at issue; the person looks and confirms it. */
function followsUnitSlip({ task, printed }: Result): boolean {
  const last = task.weight.values.at(-1);
  if (!last?.isFaulty) return false;
  const ratio = last.expandedU / printed.expandedU;
  return ratio > 100 || ratio < 0.01;
}

/** Weights from F2 down are adjusted when they near their limit or were knocked, unless somebody still works with them. */
function mayBeAdjusted({ begin }: ReadyJob, weight: Weight, { printed }: Result): boolean {
  const last = weight.values.at(-1);
  if (!weight.class || ['E1', 'E2', 'F1'].includes(weight.class) || !last) return false;
  const limit = classLimitOf(weight.class, weight.nominal);
  const isNearLimit = Math.abs(printed.deviation) + printed.expandedU > 0.97 * limit;
  const isKnocked = !last.isFaulty && Math.abs(printed.deviation - last.deviation) > 0.8 * limit;
  return (isNearLimit || isKnocked) && weight.lastUsedOn < begin;
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
  if (isFoundLeftOut(world, job, weight)) return [{ ...entryOf(series, asLeft), omits: 'result as found' }];
  return [entryOf(series, asFound), entryOf(series, asLeft)];
}

/** On three certificates the result before the adjustment is left out. */
function isFoundLeftOut(world: World, { round }: ReadyJob, weight: Weight): boolean {
  const { kind } = OMISSIONS['result as found'];
  const made = new Set(world.catalogue.filter((entry) => entry.kind === kind).map((e) => e.certificateNo));
  return made.size < 3 && drawsFor(`${weight.registryNo} ${round} as found`).uniform() < 0.3;
}

import type { RandomSource } from '#shared/engine/uncertainty/random.ts';
import { bestCapabilityOf } from './capabilities.ts';
import { cutNormal } from './draws.ts';
import { combined, covarianceOf, effect, type Effects } from './effects.ts';
import { carriedVariance, leanedEffects, leanedError, type Leaning } from './leaning.ts';
import { printed, type Printed } from './printed.ts';
import type { DemoValue } from './value.ts';
import { trueValue, type Quantity, type Weight } from './weight.ts';

/** What is to be measured, and how well. */
export interface Task {
  issuer: string;
  weight: Weight;
  quantity: Quantity;
  stage: 'as found' | 'as left' | null;
  /** Last day of the weighing. */
  day: string;
  leaning: Leaning;
  /** Standard uncertainty of the laboratory's own work on this line, g. */
  ownU: number;
  /** Claimed under accreditation: then U is not below the best capability. */
  isAccredited: boolean;
}

/** A result before it stands on a certificate. */
export interface Result {
  task: Task;
  /** Deviation before rounding, g. */
  deviation: number;
  printed: Printed;
  /** The part of the stated u that is the laboratory's own, g. */
  localU: number;
  /** Of that: what only fills up to the best capability, g. */
  fillU: number;
  carried: number;
}

/** Up to this E a change since the last value is no question. */
const QUIET = 0.97;

/** How a result is to be drawn. */
export interface Drawing {
  /** `question`: the change since the last value exceeds U of the difference, but not by a half. */
  wanted?: 'quiet' | 'question';
  /** The conventional mass of the same weighing, of which this is the mass. */
  twin?: Result | null;
}

/** Own u of a line so that U is not below the best capability, g. */
export function ownPart(task: Task, carried: number): { localU: number; fillU: number } {
  const best = task.isAccredited ? bestCapabilityOf(task.issuer, task.quantity, task.weight.nominal) : null;
  const missing = best === null ? 0 : (best / 2) ** 2 - carried - task.ownU ** 2;
  const fillU = Math.sqrt(Math.max(0, missing));
  return { localU: Math.hypot(task.ownU, fillU), fillU };
}

/**
 * Measures: the true value, what the references and volumes are off by, and the laboratory's own error, drawn with
 * its own u. Draws again where the change since the last value would be a question that is not wanted.
 */
export function measure(
  task: Task,
  draws: RandomSource,
  { wanted = 'quiet', twin = null }: Drawing = {},
): Result {
  const carried = carriedVariance(task.leaning);
  const { localU, fillU } = ownPart(task, carried);
  const expandedU = 2 * Math.sqrt(carried + localU ** 2);
  const at = (deviation: number): Result => ({
    task,
    deviation,
    printed: printed(deviation, expandedU),
    localU,
    fillU,
    carried,
  });
  if (twin) return at(massOfTwin(twin));
  const expected = trueValue(task.weight, task.quantity, task.day) + leanedError(task.leaning, task.day);
  const previous = previousValue(task.weight, task.quantity, task.stage === 'as left');
  const effects = combined([
    { sensitivity: 1, effects: leanedEffects(task.leaning, 'own') },
    { sensitivity: 1, effects: effect('own', localU) },
  ]);
  const distance = (result: Result) => {
    const ratio = previous ? changeRatio(result.printed, effects, previous) : 0;
    if (wanted === 'quiet') return Math.max(0, ratio - QUIET);
    return ratio > 1.05 && ratio < 1.38 ? 0 : Math.abs(ratio - 1.2);
  };
  const limit = wanted === 'question' ? 2.6 : 2;
  let best = at(expected + localU * cutNormal(draws, limit));
  for (let attempt = 0; attempt < 80 && distance(best) > 0; attempt += 1) {
    const next = at(expected + localU * cutNormal(draws, limit));
    if (distance(next) < distance(best)) best = next;
  }
  return best;
}

/** Mass of a weight whose conventional mass was found, by the density on record: the two keep their identity, g. */
export function massOfTwin({ task: { weight }, deviation }: Result): number {
  const density = Number(weight.density?.value ?? 8000);
  const excess = (1.2 / density - 1.2 / 8000) / (1 - 1.2 / density);
  return weight.grams * excess + deviation * (1 + excess);
}

/** The last value of the same kind in the present epoch. */
export function previousValue(
  weight: Weight,
  quantity: Quantity,
  isAfterAdjustment = false,
): DemoValue | null {
  if (isAfterAdjustment) return null;
  const same = weight.values.filter(
    (value) =>
      value.quantity === quantity &&
      value.epoch === weight.epochs.length - 1 &&
      value.ends.length === 0 &&
      !value.isFaulty,
  );
  return same.at(-1) ?? null;
}

/** |change| / U(change) at k = 2, with covariance and rounding, as rule B-19 takes it. */
export function changeRatio(result: Printed, effects: Effects, previous: DemoValue): number {
  const rounding = (result.halfDigit ** 2 + previous.halfDigit ** 2) / 3;
  const independent = (result.expandedU / 2) ** 2 + previous.u ** 2;
  const correlated = independent - 2 * covarianceOf(effects, previous.effects);
  const u = Math.sqrt((correlated > 0 ? correlated : independent) + rounding);
  return Math.abs(result.deviation - previous.deviation) / (2 * u);
}

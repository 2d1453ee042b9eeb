import type { RandomSource } from '#shared/engine/uncertainty/random.ts';
import { cutNormal } from './draws.ts';
import { yearsOf } from './days.ts';

/**
 * How the true conventional mass of a weight runs through the years, as deviation from nominal in g: a start, a
 * steady rate, a random walk and steps. Nobody in the network knows it; measurements are drawn around it.
 */
export interface Truth {
  start: number;
  /** g per year. */
  rate: number;
  /** The walk at the turn of each year from 2016 on. */
  walk: readonly number[];
  /** Damage and adjustments, in order. */
  steps: { from: string; by: number }[];
}

const YEARS = 12;

/** Drift as a share of the maximum permissible error: rate and walk per year (1 to 2 ug per year for E1 at 1 kg). */
const DRIFT: Record<string, { rate: number; wear: number; walk: number }> = {
  E1: { rate: 0.003, wear: 0, walk: 0.002 },
  E2: { rate: 0.005, wear: 0, walk: 0.003 },
  F1: { rate: 0.008, wear: 0, walk: 0.004 },
  F2: { rate: 0.01, wear: -0.006, walk: 0.005 },
  M1: { rate: 0.006, wear: -0.016, walk: 0.005 },
  M2: { rate: 0.006, wear: -0.016, walk: 0.005 },
  M3: { rate: 0.006, wear: -0.016, walk: 0.005 },
};

/**
 * Draws a truth for a weight of a class.
 * @param limit maximum permissible error, g
 * @param start deviation at the turn of 2016, g
 */
export function drawTruth(draws: RandomSource, weightClass: string, limit: number, start: number): Truth {
  const { rate, wear, walk } = DRIFT[weightClass] ?? DRIFT.E1!;
  let position = 0;
  const knots = [0];
  for (let year = 1; year <= YEARS; year += 1) {
    position += walk * limit * cutNormal(draws, 2);
    knots.push(position);
  }
  return { start, rate: limit * (wear + rate * cutNormal(draws, 2)), walk: knots, steps: [] };
}

/** True conventional deviation on a day, g. */
export function trueDeviation(truth: Truth, day: string): number {
  const years = Math.max(0, yearsOf(day));
  const knot = Math.min(Math.floor(years), truth.walk.length - 2);
  const [before, after] = [truth.walk[knot]!, truth.walk[knot + 1]!];
  const steps = truth.steps.reduce((sum, step) => (step.from <= day ? sum + step.by : sum), 0);
  return truth.start + truth.rate * years + before + (after - before) * (years - knot) + steps;
}

import { EngineError } from '../errors.ts';

/** How a travelling standard is taken to change between the pilot's visits. */
export type DriftModel = 'line' | 'bracketing' | 'none';

/**
 * Weights of the pilot's visits in the reference value at `time`; they sum to 1. `line`: the least squares line
 * through all visits; `bracketing`: straight between the visit before and the one after (petals, where the standard
 * may wander); `none`: the mean of all visits.
 * @throws EngineError `one-date`, `not-bracketed`
 */
export function visitWeights(
  model: DriftModel,
  visits: readonly number[],
  time: number,
  field: string,
): number[] {
  if (model === 'none') return visits.map(() => 1 / visits.length);
  return model === 'line' ? lineWeights(visits, time, field) : bracketWeights(visits, time, field);
}

function lineWeights(visits: readonly number[], time: number, field: string): number[] {
  const mean = visits.reduce((sum, visit) => sum + visit, 0) / visits.length;
  const spread = visits.reduce((sum, visit) => sum + (visit - mean) ** 2, 0);
  if (spread === 0) {
    throw new EngineError(
      'one-date',
      field,
      'visits on one day',
      'A drift line needs visits of the pilot on at least two days.',
    );
  }
  return visits.map((visit) => 1 / visits.length + ((time - mean) * (visit - mean)) / spread);
}

function bracketWeights(visits: readonly number[], time: number, field: string): number[] {
  const [before, after] = bracket(visits, time, field);
  const gap = visits[after]! - visits[before]!;
  const share = gap === 0 ? 0 : (time - visits[before]!) / gap;
  return visits.map((_, v) => (v === before ? 1 - share : 0) + (v === after ? share : 0));
}

/** Places of the latest visit up to `time` and the earliest from it on. @throws EngineError `not-bracketed` */
export function bracket(visits: readonly number[], time: number, field: string): [number, number] {
  const order = visits.map((_, v) => v).sort((a, b) => visits[a]! - visits[b]!);
  const before = order.findLast((v) => visits[v]! <= time);
  const after = order.find((v) => visits[v]! >= time);
  if (before !== undefined && after !== undefined) return [before, after];
  throw new EngineError(
    'not-bracketed',
    field,
    time,
    'A time between two visits of the pilot is expected; add a visit or fit a line.',
  );
}

/**
 * Covariance at two times of a random walk tied down at the visits around them:
 * `rate^2 (s - a)(b - t) / (b - a)` for s <= t in the same gap from a to b, 0 across gaps.
 * @param rate standard deviation per square root of the time unit
 */
export function wanderCovariance(
  visits: readonly number[],
  one: number,
  other: number,
  rate: number,
  field: string,
): number {
  const [s, t] = [Math.min(one, other), Math.max(one, other)];
  const [a, b] = bracket(visits, s, field).map((v) => visits[v]!) as [number, number];
  if (b === a || t > b) return 0;
  return (rate ** 2 * (s - a) * (b - t)) / (b - a);
}

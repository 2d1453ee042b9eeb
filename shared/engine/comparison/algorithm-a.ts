import { median, medianAbsoluteDeviation } from './order-statistics.ts';

/** A robust value and spread. `coefficients` are the value's sensitivities to each result, its spread held fixed. */
export type RobustValue = { value: number; spread: number; coefficients: number[] };

const CLIP = 1.5;
/** ISO 13528 rounds the exact 1.13339 to this. */
const SPREAD_FACTOR = 1.134;
const MOST_ITERATIONS = 10_000;

/**
 * Algorithm A of ISO 13528:2015 annex C.3 (formulas as confirmed by its worked example): robust mean and standard
 * deviation with results drawn in to `x* +/- 1.5 s*`, the factor 1.134, run to full convergence rather than to the
 * third significant figure. Where more than half the results are equal the spread is 0 and the value theirs.
 * @param values at least two
 */
export function algorithmA(values: readonly number[]): RobustValue {
  let value = median(values);
  let spread = 1.483 * medianAbsoluteDeviation(values);
  for (let iteration = 0; iteration < MOST_ITERATIONS; iteration += 1) {
    const clip = CLIP * spread;
    const drawn = values.map((x) => Math.min(Math.max(x, value - clip), value + clip));
    const origin = value;
    const mean = origin + drawn.reduce((sum, x) => sum + (x - origin), 0) / drawn.length;
    const squares = drawn.reduce((sum, x) => sum + (x - mean) ** 2, 0);
    const next = SPREAD_FACTOR * Math.sqrt(squares / (drawn.length - 1));
    const settled = Math.abs(mean - value) + Math.abs(next - spread) <= 1e-15 * next;
    value = mean;
    spread = next;
    if (settled) break;
  }
  const inside = values.map((x) => Number(Math.abs(x - value) <= CLIP * spread));
  const count = inside.reduce((sum, one) => sum + one, 0);
  return { value, spread, coefficients: inside.map((one) => one / count) };
}

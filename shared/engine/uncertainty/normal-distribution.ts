import { requireNumber } from '../quantity/domain.ts';

const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);

/** From this deviate on the continued fraction converges faster than the series and loses no digits. */
const SERIES_LIMIT = 3;

/** Density of the standard normal distribution. */
export function normalDensity(z: number): number {
  return Math.exp(-0.5 * z * z) / ROOT_TWO_PI;
}

/** The area from 0 to z by the series z + z3/3 + z5/15 + ..., whose terms all have one sign. */
function areaFromZero(z: number): number {
  let term = z;
  let sum = z;
  for (let k = 3; Math.abs(term) > 1e-17 * Math.abs(sum); k += 2) {
    term *= (z * z) / k;
    sum += term;
  }
  return normalDensity(z) * sum;
}

/** The area above z by Laplace's continued fraction, from its tail upwards; z at least `SERIES_LIMIT`. */
function areaAbove(z: number): number {
  let fraction = z;
  for (let k = 120; k >= 1; k -= 1) fraction = z + k / fraction;
  return normalDensity(z) / fraction;
}

/**
 * Probability that a standard normal quantity exceeds z, exact in the far tail too; infinite z allowed.
 *
 * Source: series and continued fraction of the normal integral (Abramowitz and Stegun, 26.2.11 and 26.2.14, from memory).
 */
export function normalUpperTail(z: number): number {
  if (z === Infinity) return 0;
  if (z < 0) return 1 - normalUpperTail(-z);
  return z < SERIES_LIMIT ? 0.5 - areaFromZero(z) : areaAbove(z);
}

/**
 * Probability that a standard normal quantity is at most z; infinite z allowed.
 *
 * Source: as `normalUpperTail`.
 *
 * @throws EngineError `not-finite` for what is no number
 */
export function normalDistribution(z: number): number {
  return normalUpperTail(Math.abs(z) === Infinity ? -z : -requireNumber(z, 'z'));
}

/** Probability that a standard normal quantity lies between two deviates; loses no digits in either tail. */
export function normalBetween(lower: number, upper: number): number {
  return lower > 0
    ? normalUpperTail(lower) - normalUpperTail(upper)
    : normalDistribution(upper) - normalDistribution(lower);
}

/**
 * The deviate a standard normal quantity stays below with a given probability.
 *
 * Source: solved from `normalUpperTail`, not read from a table.
 *
 * @param probability more than 1e-300 and less than 1
 * @throws EngineError `not-finite` or `out-of-range`
 */
export function normalQuantile(probability: number): number {
  requireNumber(probability, 'probability', { above: 1e-300, below: 1 });
  if (probability > 0.5) return upperDeviate(1 - probability);
  return 0 - upperDeviate(probability); // not the unary minus: the median is 0, not -0
}

/**
 * The deviate exceeded with probability `tail`, at most one half. Newton's method on the logarithm of the tail,
 * which is concave; the start lies above the root since the tail is below exp(-z2/2)/2, so every step falls towards it.
 */
function upperDeviate(tail: number): number {
  let z = Math.sqrt(Math.max(0, -2 * Math.log(2 * tail)));
  for (let step = 0; step < 60; step += 1) {
    const area = normalUpperTail(z);
    const change = (Math.log(area / tail) * area) / normalDensity(z);
    z += change;
    if (Math.abs(change) <= 1e-15 * (1 + z)) break;
  }
  return z;
}

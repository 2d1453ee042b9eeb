import { requireNumber, requireWhole } from '../quantity/domain.ts';
import { normalUpperTail } from '../uncertainty/normal-distribution.ts';

/**
 * Probability that a chi-squared variable exceeds `x`, by the finite sum for whole degrees of freedom
 * (Abramowitz and Stegun 26.4.4 and 26.4.5, from memory); all terms are positive, so the far tail keeps its digits.
 * @param degreesOfFreedom whole, at least 0; with 0 the variable is 0 itself
 * @throws EngineError `not-whole`, `not-finite`, `out-of-range`
 */
export function chiSquaredUpperTail(x: number, degreesOfFreedom: number): number {
  requireWhole(degreesOfFreedom, 'degreesOfFreedom', { min: 0 });
  if (x === Infinity) return degreesOfFreedom === 0 ? 1 : 0;
  requireNumber(x, 'x', { min: 0 });
  if (x === 0 || degreesOfFreedom === 0) return x === 0 ? 1 : 0;
  const half = x / 2;
  const odd = degreesOfFreedom % 2 === 1;
  // Each step raises the shape a by 1: Q(a + 1, h) = Q(a, h) + h^a e^-h / Gamma(a + 1).
  let sum = odd ? 2 * normalUpperTail(Math.sqrt(x)) : Math.exp(-half);
  let logTerm = odd ? -half + Math.log(half) / 2 - Math.log(Math.sqrt(Math.PI) / 2) : -half + Math.log(half);
  for (let a = odd ? 0.5 : 1; a < degreesOfFreedom / 2; a += 1) {
    sum += Math.exp(logTerm);
    logTerm += Math.log(half / (a + 1));
  }
  return Math.min(1, sum);
}

/**
 * The value a chi-squared variable exceeds with the given probability, by bisection to the last digits.
 * Source: solved from `chiSquaredUpperTail`, not read from a table.
 * @param probability above 0, below 1
 * @param degreesOfFreedom whole, at least 1
 * @throws EngineError `not-whole`, `not-finite`, `out-of-range`
 */
export function chiSquaredUpperPoint(probability: number, degreesOfFreedom: number): number {
  requireNumber(probability, 'probability', { above: 0, below: 1 });
  requireWhole(degreesOfFreedom, 'degreesOfFreedom', { min: 1 });
  let low = 0;
  let high = degreesOfFreedom + 1;
  while (chiSquaredUpperTail(high, degreesOfFreedom) > probability) high *= 2;
  for (let step = 0; step < 100; step += 1) {
    const middle = (low + high) / 2;
    if (chiSquaredUpperTail(middle, degreesOfFreedom) > probability) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

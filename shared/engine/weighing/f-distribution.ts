import { requireLevel, requireNumber } from '../quantity/domain.ts';
import { betaFraction } from '../uncertainty/beta-fraction.ts';

/**
 * Probability that F with `numerator` and `denominator` degrees of freedom exceeds `ratio`.
 * Domain: ratio >= 0, degrees of freedom finite and at least 1; about 1e-12 absolute.
 * @throws EngineError `out-of-range`, `not-finite`
 */
export function fUpperTail(ratio: number, numerator: number, denominator: number): number {
  requireNumber(ratio, 'ratio', { min: 0 });
  requireNumber(numerator, 'numerator', { min: 1 });
  requireNumber(denominator, 'denominator', { min: 1 });
  return incompleteBeta((numerator / denominator) * ratio, denominator / 2, numerator / 2);
}

/**
 * The ratio that F exceeds with probability `upperTail`: the critical value of a one-sided F test.
 * @throws EngineError `out-of-range`, `not-finite`
 */
export function fCriticalValue(upperTail: number, numerator: number, denominator: number): number {
  requireLevel(upperTail);
  let low = -1;
  let high = 1;
  while (fUpperTail(Math.exp(high), numerator, denominator) > upperTail) high *= 2;
  while (fUpperTail(Math.exp(low), numerator, denominator) < upperTail) low *= 2;
  for (let step = 0; step < 100; step += 1) {
    const middle = (low + high) / 2;
    if (fUpperTail(Math.exp(middle), numerator, denominator) > upperTail) low = middle;
    else high = middle;
  }
  return Math.exp((low + high) / 2);
}

/** Regularised incomplete beta function of `1 / (1 + odds)`; the two parts keep digits near 0 and near 1. */
function incompleteBeta(odds: number, p: number, q: number): number {
  const x = 1 / (1 + odds);
  if (odds === 0) return 1;
  if (x === 0) return 0;
  const y = odds / (1 + odds);
  const scale = Math.exp(p * Math.log(x) + q * Math.log(y) + logGamma(p + q) - logGamma(p) - logGamma(q));
  if (x < (p + 1) / (p + q + 2)) return (scale * betaFraction(x, p, q)) / p;
  return 1 - (scale * betaFraction(y, q, p)) / q;
}

/** Natural logarithm of the gamma function for x > 0: Stirling's series after shifting x above 15. */
function logGamma(x: number): number {
  let shift = 0;
  let z = x;
  for (; z < 15; z += 1) shift -= Math.log(z);
  const w = 1 / (z * z);
  const series = (1 / 12 - w * (1 / 360 - w * (1 / 1260 - w * (1 / 1680 - w / 1188)))) / z;
  return shift + (z - 0.5) * Math.log(z) - z + 0.5 * Math.log(2 * Math.PI) + series;
}

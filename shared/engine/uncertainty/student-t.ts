import { betaFraction } from './beta-fraction.ts';

/**
 * Logarithm of Gamma(x + 1/2) / Gamma(x), without the cancellation of two large logarithms: the asymptotic series
 * from 20 on, and the recurrence of the Gamma function below.
 *
 * Source: expansion of the ratio of Gamma functions (Abramowitz and Stegun, 6.1.47, from memory).
 */
function logHalfStepRatio(x: number): number {
  let shifted = x;
  let recurrence = 0;
  while (shifted < 20) {
    recurrence += Math.log(shifted / (shifted + 0.5));
    shifted += 1;
  }
  const inverse = 1 / shifted;
  const square = inverse * inverse;
  const bracket = -1 / 8 + square * (1 / 192 + square * (-1 / 640 + square * (17 / 14336)));
  return recurrence + 0.5 * Math.log(shifted) + inverse * bracket;
}

/** What is known of Student's distribution at one point, of the absolute value. */
export interface StudentAreas {
  /** Probability of lying between -t and t. */
  inside: number;
  /** Probability of lying outside. */
  outside: number;
  /** Density of the absolute value at t. */
  density: number;
}

/**
 * Student's distribution of |T| at t > 0 for any real number of degrees of freedom > 0. Both areas are computed
 * so that the smaller one keeps its digits.
 *
 * Source: the incomplete beta function (Abramowitz and Stegun, 26.7.1 and 26.5.8, from memory).
 */
export function studentAreas(t: number, degreesOfFreedom: number): StudentAreas {
  const half = degreesOfFreedom / 2;
  // Ratios first: t squared may be too large for a double where the degrees of freedom are few.
  const ratio = t / Math.sqrt(degreesOfFreedom);
  const logRoot = ratio > 1 ? 2 * Math.log(ratio) + Math.log1p(ratio ** -2) : Math.log1p(ratio * ratio);
  const logConstant = logHalfStepRatio(half) - 0.5 * Math.log(Math.PI);
  const density = 2 * Math.exp(logConstant - 0.5 * Math.log(degreesOfFreedom) - (half + 0.5) * logRoot);
  const inner = ratio > 1 ? 1 / (1 + ratio ** -2) : (ratio * ratio) / (1 + ratio * ratio);
  // x^(1/2) (1-x)^(nu/2) / B(1/2, nu/2), common to both forms of the fraction.
  const front = Math.exp(logConstant + 0.5 * Math.log(inner) - half * logRoot);
  if (inner < 1.5 / (half + 2.5)) {
    const inside = 2 * front * betaFraction(inner, 0.5, half);
    return { inside, outside: 1 - inside, density };
  }
  const outside = (front / half) * betaFraction(Math.exp(-logRoot), half, 0.5);
  return { inside: 1 - outside, outside, density };
}

/**
 * Two-sided probability of a Student t at least as large in size as `t`, for any real number of degrees of freedom
 * above 0; keeps its digits in the far tail.
 */
export function studentTwoSidedTail(t: number, degreesOfFreedom: number): number {
  return t === 0 ? 1 : studentAreas(Math.abs(t), degreesOfFreedom).outside;
}

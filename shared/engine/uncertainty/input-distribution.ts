import { requireChoice, requireDegreesOfFreedom, requireNumber } from '../quantity/domain.ts';
import type { RandomSource } from './random.ts';

/** A distribution assigned to an input quantity of a Monte Carlo evaluation. */
export type Distribution =
  | { distribution: 'normal'; mean: number; standardUncertainty: number }
  | { distribution: 'rectangular' | 'triangular' | 'u-shaped'; lower: number; upper: number }
  | { distribution: 'student-t'; mean: number; scale: number; degreesOfFreedom: number };

/** Distributions an input quantity may have. */
const INPUT_DISTRIBUTIONS = ['normal', 'rectangular', 'triangular', 'u-shaped', 'student-t'] as const;

/** Draws one value. */
export type Sampler = (random: RandomSource) => number;

function limits(input: { lower: number; upper: number }, field: string): { middle: number; half: number } {
  const lower = requireNumber(input.lower, `${field}.lower`);
  const upper = requireNumber(input.upper, `${field}.upper`, { min: lower });
  return { middle: lower / 2 + upper / 2, half: upper / 2 - lower / 2 };
}

/** Bailey's polar form, which takes any real number of degrees of freedom. */
function studentSampler(mean: number, scale: number, degreesOfFreedom: number): Sampler {
  if (degreesOfFreedom === Infinity) return (random) => mean + scale * random.normal();
  return (random) => {
    const radius = Math.sqrt(
      degreesOfFreedom * Math.expm1((-2 / degreesOfFreedom) * Math.log(random.uniform())),
    );
    return mean + scale * radius * Math.cos(2 * Math.PI * random.uniform());
  };
}

/**
 * A sampler for one input quantity.
 *
 * Source: JCGM 101:2008, 6.4.2 (rectangular), 6.4.5 (triangular), 6.4.6 (arc sine), 6.4.7 (normal), 6.4.9 (t).
 *
 * @param input the distribution
 * @param field path of the input, for messages
 * @throws EngineError `unknown-choice`, `not-finite` or `out-of-range`
 */
export function samplerOf(input: Distribution, field: string): Sampler {
  requireChoice(input.distribution, `${field}.distribution`, INPUT_DISTRIBUTIONS);
  switch (input.distribution) {
    case 'normal': {
      const mean = requireNumber(input.mean, `${field}.mean`);
      const u = requireNumber(input.standardUncertainty, `${field}.standardUncertainty`, { min: 0 });
      return (random) => mean + u * random.normal();
    }
    case 'rectangular': {
      const { middle, half } = limits(input, field);
      return (random) => middle + half * (2 * random.uniform() - 1);
    }
    case 'triangular': {
      const { middle, half } = limits(input, field);
      return (random) => middle + half * (random.uniform() + random.uniform() - 1);
    }
    case 'u-shaped': {
      const { middle, half } = limits(input, field);
      return (random) => middle + half * Math.cos(Math.PI * random.uniform());
    }
    case 'student-t': {
      const mean = requireNumber(input.mean, `${field}.mean`);
      const scale = requireNumber(input.scale, `${field}.scale`, { min: 0 });
      const degrees = requireDegreesOfFreedom(input.degreesOfFreedom, `${field}.degreesOfFreedom`);
      return studentSampler(mean, scale, degrees);
    }
  }
}

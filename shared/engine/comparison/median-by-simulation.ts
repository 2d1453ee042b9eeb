import { cholesky } from '../linear/matrix.ts';
import { requireWhole } from '../quantity/domain.ts';
import { coverageInterval } from '../uncertainty/coverage-interval.ts';
import { randomSource } from '../uncertainty/random.ts';
import type { CheckedResults } from './results.ts';

/** What a result's difference from the median looks like: a distribution with an atom at 0, not symmetric. */
export type SimulatedDifference = { standardUncertainty: number; interval: [number, number] };

export type SimulatedMedian = {
  value: number;
  standardUncertainty: number;
  /** Shortest 95 % interval of the median. */
  interval: [number, number];
  /** Probability that the result is the median: the expected median's sensitivity to it. */
  coefficients: number[];
  /** By result, members or not, with the interval of equal tails. */
  differences: SimulatedDifference[];
};

const LEAST_DRAWS = 1000;

/**
 * Procedure B of Cox 2002 Metrologia 39 589: vectors drawn from the results' joint normal distribution, the median
 * of the members taken each time; value = mean, uncertainty = standard deviation of these medians.
 * @throws EngineError `not-whole`; `out-of-range` for fewer than 1000 draws; `not-positive-definite` for complete correlations
 */
export function medianBySimulation(
  checked: CheckedResults,
  covariance: readonly (readonly number[])[],
  options: { draws?: number; seed?: number },
): SimulatedMedian {
  const draws = requireWhole(options.draws ?? 100_000, 'draws', { min: LEAST_DRAWS });
  const { medians, differences, timesMiddle } = simulate(
    checked,
    sampler(checked, covariance, options.seed ?? 1),
    draws,
  );
  const { mean, deviation } = meanAndDeviation(medians);
  const origin = checked.values[checked.members[0]!]!;
  const [low, high] = interval(medians, 'shortest');
  return {
    value: origin + mean,
    standardUncertainty: deviation,
    interval: [origin + low, origin + high],
    coefficients: timesMiddle.map((count) => count / draws),
    differences: differences.map((column) => ({
      standardUncertainty: meanAndDeviation(column).deviation,
      interval: interval(column, 'symmetric'),
    })),
  };
}

/** The medians of all draws, every result's difference from them, and how often a result was the median. */
function simulate(checked: CheckedResults, draw: () => Float64Array, draws: number) {
  const medians = new Float64Array(draws);
  const differences = checked.values.map(() => new Float64Array(draws));
  const timesMiddle = checked.values.map(() => 0);
  const inOrder = new Float64Array(checked.members.length);
  const below = Math.floor((inOrder.length - 1) / 2);
  const above = Math.ceil((inOrder.length - 1) / 2);
  for (let trial = 0; trial < draws; trial += 1) {
    const x = draw();
    checked.members.forEach((place, i) => (inOrder[i] = x[place]!));
    inOrder.sort();
    const [low, high] = [inOrder[below]!, inOrder[above]!];
    medians[trial] = (low + high) / 2;
    for (const place of checked.members) {
      timesMiddle[place]! += (Number(x[place] === low) + Number(x[place] === high)) / 2;
    }
    differences.forEach((column, i) => (column[trial] = x[i]! - medians[trial]!));
  }
  return { medians, differences, timesMiddle };
}

/** Draws all results, less the first member's value, from their joint normal distribution. */
function sampler(
  checked: CheckedResults,
  covariance: readonly (readonly number[])[],
  seed: number,
): () => Float64Array {
  const random = randomSource(seed);
  const origin = checked.values[checked.members[0]!]!;
  const offsets = checked.values.map((value) => value - origin);
  const factor = checked.independent
    ? covariance.map((row, i) => row.map((value, j) => (i === j ? Math.sqrt(value) : 0)))
    : cholesky(covariance, 'covariance');
  const z = new Float64Array(offsets.length);
  const x = new Float64Array(offsets.length);
  return () => {
    for (let i = 0; i < z.length; i += 1) z[i] = random.normal();
    for (let i = 0; i < x.length; i += 1) {
      let sum = offsets[i]!;
      for (let j = checked.independent ? i : 0; j <= i; j += 1) sum += factor[i]![j]! * z[j]!;
      x[i] = sum;
    }
    return x;
  };
}

function meanAndDeviation(sample: Float64Array): { mean: number; deviation: number } {
  const mean = sample.reduce((sum, value) => sum + value, 0) / sample.length;
  const squares = sample.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { mean, deviation: Math.sqrt(squares / (sample.length - 1)) };
}

function interval(sample: Float64Array, kind: 'shortest' | 'symmetric'): [number, number] {
  return coverageInterval(Float64Array.from(sample).sort(), 0.95, kind);
}

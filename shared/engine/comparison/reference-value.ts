import { quadraticForm } from '../linear/matrix.ts';
import { requireChoice } from '../quantity/domain.ts';
import { algorithmA, type RobustValue } from './algorithm-a.ts';
import { observed } from './consistency.ts';
import { medianBySimulation, type SimulatedDifference } from './median-by-simulation.ts';
import { median, medianAbsoluteDeviation } from './order-statistics.ts';
import { qHampel } from './q-hampel.ts';
import { derSimonianLaird, pauleMandel, randomEffectsMean } from './random-effects.ts';
import {
  type CheckedResults,
  checkedResults,
  requireMembers,
  type Results,
  statedCovariance,
} from './results.ts';
import { type WeightedMean, weightedMean } from './weighted-mean.ts';

/** Estimators of a reference value; `referenceValue` says what each does. */
export const ESTIMATORS = [
  'weighted-mean',
  'arithmetic-mean',
  'median',
  'mandel-paule',
  'dersimonian-laird',
  'algorithm-a',
  'q-hampel',
] as const;

/** An estimator of a reference value. */
export type Estimator = (typeof ESTIMATORS)[number];

/** What a person should look at before the value is used. */
export type ReferenceWarning = 'negative-weights' | 'between-variance-cut-at-zero';

/** A reference value with what it rests on, in the unit of the results. */
export type ReferenceValue = {
  value: number;
  standardUncertainty: number;
  /** Sensitivity to each result, 0 for those that do not count; exact for the means, linearised otherwise. Sums to 1. */
  coefficients: number[];
  /**
   * Of the results that count about their weighted mean, whatever the estimator: a test of the stated uncertainties.
   * Where none are stated: about the value, each with the spread found.
   */
  chiSquared: number;
  degreesOfFreedom: number;
  pValue: number;
  birgeRatio: number;
  /** Variance between laboratories of the random-effects estimators, else 0. */
  betweenVariance: number;
  /** Only the median by simulation: its shortest 95 % interval. */
  interval?: [number, number];
  /** Only the median by simulation: each result's difference from it. */
  differences?: SimulatedDifference[];
  /** Only the robust estimators: the standard deviation found. */
  spread?: number;
  warnings: ReferenceWarning[];
};

type Estimate = Omit<
  ReferenceValue,
  'chiSquared' | 'degreesOfFreedom' | 'pValue' | 'birgeRatio' | 'warnings'
>;

/**
 * The reference value of a comparison.
 * - `weighted-mean`: procedure A of Cox 2002 Metrologia 39 589; generalised least squares with a covariance.
 * - `arithmetic-mean`: u propagated from the stated uncertainties, else `s / sqrt n`.
 * - `median`: procedure B of Cox 2002 by simulation (`draws` 100 000, `seed` 1); without uncertainties the sample
 *   median with `u = 1.858 MAD / sqrt(n - 1)` (Mueller 2000 J. Res. NIST 105 551).
 * - `mandel-paule`, `dersimonian-laird`: random effects, with the covariance where given.
 * - `algorithm-a`, `q-hampel`: ISO 13528:2015 annex C, `u = 1.25 s* / sqrt n`; stated uncertainties are not used.
 * @throws EngineError `missing-uncertainties`, `too-few-values`, `unknown-choice`, `singular`, those of
 * `checkedResults` and `medianBySimulation`
 */
export function referenceValue(
  r: Results,
  estimator: Estimator,
  options: { draws?: number; seed?: number } = {},
): ReferenceValue {
  const checked = checkedResults(r);
  const estimate = estimateOf(checked, estimator, options);
  const { warnings, ...found } = { warnings: [] as ReferenceWarning[], ...estimate };
  if (found.coefficients.some((c) => c < 0)) warnings.push('negative-weights');
  const degreesOfFreedom = checked.members.length - 1;
  return { ...found, ...observed(chiSquaredOf(checked, found), degreesOfFreedom), warnings };
}

function estimateOf(
  checked: CheckedResults,
  estimator: Estimator,
  options: { draws?: number; seed?: number },
): Estimate & { warnings?: ReferenceWarning[] } {
  switch (requireChoice(estimator, 'estimator', ESTIMATORS)) {
    case 'weighted-mean':
      return fromMean(weightedMean(checked, statedCovariance(checked), checked.members), 0);
    case 'arithmetic-mean':
      return arithmeticMean(checked);
    case 'median':
      if (!checked.covariance) return sampleMedian(checked);
      return { ...medianBySimulation(checked, checked.covariance, options), betweenVariance: 0 };
    case 'mandel-paule':
    case 'dersimonian-laird':
      return randomEffects(checked, estimator as 'mandel-paule' | 'dersimonian-laird');
    case 'algorithm-a':
      return robust(checked, algorithmA);
    case 'q-hampel':
      return robust(checked, qHampel);
  }
}

function fromMean(mean: WeightedMean, betweenVariance: number): Estimate {
  const { value, variance, coefficients } = mean;
  return { value, standardUncertainty: Math.sqrt(variance), coefficients, betweenVariance };
}

function memberValues(checked: CheckedResults): number[] {
  return checked.members.map((place) => checked.values[place]!);
}

/** Coefficients by place among all results from those of the members. */
function spreadOut(checked: CheckedResults, ofMembers: readonly number[]): number[] {
  const coefficients = checked.values.map(() => 0);
  checked.members.forEach((place, i) => (coefficients[place] = ofMembers[i]!));
  return coefficients;
}

function arithmeticMean(checked: CheckedResults): Estimate {
  const values = memberValues(checked);
  const count = values.length;
  const coefficients = spreadOut(
    checked,
    values.map(() => 1 / count),
  );
  const value = values[0]! + values.reduce((sum, x) => sum + (x - values[0]!), 0) / count;
  if (checked.covariance) {
    const variance = quadraticForm(checked.covariance, coefficients);
    return { value, standardUncertainty: Math.sqrt(variance), coefficients, betweenVariance: 0 };
  }
  requireMembers(checked, 2);
  const spread = Math.sqrt(values.reduce((sum, x) => sum + (x - value) ** 2, 0) / (count - 1));
  return { value, standardUncertainty: spread / Math.sqrt(count), coefficients, betweenVariance: 0, spread };
}

function sampleMedian(checked: CheckedResults): Estimate {
  requireMembers(checked, 2);
  const values = memberValues(checked);
  const value = median(values);
  const deviation = medianAbsoluteDeviation(values);
  const order = values.map((_, i) => i).sort((a, b) => values[a]! - values[b]!);
  const half = (order.length - 1) / 2;
  const middle = [order[Math.floor(half)]!, order[Math.ceil(half)]!];
  return {
    value,
    standardUncertainty: (1.858 * deviation) / Math.sqrt(values.length - 1),
    coefficients: spreadOut(
      checked,
      values.map((_, i) => middle.filter((place) => place === i).length / 2),
    ),
    betweenVariance: 0,
    spread: 1.483 * deviation,
  };
}

function randomEffects(checked: CheckedResults, estimator: 'mandel-paule' | 'dersimonian-laird') {
  requireMembers(checked, 2);
  const covariance = statedCovariance(checked);
  const found =
    estimator === 'mandel-paule' ? pauleMandel(checked, covariance) : derSimonianLaird(checked, covariance);
  const warnings: ReferenceWarning[] = found < 0 ? ['between-variance-cut-at-zero'] : [];
  const betweenVariance = Math.max(0, found);
  return { ...fromMean(randomEffectsMean(checked, covariance, betweenVariance), betweenVariance), warnings };
}

function robust(checked: CheckedResults, method: (values: number[]) => RobustValue): Estimate {
  requireMembers(checked, 2);
  const { value, spread, coefficients } = method(memberValues(checked));
  return {
    value,
    standardUncertainty: (1.25 * spread) / Math.sqrt(checked.members.length),
    coefficients: spreadOut(checked, coefficients),
    betweenVariance: 0,
    spread,
  };
}

function chiSquaredOf(checked: CheckedResults, estimate: Estimate): number {
  if (checked.covariance) return weightedMean(checked, checked.covariance, checked.members).chiSquared;
  const spread = estimate.spread!;
  const squares = memberValues(checked).reduce((sum, x) => sum + (x - estimate.value) ** 2, 0);
  return spread > 0 ? squares / spread ** 2 : 0;
}

import { EngineError } from '../errors.ts';
import { build, entry, item, type Matrix } from '../linear/entries.ts';
import { inverseSymmetric, multiply, multiplyVector, quadraticForm, transpose } from '../linear/matrix.ts';
import { requireNumbers } from '../linear/requirements.ts';
import { requireSize } from '../quantity/domain.ts';
import { checkDesign, type CheckedDesign, type WeighingDesignInput } from './design-input.ts';

/** What a design gives for its weights, in the unit of the differences. */
export type WeighingDesignResult = {
  /** Deviation of each weight, in the order of the columns. */
  estimates: number[];
  /** Covariance of the estimates, restraint included. */
  covariance: number[][];
  /** Covariance without the restraint: within-run and between-day parts. Restrained combinations have none. */
  designCovariance: number[][];
  /** Standard deviation of each estimate from the weighings, as a multiple of that of one weighing. */
  factors: number[];
  /** Observed minus adjusted differences. */
  residuals: number[];
  /** Standard deviation of one weighing out of the residuals; 0 with no degrees of freedom. */
  residualStandardDeviation: number;
  /** Weighings + restraints - weights. */
  degreesOfFreedom: number;
  /** What a unit of each difference (columns) adds to each estimate (rows). */
  sensitivityToObservations: number[][];
  /** What a unit of each restraint value (columns) adds to each estimate (rows). */
  sensitivityToRestraints: number[][];
};

/** The parts of the inverse of the bordered normal equations, and the weighted design. */
type Solution = {
  spread: number[][];
  toRestraints: number[][];
  toObservations: number[][];
  typicalVariance: number;
  weights: Matrix;
};

/**
 * Deviations of all weights of a design from its observed differences and one or several restraints, by
 * generalised least squares. The restraints hold exactly; their uncertainty is carried by
 * `sensitivityToRestraints`, never diluted by the weighings, so that the design's own part (`designCovariance`)
 * is the local part of the values and the rest is what the references bring.
 *
 * One unit throughout. Variance of one weighing: `observationCovariance` where given, otherwise
 * `withinStandardDeviation`, otherwise that of the residuals. With an `observationCovariance` the
 * `residualStandardDeviation` and `factors` refer to a weighing of typical (harmonic mean) variance.
 * `betweenStandardDeviation` acts on each weight, alike whatever its size, as in the between-day factors of
 * NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.3.3.4.
 *
 * Source: JCGM 102:2011 (generalised least squares, from memory); e-Handbook 2.3.4.1 for published designs.
 * @throws EngineError `not-determined` naming the weights left open, `dependent-restraints`, `no-restraint`,
 * `two-restraints`, `two-variances`, `size-mismatch`, `not-rectangular`, `not-finite`, `out-of-range`, `not-symmetric`,
 * `not-positive-semidefinite`, `not-positive-definite`, and `no-within-standard-deviation` when no residuals are left to estimate one from
 */
export function solveWeighingDesign(a: WeighingDesignInput): WeighingDesignResult {
  const checked = checkDesign(a);
  const solution = solve(checked, a.observationCovariance);
  const estimates = combine(
    multiplyVector(solution.toObservations, checked.differences),
    multiplyVector(solution.toRestraints, checked.restraintValues),
  );
  const adjusted = multiplyVector(checked.design, estimates);
  const residuals = checked.differences.map((value, i) => value - item(adjusted, i));
  const degreesOfFreedom = checked.design.length + checked.restraintRows.length - estimates.length;
  const residualStandardDeviation = residualScale(solution, residuals, degreesOfFreedom);
  const within = withinVariance(a, solution.typicalVariance, residualStandardDeviation, degreesOfFreedom);
  const designCovariance = localCovariance(
    checked,
    solution,
    within / solution.typicalVariance,
    a.betweenStandardDeviation ?? 0,
  );
  return {
    estimates,
    covariance: sumOf(designCovariance, sandwich(solution.toRestraints, checked.restraintCovariance)),
    designCovariance,
    factors: estimates.map((_, i) =>
      Math.sqrt(Math.max(0, entry(solution.spread, i, i)) / solution.typicalVariance),
    ),
    residuals,
    residualStandardDeviation,
    degreesOfFreedom,
    sensitivityToObservations: solution.toObservations,
    sensitivityToRestraints: solution.toRestraints,
  };
}

/**
 * Solves [[X'WX, R'], [R, 0]]: the border makes the restraints exact. W is the inverse of the covariance of the
 * differences, or the identity; `spread` is the covariance that belongs to it.
 */
function solve(a: CheckedDesign, observationCovariance: Matrix | undefined): Solution {
  const rows = a.design.length;
  const weights = observationCovariance
    ? inverseSymmetric(observationCovariance, 'observationCovariance')
    : build(rows, rows, (i, j) => (i === j ? 1 : 0));
  const trace = weights.reduce((sum, row, i) => sum + item(row, i), 0);
  const weighted = multiply(transpose(a.design), weights);
  const normal = multiply(weighted, a.design);
  const count = normal.length;
  const bordered = build(count + a.restraintRows.length, count + a.restraintRows.length, (i, j) => {
    if (i < count && j < count) return (entry(normal, i, j) + entry(normal, j, i)) / 2;
    if (i >= count && j >= count) return 0;
    return i < count ? entry(a.restraintRows, j - count, i) : entry(a.restraintRows, i - count, j);
  });
  const inverse = inverseSymmetric(bordered, 'design');
  const spread = build(count, count, (i, j) => entry(inverse, i, j));
  return {
    spread,
    toRestraints: build(count, a.restraintRows.length, (i, j) => entry(inverse, i, count + j)),
    toObservations: multiply(spread, weighted),
    typicalVariance: rows / trace,
    weights,
  };
}

/** Standard deviation of a weighing of typical variance, from the weighted squares of the residuals. */
function residualScale(solution: Solution, residuals: number[], degreesOfFreedom: number): number {
  if (degreesOfFreedom === 0) return 0;
  const squares = Math.max(0, quadraticForm(solution.weights, residuals));
  return Math.sqrt((squares * solution.typicalVariance) / degreesOfFreedom);
}

/** Variance of a typical weighing that the estimates are judged by. */
function withinVariance(
  a: WeighingDesignInput,
  typicalVariance: number,
  residualStandardDeviation: number,
  degreesOfFreedom: number,
): number {
  if (a.observationCovariance) return typicalVariance;
  if (a.withinStandardDeviation !== undefined) return a.withinStandardDeviation ** 2;
  if (degreesOfFreedom > 0) return residualStandardDeviation ** 2;
  throw new EngineError(
    'no-within-standard-deviation',
    'withinStandardDeviation',
    'nothing',
    'The design leaves no residuals to estimate a standard deviation from; give a pooled one.',
  );
}

/** Within-run part plus the day-to-day part: each weight moves alone, the restraint takes its share back. */
function localCovariance(a: CheckedDesign, solution: Solution, scale: number, between: number): number[][] {
  const count = solution.spread.length;
  const restrained = multiply(solution.toRestraints, a.restraintRows);
  const free = build(count, count, (i, j) => (i === j ? 1 : 0) - entry(restrained, i, j));
  const daily = multiply(free, transpose(free));
  return build(
    count,
    count,
    (i, j) => scale * entry(solution.spread, i, j) + between ** 2 * entry(daily, i, j),
  );
}

function combine(left: number[], right: number[]): number[] {
  return left.map((value, i) => value + item(right, i));
}

function sumOf(left: Matrix, right: Matrix): number[][] {
  return build(left.length, left.length, (i, j) => entry(left, i, j) + entry(right, i, j));
}

/** `matrix covariance matrix'`, symmetric to the last digit. */
function sandwich(matrix: Matrix, covariance: Matrix): number[][] {
  const full = multiply(multiply(matrix, covariance), transpose(matrix));
  return build(full.length, full.length, (i, j) => (entry(full, i, j) + entry(full, j, i)) / 2);
}

/**
 * How uncertain a combination of the weights is, apart from the restraint: `within` as a multiple of the
 * standard deviation of one weighing, `between` of the day-to-day standard deviation of one weight. These are
 * the factors published beside weighing designs.
 *
 * Source: NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.1, K1 and K2.
 * @throws EngineError those of `solveWeighingDesign`
 */
export function designFactors(
  design: number[][],
  restraint: number[],
  combination: number[],
): { within: number; between: number } {
  const differences = design.map(() => 0);
  const input = { design, differences, restraint: { weights: restraint, value: 0 } };
  const within = solveWeighingDesign({ ...input, withinStandardDeviation: 1 }).designCovariance;
  const between = solveWeighingDesign({
    ...input,
    withinStandardDeviation: 0,
    betweenStandardDeviation: 1,
  }).designCovariance;
  requireNumbers(combination, 'combination');
  requireSize(combination.length, within.length, 'combination', 'weights');
  const root = (matrix: Matrix) => Math.sqrt(Math.max(0, quadraticForm(matrix, combination)));
  return { within: root(within), between: root(between) };
}

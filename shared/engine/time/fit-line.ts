import { EngineError } from '../errors.ts';
import { build, entry, item, type Matrix } from '../linear/entries.ts';
import {
  cholesky,
  inverseSymmetric,
  multiply,
  multiplyVector,
  quadraticForm,
  transpose,
} from '../linear/matrix.ts';
import { requireNumbers } from '../linear/requirements.ts';
import { requireSize } from '../quantity/domain.ts';

/** Parameters with their covariance, and how well they agree with the observations. */
export type LinearFit = {
  parameters: number[];
  /** Covariance of the parameters out of the stated covariance of the observations. */
  covariance: number[][];
  residuals: number[];
  /** Weighted sum of the squares of the residuals. */
  chiSquared: number;
  degreesOfFreedom: number;
};

/**
 * Generalised least squares of `values` on the columns of `basis`, with the covariance of the values.
 * @throws EngineError `size-mismatch`, `not-positive-definite`, `not-symmetric`, `singular` when the columns
 * depend on each other, `not-finite`
 */
export function fitLinear(basis: Matrix, values: readonly number[], covariance: Matrix): LinearFit {
  requireNumbers(values, 'values');
  cholesky(covariance, 'covariance');
  requireSize(covariance.length, values.length, 'covariance', 'values');
  requireSize(basis.length, values.length, 'basis', 'values');
  const weights = inverseSymmetric(covariance, 'covariance');
  const weighted = multiply(transpose(basis), weights);
  const normal = multiply(weighted, basis);
  const size = normal.length;
  const spread = inverseSymmetric(
    build(size, size, (i, j) => (entry(normal, i, j) + entry(normal, j, i)) / 2),
    'basis',
  );
  const parameters = multiplyVector(spread, multiplyVector(weighted, values));
  const fitted = multiplyVector(basis, parameters);
  const residuals = values.map((value, i) => value - item(fitted, i));
  return {
    parameters,
    covariance: spread,
    residuals,
    chiSquared: Math.max(0, quadraticForm(weights, residuals)),
    degreesOfFreedom: values.length - size,
  };
}

/**
 * A straight line through points with a covariance: intercept at x = 0 and slope.
 * Source: JCGM 100:2008, H.3 for equal and uncorrelated uncertainties.
 * @throws EngineError those of `fitLinear`; `too-few-values` under two points; `one-abscissa` when all x agree
 */
export function fitLine(x: readonly number[], y: readonly number[], covariance: Matrix): LinearFit {
  requireNumbers(x, 'x', 2);
  if (x.every((value) => value === x[0])) {
    throw new EngineError(
      'one-abscissa',
      'x',
      `${x[0]} for every point`,
      'A line needs points at two places.',
    );
  }
  return fitLinear(
    x.map((value) => [1, value]),
    y,
    covariance,
  );
}

/** A diagonal covariance out of standard uncertainties. */
export function diagonalCovariance(standardUncertainties: readonly number[]): number[][] {
  const size = standardUncertainties.length;
  return build(size, size, (i, j) => (i === j ? item(standardUncertainties, i) ** 2 : 0));
}

import { EngineError } from '../errors.ts';
import { build, entry, item, type Matrix } from './entries.ts';
import { requireSize } from '../quantity/domain.ts';
import { asymmetry, requireSquare, requireSymmetric } from './requirements.ts';
import { symmetricEigen } from './symmetric-eigen.ts';

export type { Matrix } from './entries.ts';

/** Relative size under which a pivot is rounding noise of doubles and not information. */
export const PIVOT_TOLERANCE = 1e-12;

/** Transposes `matrix`. */
export function transpose(matrix: Matrix): number[][] {
  return build(matrix[0]?.length ?? 0, matrix.length, (i, j) => entry(matrix, j, i));
}

/**
 * The product `left right`.
 * @throws EngineError `size-mismatch` when the columns of `left` are not the rows of `right`
 */
export function multiply(left: Matrix, right: Matrix): number[][] {
  const inner = right.length;
  const columns = left[0]?.length ?? 0;
  requireSize(inner, columns, 'right', 'columns of left');
  return build(left.length, right[0]?.length ?? 0, (i, j) => {
    let sum = 0;
    for (let k = 0; k < inner; k += 1) sum += entry(left, i, k) * entry(right, k, j);
    return sum;
  });
}

/**
 * The product of a matrix and a column vector.
 * @throws EngineError `size-mismatch`
 */
export function multiplyVector(matrix: Matrix, vector: readonly number[]): number[] {
  return multiply(
    matrix,
    vector.map((value) => [value]),
  ).map((row) => item(row, 0));
}

/** The quadratic form `x' matrix x`: the variance of the combination `x` under the covariance `matrix`. */
export function quadraticForm(matrix: Matrix, x: readonly number[]): number {
  return multiplyVector(matrix, x).reduce((sum, value, i) => sum + value * item(x, i), 0);
}

/**
 * The lower triangle L with `L L' = matrix`. A covariance whose variances differ by many decades keeps its
 * digits, since each pivot is judged against its own diagonal entry.
 * @throws EngineError `not-positive-definite` naming the row at which it fails; those of `requireSymmetric`
 */
export function cholesky(matrix: Matrix, field = 'matrix'): number[][] {
  requireSymmetric(matrix, field);
  const { lower, failedAt } = factorize(matrix);
  if (failedAt !== undefined) {
    throw new EngineError(
      'not-positive-definite',
      `${field}[${failedAt}]`,
      `row ${failedAt + 1}`,
      'Rows that do not depend on those above them, and do not contradict them, are expected.',
    );
  }
  return lower;
}

/** Cholesky factor as far as it goes, with the row of the first pivot that is not positive. */
function factorize(matrix: Matrix): { lower: number[][]; failedAt?: number } {
  const lower = build(matrix.length, matrix.length, () => 0);
  for (const [i, row] of lower.entries()) {
    for (let j = 0; j <= i; j += 1) {
      let sum = entry(matrix, i, j);
      for (let k = 0; k < j; k += 1) sum -= entry(lower, i, k) * entry(lower, j, k);
      if (i !== j) row[j] = sum / entry(lower, j, j);
      else if (sum > PIVOT_TOLERANCE * entry(matrix, i, i)) row[i] = Math.sqrt(sum);
      else return { lower, failedAt: i };
    }
  }
  return { lower };
}

/** Scales that bring a symmetric matrix to comparable rows, so that one tolerance judges every pivot. */
function equilibrium(matrix: Matrix): number[] {
  const scales = matrix.map((_, i) => {
    const diagonal = Math.abs(entry(matrix, i, i));
    return diagonal > 0 ? 1 / Math.sqrt(diagonal) : 0;
  });
  return scales.map((scale, i) => {
    if (scale > 0) return scale;
    const largest = Math.max(...item(matrix, i).map((value, j) => Math.abs(value) * (scales[j] || 1)));
    return largest > 0 ? 1 / largest : 1;
  });
}

/**
 * Solves `matrix x = right` for a symmetric matrix, definite or not (bordered normal equations are not), by
 * elimination with row exchange on the equilibrated matrix.
 * @throws EngineError `singular` naming a row that depends on others; `size-mismatch`; those of `requireSymmetric`
 */
export function solveSymmetric(matrix: Matrix, right: readonly number[], field = 'matrix'): number[] {
  requireSize(right.length, matrix.length, 'right', 'equations');
  return solveColumns(
    matrix,
    right.map((value) => [value]),
    field,
  ).map((row) => item(row, 0));
}

/**
 * The inverse of a symmetric matrix, definite or not; symmetric to the last digit.
 * @throws EngineError `singular`; those of `requireSymmetric`
 */
export function inverseSymmetric(matrix: Matrix, field = 'matrix'): number[][] {
  const size = matrix.length;
  const inverse = solveColumns(
    matrix,
    build(size, size, (i, j) => (i === j ? 1 : 0)),
    field,
  );
  return build(size, size, (i, j) => (entry(inverse, i, j) + entry(inverse, j, i)) / 2);
}

/** Gauss-Jordan elimination with row exchange; solves for all right-hand columns at once. */
function solveColumns(matrix: Matrix, right: Matrix, field: string): number[][] {
  requireSymmetric(matrix, field);
  const size = matrix.length;
  const scales = equilibrium(matrix);
  const scaled = (value: number, i: number, j: number) => value * item(scales, i) * item(scales, j);
  const rows = matrix.map((row, i) => [
    ...row.map((value, j) => scaled(value, i, j)),
    ...item(right, i).map((value) => value * item(scales, i)),
  ]);
  for (let k = 0; k < size; k += 1) eliminateColumn(rows, k, field);
  return rows.map((row, i) => row.slice(size).map((value) => (value / item(row, i)) * item(scales, i)));
}

/** Brings the largest entry of column `k` onto the diagonal and clears the column elsewhere. */
function eliminateColumn(rows: number[][], k: number, field: string): void {
  let best = k;
  for (let i = k + 1; i < rows.length; i += 1) {
    if (Math.abs(entry(rows, i, k)) > Math.abs(entry(rows, best, k))) best = i;
  }
  const pivotRow = item(rows, best);
  const pivot = item(pivotRow, k);
  if (Math.abs(pivot) <= PIVOT_TOLERANCE) {
    throw new EngineError(
      'singular',
      `${field}[${k}]`,
      `column ${k + 1}`,
      'Columns that do not depend on those before them are expected.',
    );
  }
  rows[best] = item(rows, k);
  rows[k] = pivotRow;
  rows.forEach((row, i) => {
    const factor = item(row, k) / pivot;
    if (i === k || factor === 0) return;
    for (let j = k; j < row.length; j += 1) row[j] = item(row, j) - factor * item(pivotRow, j);
  });
}

/**
 * Whether a matrix can be a covariance matrix. Where it cannot, `offending` names the pair to look at: mirrored
 * entries that differ, a negative variance (i = j), a correlation beyond 1, or the pair that pulls the variance
 * of some combination below zero the most. Source: JCGM 102:2011, 3.11, note 3 (from memory): a covariance matrix is
 * positive semidefinite.
 * @throws EngineError `not-rectangular`, `not-finite`, `not-square`
 */
export function isPositiveSemidefinite(matrix: Matrix): { ok: boolean; offending?: [number, number] } {
  requireSquare(matrix);
  const pair = asymmetry(matrix) ?? impossiblePair(matrix);
  if (pair) return { ok: false, offending: pair };
  if (factorize(matrix).failedAt === undefined) return { ok: true };
  const negative = negativeCombination(matrix);
  return negative ? { ok: false, offending: negative } : { ok: true };
}

/** A negative variance, or a covariance larger than its two variances allow. */
function impossiblePair(matrix: Matrix): [number, number] | undefined {
  for (let i = 0; i < matrix.length; i += 1) {
    if (entry(matrix, i, i) < 0) return [i, i];
    for (let j = 0; j < i; j += 1) {
      const limit = Math.sqrt(entry(matrix, i, i)) * Math.sqrt(Math.max(0, entry(matrix, j, j)));
      if (Math.abs(entry(matrix, i, j)) > limit * (1 + 1e-9)) return [j, i];
    }
  }
  return undefined;
}

/** The pair that weighs most in the most negative combination of the correlation matrix, if there is one. */
function negativeCombination(matrix: Matrix): [number, number] | undefined {
  const scales = equilibrium(matrix);
  const correlation = build(
    matrix.length,
    matrix.length,
    (i, j) => entry(matrix, i, j) * item(scales, i) * item(scales, j),
  );
  const { values, vectors } = symmetricEigen(correlation);
  const lowest = item(values, 0);
  if (lowest >= -1e-9 * matrix.length) return undefined;
  const vector = item(vectors, 0);
  let worst: [number, number] = [0, 0];
  let size = 0;
  for (let i = 0; i < matrix.length; i += 1) {
    for (let j = 0; j < i; j += 1) {
      const part = item(vector, i) * item(vector, j) * entry(correlation, i, j);
      if (part < size) {
        size = part;
        worst = [j, i];
      }
    }
  }
  return worst;
}

/**
 * Refuses a matrix that cannot be the covariance or correlation matrix of anything, and names the pair to look at.
 * @param nameOf how the message names row `i`
 * @throws EngineError `not-positive-semidefinite`; those of `requireSymmetric`
 */
export function requirePositiveSemidefinite(
  matrix: Matrix,
  field: string,
  nameOf: (i: number) => string,
): void {
  requireSymmetric(matrix, field, nameOf);
  const { offending } = isPositiveSemidefinite(matrix);
  if (offending === undefined) return;
  const [i, j] = offending;
  const pair = i === j ? nameOf(i) : `${nameOf(i)} and ${nameOf(j)}`;
  throw new EngineError(
    'not-positive-semidefinite',
    `${field}[${i}][${j}]`,
    `${entry(matrix, i, j)} for ${pair}`,
    'No quantities can vary together like this: some combination would have a variance below zero. Look at this entry first.',
  );
}

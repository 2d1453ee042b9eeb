import { EngineError } from '../errors.ts';
import { requireNumber } from '../quantity/domain.ts';
import { entry, type Matrix } from './entries.ts';

/**
 * Refuses a matrix with ragged rows, no rows, or entries that are not finite numbers.
 * @throws EngineError `not-rectangular`, `not-finite`
 */
export function requireRectangular(matrix: Matrix, field = 'matrix'): void {
  const columns = matrix[0]?.length ?? 0;
  if (columns === 0)
    throw new EngineError(
      'not-rectangular',
      field,
      'an empty matrix',
      'At least one row and one column are expected.',
    );
  matrix.forEach((row, i) => {
    if (row.length !== columns) {
      throw new EngineError(
        'not-rectangular',
        `${field}[${i}]`,
        `${row.length} columns`,
        `All rows have one length; the first has ${columns} columns.`,
      );
    }
    row.forEach((value, j) => requireNumber(value, `${field}[${i}][${j}]`));
  });
}

/**
 * Refuses what is not a square matrix of finite numbers.
 * @throws EngineError `not-square`, `not-rectangular`, `not-finite`
 */
export function requireSquare(matrix: Matrix, field = 'matrix'): void {
  requireRectangular(matrix, field);
  const columns = matrix[0]?.length ?? 0;
  if (columns !== matrix.length) {
    throw new EngineError(
      'not-square',
      field,
      `${matrix.length} rows and ${columns} columns`,
      'A square matrix is expected.',
    );
  }
}

/**
 * Refuses a matrix that is not square and symmetric (relative difference above 1e-9 of the larger diagonal scale).
 * @param nameOf how the message names row `i`
 * @throws EngineError `not-square`, `not-symmetric`, `not-rectangular`, `not-finite`
 */
export function requireSymmetric(matrix: Matrix, field = 'matrix', nameOf = numbered): void {
  requireSquare(matrix, field);
  const pair = asymmetry(matrix);
  if (pair) {
    const [i, j] = pair;
    const found = `${entry(matrix, i, j)} and ${entry(matrix, j, i)} for ${nameOf(i)} and ${nameOf(j)}`;
    throw new EngineError(
      'not-symmetric',
      `${field}[${i}][${j}]`,
      found,
      'The same number on both sides of the diagonal is expected.',
    );
  }
}

function numbered(i: number): string {
  return `row ${i + 1}`;
}

/** The first pair of mirrored entries that differ, or undefined for a symmetric matrix. */
export function asymmetry(matrix: Matrix): [number, number] | undefined {
  for (let i = 0; i < matrix.length; i += 1) {
    for (let j = 0; j < i; j += 1) {
      const upper = entry(matrix, j, i);
      const lower = entry(matrix, i, j);
      const scale = Math.max(
        Math.abs(upper),
        Math.abs(lower),
        Math.sqrt(Math.abs(entry(matrix, i, i) * entry(matrix, j, j))),
      );
      if (Math.abs(upper - lower) > 1e-9 * scale) return [j, i];
    }
  }
  return undefined;
}

/**
 * Refuses a list that holds anything but finite numbers, or fewer than `atLeast` of them.
 * @throws EngineError `too-few-values`, `not-finite`
 */
export function requireNumbers(values: readonly number[], field: string, atLeast = 1): void {
  if (values.length < atLeast) {
    throw new EngineError(
      'too-few-values',
      field,
      `${values.length} values`,
      `At least ${atLeast} are needed.`,
    );
  }
  values.forEach((value, i) => requireNumber(value, `${field}[${i}]`));
}

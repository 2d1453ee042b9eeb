import { entry, item } from './entries.ts';

/**
 * Eigenvalues in rising order with their unit eigenvectors (one row each) of a symmetric matrix, by cyclic
 * Jacobi rotations: slow beside other methods, exact to the last digits, ample for the few hundred values of a
 * comparison or a set. The caller has checked the symmetry; only the upper triangle counts.
 */
export function symmetricEigen(matrix: readonly (readonly number[])[]): {
  values: number[];
  vectors: number[][];
} {
  const size = matrix.length;
  const work = matrix.map((row) => [...row]);
  const vectors = matrix.map((_, i) => Array.from({ length: size }, (_unused, j) => (i === j ? 1 : 0)));
  for (let sweep = 0; sweep < 60 && offDiagonal(work) > 0; sweep += 1) {
    for (let p = 0; p < size; p += 1) {
      for (let q = p + 1; q < size; q += 1) rotate(work, vectors, p, q);
    }
  }
  const order = work.map((_, i) => i).sort((i, j) => entry(work, i, i) - entry(work, j, j));
  return { values: order.map((i) => entry(work, i, i)), vectors: order.map((i) => item(vectors, i)) };
}

/** Sum of the squares off the diagonal, or 0 once it is below the rounding of the diagonal. */
function offDiagonal(rows: number[][]): number {
  let off = 0;
  let on = 0;
  rows.forEach((row, i) => {
    row.forEach((value, j) => {
      if (j > i) off += value * value;
      if (j === i) on += value * value;
    });
  });
  return off > 1e-30 * on ? off : 0;
}

/** One plane rotation that clears the entry p, q; `vectors` keeps the eigenvectors as rows. */
function rotate(rows: number[][], vectors: number[][], p: number, q: number): void {
  const off = entry(rows, p, q);
  if (off === 0) return;
  const theta = (entry(rows, q, q) - entry(rows, p, p)) / (2 * off);
  const tangent = (theta < 0 ? -1 : 1) / (Math.abs(theta) + Math.hypot(theta, 1));
  const cosine = 1 / Math.hypot(tangent, 1);
  const sine = tangent * cosine;
  for (const row of rows) turn(row, p, q, cosine, sine);
  turnRows(rows, p, q, cosine, sine);
  turnRows(vectors, p, q, cosine, sine);
}

function turn(row: number[], p: number, q: number, cosine: number, sine: number): void {
  const first = item(row, p);
  const second = item(row, q);
  row[p] = cosine * first - sine * second;
  row[q] = sine * first + cosine * second;
}

function turnRows(rows: number[][], p: number, q: number, cosine: number, sine: number): void {
  const first = item(rows, p);
  const second = item(rows, q);
  first.forEach((value, k) => {
    const other = item(second, k);
    first[k] = cosine * value - sine * other;
    second[k] = sine * value + cosine * other;
  });
}

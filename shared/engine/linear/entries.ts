/** A dense matrix by rows. Functions of this folder never change their arguments. */
export type Matrix = readonly (readonly number[])[];

/** The item at `i`. The caller's loop keeps `i` in range: the one place where the compiler is told so. */
export function item<T>(list: ArrayLike<T>, i: number): T {
  return list[i] as T;
}

/** The element at row `i`, column `j`, both in range. */
export function entry(matrix: Matrix, i: number, j: number): number {
  return item(item(matrix, i), j);
}

/** A `rows` by `columns` matrix filled by `value(i, j)`. */
export function build(rows: number, columns: number, value: (i: number, j: number) => number): number[][] {
  return Array.from({ length: rows }, (_, i) => Array.from({ length: columns }, (_unused, j) => value(i, j)));
}

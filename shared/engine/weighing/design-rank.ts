import { EngineError } from '../errors.ts';
import { entry, item, type Matrix } from '../linear/entries.ts';

/** Relative size under which a row of a design is taken to be a combination of the others. */
const RANK_TOLERANCE = 1e-10;

/** Reduced rows with the column of each pivot. */
type ReducedRows = { rows: number[][]; pivots: number[] };

/** Brings rows to reduced form, the largest entry first; zero rows are dropped. */
function reduce(matrix: Matrix): ReducedRows {
  const rows = matrix.map((row) => {
    const largest = Math.max(...row.map(Math.abs));
    return row.map((value) => (largest > 0 ? value / largest : 0));
  });
  const columns = item(rows, 0).length;
  const pivots: number[] = [];
  for (let column = 0; column < columns && pivots.length < rows.length; column += 1) {
    if (reduceColumn(rows, pivots.length, column)) pivots.push(column);
  }
  return { rows: rows.slice(0, pivots.length), pivots };
}

/** Clears `column` outside row `top`; false when no row from `top` on has an entry there. */
function reduceColumn(rows: number[][], top: number, column: number): boolean {
  let best = top;
  for (let i = top + 1; i < rows.length; i += 1) {
    if (Math.abs(entry(rows, i, column)) > Math.abs(entry(rows, best, column))) best = i;
  }
  const pivot = entry(rows, best, column);
  if (Math.abs(pivot) < RANK_TOLERANCE) return false;
  const pivotRow = item(rows, best).map((value) => value / pivot);
  rows[best] = item(rows, top);
  rows[top] = pivotRow;
  rows.forEach((row, i) => {
    if (i === top) return;
    const factor = item(row, column);
    rows[i] = row.map((value, j) => value - factor * item(pivotRow, j));
  });
  return true;
}

/** Indices of the weights that weighings and restraints together leave open; empty when all are determined. */
export function undeterminedWeights(design: Matrix, restraints: Matrix): number[] {
  const { rows, pivots } = reduce([...design, ...restraints]);
  const count = item(design, 0).length;
  const open = Array.from({ length: count }, (_, j) => j).filter((j) => !pivots.includes(j));
  const touched = pivots.filter((_, i) => open.some((j) => Math.abs(entry(rows, i, j)) > RANK_TOLERANCE));
  return [...open, ...touched].sort((i, j) => i - j);
}

/**
 * Refuses a design that leaves weights open, and restraints that repeat each other.
 * @throws EngineError `not-determined` naming the weights; `dependent-restraints`
 */
export function requireDetermined(design: Matrix, restraints: Matrix, names?: readonly string[]): void {
  if (reduce(restraints).pivots.length < restraints.length) {
    throw new EngineError(
      'dependent-restraints',
      'restraints',
      'one that is a combination of the others',
      'Keep only restraints that each say something new.',
    );
  }
  const open = undeterminedWeights(design, restraints);
  if (open.length === 0) return;
  const list = open.map((j) => names?.[j] ?? `weight ${j + 1}`).join(', ');
  throw new EngineError(
    'not-determined',
    'design',
    `weighings and restraints that leave ${list} open`,
    'Add a weighing or a restraint that connects them.',
  );
}

import { EngineError } from '../errors.ts';
import { entry, item } from '../linear/entries.ts';
import { isPositiveSemidefinite } from '../linear/matrix.ts';
import { requireNumber } from '../quantity/domain.ts';
import { effectiveDegreesOfFreedom } from './effective-degrees-of-freedom.ts';

/** One line of an uncertainty budget. */
export interface BudgetComponent {
  /** What it is, as the budget names it. */
  name: string;
  /** Standard uncertainty in its own unit, not negative. */
  standardUncertainty: number;
  /** Change of the result per unit of this quantity. */
  sensitivity: number;
  /** Degrees of freedom; Infinity when left out. */
  degreesOfFreedom?: number;
  /** Name of the variance estimate it comes from; equal names are one estimate. */
  estimate?: string;
}

/** A combined uncertainty. */
export interface CombinedUncertainty {
  /** In the unit of the result. */
  standardUncertainty: number;
  /** Effective degrees of freedom; null with a correlation matrix, for which they are not defined. */
  degreesOfFreedom: number | null;
}

/** Rounding room of a printed or computed coefficient. */
const TOLERANCE = 1e-9;

/**
 * Combines the components of a budget to the standard uncertainty of its result.
 *
 * Source: JCGM 100:2008, 5.1.2 without and 5.2.2 with correlation; annex G.4.1 for the degrees of freedom.
 *
 * @param components budget lines, at least one
 * @param correlation correlation coefficients in the order of the components, 1 on the diagonal
 * @throws EngineError `empty`, `not-finite`, `out-of-range`, `conflicting-degrees-of-freedom`, `wrong-size`,
 *   `not-symmetric`, or `not-positive-semidefinite` naming the two components whose correlation is impossible
 */
export function combine(
  components: readonly BudgetComponent[],
  correlation?: readonly (readonly number[])[],
): CombinedUncertainty {
  const contributions = components.map((one, i) => {
    const field = `components[${i}]`;
    const u = requireNumber(one.standardUncertainty, `${field}.standardUncertainty`, { min: 0 });
    return u * requireNumber(one.sensitivity, `${field}.sensitivity`);
  });
  const degreesOfFreedom = effectiveDegreesOfFreedom(
    components.map((one, i) => ({
      contribution: item(contributions, i),
      degreesOfFreedom: one.degreesOfFreedom ?? Infinity,
      estimate: one.estimate,
    })),
  );
  if (correlation === undefined)
    return { standardUncertainty: Math.hypot(...contributions), degreesOfFreedom };
  checkCorrelation(components, correlation);
  return { standardUncertainty: correlated(contributions, correlation), degreesOfFreedom: null };
}

/** Root of c' R c; where correlations cancel, rounding may leave a little below zero. */
function correlated(contributions: number[], correlation: readonly (readonly number[])[]): number {
  const scale = Math.max(...contributions.map(Math.abs)) || 1;
  let variance = 0;
  correlation.forEach((row, i) => {
    row.forEach((coefficient, j) => {
      variance += ((item(contributions, i) / scale) * coefficient * item(contributions, j)) / scale;
    });
  });
  return Math.sqrt(Math.max(0, variance)) * scale;
}

function refusePair(
  code: string,
  components: readonly BudgetComponent[],
  i: number,
  j: number,
  why: string,
): never {
  const names = `"${item(components, i).name}" and "${item(components, j).name}"`;
  throw new EngineError(code, `correlation[${i}][${j}]`, `correlation of ${names}: ${why}`);
}

function checkCorrelation(
  components: readonly BudgetComponent[],
  correlation: readonly (readonly number[])[],
): void {
  const size = components.length;
  if (correlation.length !== size || correlation.some((row) => row.length !== size)) {
    const received = `${correlation.length} rows of ${correlation.map((row) => row.length).join(', ')}`;
    throw new EngineError(
      'wrong-size',
      'correlation',
      `correlation is to have ${size} rows of ${size}; received ${received}.`,
    );
  }
  correlation.forEach((row, i) => {
    row.forEach((value, j) => {
      const mirrored = entry(correlation, j, i);
      requireNumber(value, `correlation[${i}][${j}]`, i === j ? { min: 1, max: 1 } : { min: -1, max: 1 });
      if (Math.abs(value - mirrored) <= TOLERANCE) return;
      refusePair('not-symmetric', components, i, j, `${value} one way and ${mirrored} the other.`);
    });
  });
  const { offending } = isPositiveSemidefinite(correlation);
  if (offending === undefined) return;
  const [i, j] = offending;
  const why =
    `${entry(correlation, i, j)} cannot stand beside the other coefficients: some combination of the components ` +
    'would have a variance below zero. Look at this pair first.';
  refusePair('not-positive-semidefinite', components, i, j, why);
}

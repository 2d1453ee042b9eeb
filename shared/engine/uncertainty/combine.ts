import { item } from '../linear/entries.ts';
import { requirePositiveSemidefinite } from '../linear/matrix.ts';
import { requireNumber, requireSize } from '../quantity/domain.ts';
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
  /** Effective degrees of freedom, not truncated; null with a correlation matrix, for which they are not defined. */
  degreesOfFreedom: number | null;
}

/**
 * Combines the components of a budget to the standard uncertainty of its result.
 *
 * Source: JCGM 100:2008, 5.1.2 without and 5.2.2 with correlation; annex G.4.1 for the degrees of freedom.
 *
 * @param components budget lines, at least one
 * @param correlation correlation coefficients in the order of the components, 1 on the diagonal
 * @throws EngineError `too-few-values`, `not-finite`, `out-of-range`, `conflicting-degrees-of-freedom`, `size-mismatch`,
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

function checkCorrelation(
  components: readonly BudgetComponent[],
  correlation: readonly (readonly number[])[],
): void {
  const size = components.length;
  requireSize(correlation.length, size, 'correlation', 'components');
  correlation.forEach((row, i) => {
    requireSize(row.length, size, `correlation[${i}]`, 'components');
    row.forEach((value, j) => {
      requireNumber(value, `correlation[${i}][${j}]`, i === j ? { min: 1, max: 1 } : { min: -1, max: 1 });
    });
  });
  requirePositiveSemidefinite(correlation, 'correlation', (i) => `"${item(components, i).name}"`);
}

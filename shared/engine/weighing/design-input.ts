import { EngineError } from '../errors.ts';
import { build, type Matrix } from '../linear/entries.ts';
import { cholesky, requirePositiveSemidefinite } from '../linear/matrix.ts';
import { requireNumbers, requireRectangular } from '../linear/requirements.ts';
import { requireNumber, requireSize } from '../quantity/domain.ts';
import { requireDetermined } from './design-rank.ts';

/** What is known beforehand: a combination of the weights and its value. */
export type Restraint = { weights: number[]; value: number; standardUncertainty?: number };

/** A weighing design with its observations; the contract is on `solveWeighingDesign`. */
export type WeighingDesignInput = {
  /** One row for each weighing: +1 and -1 for the weights on the two sides, 0 for those that rest. */
  design: number[][];
  /** Observed differences, one for each row, as deviations from the difference of the nominals. */
  differences: number[];
  /** The one restraint of an ordinary design. Give this or `restraints`. */
  restraint?: Restraint;
  restraints?: Restraint[];
  /** Covariance of the restraint values; replaces their standard uncertainties. */
  restraintCovariance?: number[][];
  /** Covariance of the differences where they are not equally good or are correlated. */
  observationCovariance?: number[][];
  /** Standard deviation of one weight from day to day, beyond what shows within a run. */
  betweenStandardDeviation?: number;
  /** Pooled standard deviation of one weighing; without it that of the residuals serves. */
  withinStandardDeviation?: number;
  /** Names of the weights for messages. */
  names?: string[];
};

/** The same after checking, with everything optional filled in. */
export type CheckedDesign = {
  design: Matrix;
  differences: readonly number[];
  restraintRows: Matrix;
  restraintValues: readonly number[];
  restraintCovariance: Matrix;
};

/**
 * Checks sizes, numbers, covariances and rank.
 * @throws EngineError the codes named at `solveWeighingDesign`
 */
export function checkDesign(a: WeighingDesignInput): CheckedDesign {
  requireRectangular(a.design, 'design');
  requireNumbers(a.differences, 'differences');
  const columns = a.design[0]?.length ?? 0;
  requireSize(a.differences.length, a.design.length, 'differences', 'weighings');
  requireSize(a.names?.length ?? columns, columns, 'names', 'weights');
  for (const field of ['betweenStandardDeviation', 'withinStandardDeviation'] as const) {
    requireNumber(a[field] ?? 0, field, { min: 0 });
  }
  const { field, restraints } = requireRestraints(a);
  checkRestraints(restraints, field, columns);
  checkObservationCovariance(a);
  const restraintRows = restraints.map((restraint) => restraint.weights);
  requireDetermined(a.design, restraintRows, a.names);
  return {
    design: a.design,
    differences: a.differences,
    restraintRows,
    restraintValues: restraints.map((restraint) => restraint.value),
    restraintCovariance: restraintCovariance(a, restraints),
  };
}

function checkRestraints(restraints: Restraint[], field: string, columns: number): void {
  restraints.forEach((restraint, i) => {
    const path = field === 'restraint' ? field : `${field}[${i}]`;
    requireNumbers(restraint.weights, `${path}.weights`);
    requireSize(restraint.weights.length, columns, `${path}.weights`, 'weights');
    requireNumber(restraint.value, `${path}.value`);
    requireNumber(restraint.standardUncertainty ?? 0, `${path}.standardUncertainty`, { min: 0 });
  });
}

function checkObservationCovariance(a: WeighingDesignInput): void {
  if (!a.observationCovariance) return;
  if (a.withinStandardDeviation !== undefined) {
    throw new EngineError(
      'two-variances',
      'withinStandardDeviation',
      a.withinStandardDeviation,
      'There is an observationCovariance as well; give one of the two.',
    );
  }
  cholesky(a.observationCovariance, 'observationCovariance');
  requireSize(a.observationCovariance.length, a.design.length, 'observationCovariance', 'weighings');
}

/** The restraints, from whichever of the two arguments holds them. */
function requireRestraints(a: WeighingDesignInput): {
  field: 'restraint' | 'restraints';
  restraints: Restraint[];
} {
  if (a.restraint && a.restraints) {
    throw new EngineError('two-restraints', 'restraint', 'restraint and restraints', 'Give one of the two.');
  }
  const restraints = a.restraint ? [a.restraint] : (a.restraints ?? []);
  if (restraints.length === 0) {
    throw new EngineError(
      'no-restraint',
      'restraint',
      'nothing',
      'Differences alone fix no mass; give at least one restraint.',
    );
  }
  return { field: a.restraint ? 'restraint' : 'restraints', restraints };
}

function restraintCovariance(a: WeighingDesignInput, restraints: Restraint[]): Matrix {
  const given = a.restraintCovariance;
  if (!given)
    return build(restraints.length, restraints.length, (i, j) =>
      i === j ? uncertainty(restraints, i) ** 2 : 0,
    );
  requirePositiveSemidefinite(given, 'restraintCovariance', (i) => `restraint ${i + 1}`);
  requireSize(given.length, restraints.length, 'restraintCovariance', 'restraints');
  return given;
}

function uncertainty(restraints: Restraint[], i: number): number {
  return restraints[i]?.standardUncertainty ?? 0;
}

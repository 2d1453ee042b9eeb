import { EngineError } from '../errors.ts';
import { requirePositiveSemidefinite } from '../linear/matrix.ts';
import { requireNumbers } from '../linear/requirements.ts';
import { requireNumber, requireSize } from '../quantity/domain.ts';

/**
 * Results of a comparison, by participant, in one unit; best as deviations from nominal, since doubles keep no
 * micrograms beside a kilogram. `covariance` goes before `uncertainties`. Without either, only the estimators that
 * find the spread from the values themselves can be used.
 */
export type Results = {
  values: number[];
  /** Standard uncertainties. */
  uncertainties?: number[];
  /** Covariance matrix of the values, for participants that share a source. */
  covariance?: number[][];
  /** Which results count in the reference value; left out = all. */
  counts?: boolean[];
};

/** Results after checking. */
export type CheckedResults = {
  values: readonly number[];
  /** Covariance matrix, or null where no uncertainties are stated. */
  covariance: readonly (readonly number[])[] | null;
  /** Whether all results are uncorrelated. */
  independent: boolean;
  /** Places of the results that count in the reference value. */
  members: number[];
};

/**
 * Checks results for length and domain.
 * @throws EngineError `too-few-values`, `not-finite`, `size-mismatch`, `out-of-range` (an uncertainty not above 0),
 * and those of `requirePositiveSemidefinite`
 */
export function checkedResults(r: Results): CheckedResults {
  requireNumbers(r.values, 'values');
  const count = r.values.length;
  for (const field of ['uncertainties', 'covariance', 'counts'] as const) {
    requireSize(r[field]?.length ?? count, count, field, 'values');
  }
  const members = r.values.map((_, i) => i).filter((i) => r.counts?.[i] ?? true);
  if (members.length === 0) {
    throw new EngineError('too-few-values', 'counts', 'no result that counts', 'Let at least one count.');
  }
  const covariance = r.covariance ? checkedCovariance(r.covariance) : diagonal(r.uncertainties);
  const independent = !r.covariance?.some((row, i) => row.some((value, j) => i !== j && value !== 0));
  return { values: r.values, covariance, independent, members };
}

function diagonal(uncertainties: readonly number[] | undefined): number[][] | null {
  uncertainties?.forEach((u, i) => requireNumber(u, `uncertainties[${i}]`, { above: 0 }));
  return uncertainties?.map((u, i) => uncertainties.map((_, j) => (i === j ? u * u : 0))) ?? null;
}

function checkedCovariance(covariance: number[][]): number[][] {
  requirePositiveSemidefinite(covariance, 'covariance', (i) => `result ${i + 1}`);
  covariance.forEach((row, i) => requireNumber(row[i], `covariance[${i}][${i}]`, { above: 0 }));
  return covariance;
}

/** The covariance matrix. @throws EngineError `missing-uncertainties` where none is stated */
export function statedCovariance(checked: CheckedResults): readonly (readonly number[])[] {
  if (checked.covariance) return checked.covariance;
  throw new EngineError(
    'missing-uncertainties',
    'uncertainties',
    'nothing',
    'This evaluation weighs results by their uncertainties; give uncertainties or a covariance.',
  );
}

/** Refuses fewer than `least` results that count. @throws EngineError `too-few-values` */
export function requireMembers(checked: CheckedResults, least: number): void {
  if (checked.members.length >= least) return;
  throw new EngineError(
    'too-few-values',
    'counts',
    `${checked.members.length} results that count`,
    `At least ${least} are needed here.`,
  );
}

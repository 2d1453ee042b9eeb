import { EngineError } from '../errors.ts';
import { isPositiveSemidefinite } from '../linear/matrix.ts';
import { requireNumbers } from '../linear/requirements.ts';

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
 * `not-a-covariance`, and those of `isPositiveSemidefinite`
 */
export function checkedResults(r: Results): CheckedResults {
  requireNumbers(r.values, 'values');
  const count = r.values.length;
  for (const field of ['uncertainties', 'covariance', 'counts'] as const) {
    if ((r[field]?.length ?? count) !== count) {
      throw new EngineError(
        'size-mismatch',
        field,
        `${field} has ${r[field]!.length} entries for ${count} values.`,
      );
    }
  }
  const members = r.values.map((_, i) => i).filter((i) => r.counts?.[i] ?? true);
  if (members.length === 0) {
    throw new EngineError(
      'too-few-values',
      'counts',
      'No result counts in the reference value; let at least one count.',
    );
  }
  const covariance = r.covariance ? checkedCovariance(r.covariance) : diagonal(r.uncertainties);
  const independent = !r.covariance?.some((row, i) => row.some((value, j) => i !== j && value !== 0));
  return { values: r.values, covariance, independent, members };
}

function diagonal(uncertainties: readonly number[] | undefined): number[][] | null {
  uncertainties?.forEach((u, i) => requirePositive(u, `uncertainties[${i}]`));
  return uncertainties?.map((u, i) => uncertainties.map((_, j) => (i === j ? u * u : 0))) ?? null;
}

function checkedCovariance(covariance: number[][]): number[][] {
  const { ok, offending } = isPositiveSemidefinite(covariance);
  if (!ok) {
    const [i, j] = offending!;
    throw new EngineError(
      'not-a-covariance',
      `covariance[${i}][${j}]`,
      `No set of results can have this covariance; see entry ${covariance[i]![j]!} of results ${i + 1} and ${j + 1}.`,
    );
  }
  covariance.forEach((row, i) => requirePositive(row[i]!, `covariance[${i}][${i}]`));
  return covariance;
}

/** Refuses what is not a finite number above 0. @throws EngineError `out-of-range` */
export function requirePositive(value: number, field: string): void {
  if (Number.isFinite(value) && value > 0) return;
  throw new EngineError('out-of-range', field, `${field} is ${value}; a finite number above 0 is expected.`);
}

/** The covariance matrix. @throws EngineError `uncertainties-missing` where none is stated */
export function statedCovariance(checked: CheckedResults): readonly (readonly number[])[] {
  if (checked.covariance) return checked.covariance;
  throw new EngineError(
    'uncertainties-missing',
    'uncertainties',
    'This evaluation weighs results by their uncertainties; give uncertainties or a covariance.',
  );
}

/** Refuses fewer than `least` results that count. @throws EngineError `too-few-values` */
export function requireMembers(checked: CheckedResults, least: number): void {
  if (checked.members.length >= least) return;
  throw new EngineError(
    'too-few-values',
    'counts',
    `${checked.members.length} results count in the reference value; this estimator needs at least ${least}.`,
  );
}

import { EngineError } from '../errors.ts';
import { multiplyVector, quadraticForm } from '../linear/matrix.ts';
import { requireNumber, requireWhole } from '../quantity/domain.ts';
import { observed } from './consistency.ts';
import { type DegreeOfEquivalence, equivalence } from './degrees-of-equivalence.ts';
import { type ReferenceValue, referenceValue } from './reference-value.ts';
import { checkedResults, type Results, statedCovariance } from './results.ts';
import { weightedMean } from './weighted-mean.ts';

/** A participant of both comparisons: its places, and the covariance of its two results (the common part squared). */
export type LinkingParticipant = { reference: number; regional: number; covariance: number };

/** A regional comparison on the scale of another. */
export type Link = {
  /** Of the reference comparison; linking never moves it. */
  reference: Pick<ReferenceValue, 'value' | 'coefficients' | 'standardUncertainty'>;
  /** Reference scale less regional scale, with the weights of the linking participants. */
  offset: number;
  offsetUncertainty: number;
  weights: number[];
  differences: { difference: number; standardUncertainty: number }[];
  /** Of the linking differences about the offset. */
  chiSquared: number;
  degreesOfFreedom: number;
  pValue: number;
  covarianceWithReference: number;
  /** Of the regional participants, against the reference value of the other comparison. */
  degreesOfEquivalence: DegreeOfEquivalence[];
  /** Every regional participant `i` against every participant `j` of the reference comparison. */
  pairs: { i: number; j: number; difference: number; expandedUncertainty: number }[];
};

/**
 * Links a regional comparison to a reference comparison through the participants of both (Delahaye and Witt 2002
 * Metrologia 39 Tech. Suppl. 01005; Elster, Link and Woeger 2003 Metrologia 40 189), in matrix form over the joint
 * covariance of all results. For ratios give relative deviations or logarithms.
 * @param a.published reference value as published, if another estimator than the weighted mean was used
 * @throws EngineError `no-link`, `size-mismatch`, `out-of-range`, `not-finite`, `not-whole`, `not-positive-semidefinite`, those of
 * `checkedResults` and `referenceValue`
 */
export function link(a: {
  reference: Results;
  regional: Results;
  linking: LinkingParticipant[];
  published?: Pick<ReferenceValue, 'value' | 'coefficients' | 'standardUncertainty'>;
}): Link {
  const joint = jointResults(a);
  const reference = a.published ?? referenceValue(a.reference, 'weighted-mean');
  const coefficients = joint.values.map((_, place) => reference.coefficients[place] ?? 0);
  const rows = a.linking.map((one) => difference(joint, one.reference, joint.split + one.regional));
  const { mean, differences } = linkMean(rows, joint);
  const toOffset = joint.values.map((_, i) =>
    dot(
      mean.coefficients,
      rows.map((row) => row[i]!),
    ),
  );
  // What one result on the reference scale, `x + offset`, is sensitive to.
  const onReferenceScale = (i: number) => plus(unit(joint, joint.split + i), toOffset);
  const variance = (k: number[]) => quadraticForm(joint.covariance, k);
  return {
    reference,
    offset: mean.value,
    offsetUncertainty: Math.sqrt(mean.variance),
    weights: mean.coefficients,
    differences,
    ...chiSquaredOf(mean.chiSquared, rows.length - 1),
    covarianceWithReference: dot(multiplyVector(joint.covariance, toOffset), coefficients),
    degreesOfEquivalence: a.regional.values.map((x, i) =>
      equivalence(x + mean.value - reference.value, variance(minus(onReferenceScale(i), coefficients))),
    ),
    pairs: a.regional.values.flatMap((x, i) =>
      a.reference.values.map((other, j) => {
        const pair = equivalence(
          x + mean.value - other,
          variance(minus(onReferenceScale(i), unit(joint, j))),
        );
        return { i, j, difference: pair.difference, expandedUncertainty: pair.expandedUncertainty };
      }),
    ),
  };
}

/** Both comparisons in one list; the regional one begins at `split`. */
type Joint = { values: number[]; covariance: number[][]; split: number };

function unit(joint: Joint, place: number): number[] {
  return joint.values.map((_, i) => Number(i === place));
}

function difference(joint: Joint, one: number, other: number): number[] {
  return minus(unit(joint, one), unit(joint, other));
}

/** The results of both comparisons in one list, with the covariances of the linking participants between them. */
function jointResults(a: { reference: Results; regional: Results; linking: LinkingParticipant[] }): Joint {
  const [reference, regional] = [checkedResults(a.reference), checkedResults(a.regional)];
  const blocks = [statedCovariance(reference), statedCovariance(regional)];
  const split = reference.values.length;
  checkLinking(a.linking, split, regional.values.length);
  const values = [...reference.values, ...regional.values];
  const covariance = values.map((_, i) =>
    values.map((_unused, j) => {
      if (i < split && j < split) return blocks[0]![i]![j]!;
      return i >= split && j >= split ? blocks[1]![i - split]![j - split]! : 0;
    }),
  );
  for (const one of a.linking) {
    covariance[one.reference]![split + one.regional] = one.covariance;
    covariance[split + one.regional]![one.reference] = one.covariance;
  }
  checkedResults({ values, covariance });
  return { values, covariance, split };
}

function checkLinking(
  linking: readonly LinkingParticipant[],
  referenceCount: number,
  regionalCount: number,
): void {
  if (linking.length === 0) {
    throw new EngineError(
      'no-link',
      'linking',
      'no participant',
      'At least one has to have taken part in both comparisons.',
    );
  }
  linking.forEach((one, l) => {
    requireWhole(one.reference, `linking[${l}].reference`, { min: 0, max: referenceCount - 1 });
    requireWhole(one.regional, `linking[${l}].regional`, { min: 0, max: regionalCount - 1 });
    requireNumber(one.covariance, `linking[${l}].covariance`);
  });
}

/** The linking differences and their generalised least squares mean. */
function linkMean(rows: number[][], joint: Joint) {
  const values = rows.map((row) => dot(row, joint.values));
  const pulled = rows.map((row) => multiplyVector(joint.covariance, row));
  const covariance = rows.map((row) => pulled.map((column) => dot(row, column)));
  const every = rows.map((_, l) => l);
  const mean = weightedMean({ values, independent: false }, covariance, every);
  const differences = values.map((value, l) => ({
    difference: value,
    standardUncertainty: Math.sqrt(covariance[l]![l]!),
  }));
  return { mean, differences };
}

/** A single linking participant agrees with itself: rounding must not say otherwise. */
function chiSquaredOf(found: number, degreesOfFreedom: number) {
  const chiSquared = degreesOfFreedom === 0 ? 0 : found;
  return { chiSquared, degreesOfFreedom, pValue: observed(chiSquared, degreesOfFreedom).pValue };
}

function plus(a: readonly number[], b: readonly number[]): number[] {
  return a.map((value, i) => value + b[i]!);
}

function minus(a: readonly number[], b: readonly number[]): number[] {
  return a.map((value, i) => value - b[i]!);
}

function dot(a: readonly number[], b: readonly number[]): number {
  return a.reduce((sum, value, i) => sum + value * b[i]!, 0);
}

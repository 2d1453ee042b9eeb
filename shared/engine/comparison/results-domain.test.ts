import { describe, expect, it } from 'vitest';
import { normalQuantile } from '../uncertainty/normal-distribution.ts';
import { chiSquaredUpperPoint, chiSquaredUpperTail } from './chi-squared.ts';
import { consistency } from './consistency.ts';
import { degreesOfEquivalence } from './degrees-of-equivalence.ts';
import { largestConsistentSubset } from './largest-consistent-subset.ts';
import { type Estimator, referenceValue } from './reference-value.ts';
import type { Results } from './results.ts';

const right: Results = { values: [1, 2, 4], uncertainties: [1, 1, 2] };

describe('results outside the domain are refused with their field', () => {
  it.each<[string, Results, string, string]>([
    ['no values', { values: [] }, 'too-few-values', 'values'],
    ['a value that is no number', { values: [1, NaN] }, 'not-finite', 'values[1]'],
    ['too few uncertainties', { values: [1, 2], uncertainties: [1] }, 'size-mismatch', 'uncertainties'],
    ['a covariance of another size', { values: [1, 2], covariance: [[1]] }, 'size-mismatch', 'covariance'],
    ['too few switches', { values: [1, 2], counts: [true] }, 'size-mismatch', 'counts'],
    ['an uncertainty of 0', { values: [1, 2], uncertainties: [1, 0] }, 'out-of-range', 'uncertainties[1]'],
    [
      'an uncertainty that is no number',
      { values: [1], uncertainties: [NaN] },
      'not-finite',
      'uncertainties[0]',
    ],
    [
      'an impossible covariance',
      {
        values: [1, 2],
        covariance: [
          [1, 2],
          [2, 1],
        ],
      },
      'not-positive-semidefinite',
      'covariance[0][1]',
    ],
    [
      'a variance of 0',
      {
        values: [1, 2],
        covariance: [
          [1, 0],
          [0, 0],
        ],
      },
      'out-of-range',
      'covariance[1][1]',
    ],
    ['nobody who counts', { ...right, counts: [false, false, false] }, 'too-few-values', 'counts'],
    ['no uncertainties', { values: [1, 2] }, 'missing-uncertainties', 'uncertainties'],
    [
      'complete correlation',
      {
        values: [1, 2],
        covariance: [
          [1, 1],
          [1, 1],
        ],
      },
      'singular',
      'covariance[1]',
    ],
  ])('%s', (_, results, code, field) => {
    expect(() => referenceValue(results, 'weighted-mean')).toThrow(
      expect.objectContaining({ name: 'EngineError', code, field }),
    );
  });

  it.each<[Estimator, Results]>([
    ['mandel-paule', { values: [1], uncertainties: [1] }],
    ['dersimonian-laird', { values: [1], uncertainties: [1] }],
    ['algorithm-a', { values: [1] }],
    ['q-hampel', { values: [1] }],
    ['arithmetic-mean', { values: [1] }],
    ['median', { values: [1] }],
  ])('%s of a single result', (estimator, results) => {
    expect(() => referenceValue(results, estimator)).toThrow(
      expect.objectContaining({ code: 'too-few-values', field: 'counts' }),
    );
  });

  it('an estimator that is not known, a level outside 0 to 1, coefficients of another comparison', () => {
    expect(() => referenceValue(right, 'mode' as Estimator)).toThrow(
      expect.objectContaining({ code: 'unknown-choice' }),
    );
    for (const level of [0, 1, NaN]) {
      expect(() => largestConsistentSubset(right, level)).toThrow(
        expect.objectContaining({ field: 'level' }),
      );
    }
    expect(() => consistency(right, 0)).toThrow(expect.objectContaining({ field: 'level' }));
    expect(() => consistency({ values: [1], uncertainties: [1] })).toThrow(
      expect.objectContaining({ code: 'too-few-values' }),
    );
    expect(() => degreesOfEquivalence(right, { value: 0, coefficients: [1] })).toThrow(
      expect.objectContaining({ code: 'size-mismatch', field: 'ref.coefficients' }),
    );
  });
});

describe('edges inside the domain never give NaN', () => {
  it('a single result is its own weighted mean', () => {
    expect(referenceValue({ values: [3], uncertainties: [2] }, 'weighted-mean')).toEqual({
      value: 3,
      standardUncertainty: 2,
      coefficients: [1],
      betweenVariance: 0,
      chiSquared: 0,
      degreesOfFreedom: 0,
      pValue: 1,
      birgeRatio: 0,
      warnings: [],
    });
  });

  it.each<Estimator>(['algorithm-a', 'q-hampel', 'median', 'arithmetic-mean'])(
    'equal results have no spread: %s',
    (estimator) => {
      const found = referenceValue({ values: [5, 5, 5, 5] }, estimator);
      expect(found).toMatchObject({ value: 5, standardUncertainty: 0, chiSquared: 0, pValue: 1 });
      expect(found.coefficients.reduce((sum, c) => sum + c, 0)).toBeCloseTo(1, 14);
    },
  );

  it('two equal clusters leave Hampel the middle', () => {
    const found = referenceValue({ values: [0, 0, 0, 10, 10, 10] }, 'q-hampel');
    expect(found.value).toBeCloseTo(5, 12);
    expect(found.coefficients.every(Number.isFinite)).toBe(true);
  });

  it('of a stretch where the sum of psi is 0, Hampel takes the point nearest the median', () => {
    const found = referenceValue({ values: [0, 0.1, 0.2, 1.7, 1.8, 1.9] }, 'q-hampel');
    expect(found.value).toBeCloseTo(0.95, 12);
    expect(found.coefficients).toEqual(Array.from({ length: 6 }, () => 1 / 6));
  });

  it('many equal results: the Q method counts from 0, whatever share of pairs is equal', () => {
    // Ten pairs: three at 0, four at 1, three at 2; level 0.475 on the line from (0, 0) to (1, 0.5).
    const { spread } = referenceValue({ values: [0, 0, 0, 1, 2] }, 'q-hampel');
    expect(spread).toBeCloseTo(0.95 / (Math.SQRT2 * normalQuantile(0.7375)), 12);
  });

  it('results without uncertainties are tested with the spread found', () => {
    const { chiSquared, degreesOfFreedom } = referenceValue({ values: [1, 2, 3] }, 'arithmetic-mean');
    expect([chiSquared, degreesOfFreedom]).toEqual([2, 2]);
  });

  it('the median of an even number is half each of the two in the middle', () => {
    expect(referenceValue({ values: [4, 1, 3, 9] }, 'median')).toMatchObject({
      value: 3.5,
      coefficients: [0.5, 0, 0.5, 0],
    });
    expect(referenceValue({ values: [4, 1, 3] }, 'median').coefficients).toEqual([0, 0, 1]);
  });

  it('two results that disagree leave one, with the other as a tie', () => {
    const found = largestConsistentSubset({ values: [0, 100], uncertainties: [1, 1] });
    expect(found).toMatchObject({ members: [0], ties: [[1]], chiSquared: 0, exhaustive: true });
  });

  it('results that do not count are left out of the search', () => {
    const found = largestConsistentSubset({
      values: [0, 100, 0.5],
      uncertainties: [1, 1, 1],
      counts: [true, false, true],
    });
    expect(found.members).toEqual([0, 2]);
  });
});

describe('chi-squared', () => {
  it('has the upper points of the tables (scipy 1.17.1)', () => {
    const points = [
      3.8414588206941285, 5.991464547107983, 15.507313055865454, 16.91897760462045, 54.57222775894174,
    ];
    [1, 2, 8, 9, 39].forEach((nu, i) => expect(chiSquaredUpperPoint(0.05, nu)).toBeCloseTo(points[i]!, 10));
  });

  it('keeps its digits in the far tail and for many degrees of freedom', () => {
    expect(chiSquaredUpperTail(625.25, 3) / 3.3833540073794086e-135).toBeCloseTo(1, 9);
    expect(chiSquaredUpperTail(3000, 3000)).toBeCloseTo(0.49656643883965, 11);
    expect(chiSquaredUpperTail(0, 5)).toBe(1);
    expect(chiSquaredUpperTail(0.1, 0)).toBe(0);
  });

  it('refuses broken degrees of freedom and negative values', () => {
    for (const nu of [-1, 1.5, NaN]) {
      expect(() => chiSquaredUpperTail(1, nu)).toThrow(
        expect.objectContaining({ field: 'degreesOfFreedom' }),
      );
    }
    for (const x of [-1, NaN])
      expect(() => chiSquaredUpperTail(x, 1)).toThrow(expect.objectContaining({ field: 'x' }));
    expect(() => chiSquaredUpperPoint(1, 1)).toThrow(expect.objectContaining({ field: 'probability' }));
  });
});

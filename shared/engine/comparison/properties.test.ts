import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { degreesOfEquivalence, pairwise } from './degrees-of-equivalence.ts';
import { largestConsistentSubset } from './largest-consistent-subset.ts';
import { type Estimator, referenceValue } from './reference-value.ts';

const ESTIMATORS: Estimator[] = [
  'weighted-mean',
  'arithmetic-mean',
  'mandel-paule',
  'dersimonian-laird',
  'algorithm-a',
  'q-hampel',
];
const SETTINGS = { seed: 20261201, numRuns: 80 };
const result = fc.record({
  x: fc.integer({ min: -1000, max: 1000 }).map((n) => n / 100),
  u: fc.integer({ min: 10, max: 300 }).map((n) => n / 100),
});
const comparisons = fc.array(result, { minLength: 3, maxLength: 8 }).map((rows) => ({
  values: rows.map(({ x }) => x),
  uncertainties: rows.map(({ u }) => u),
}));

function close(found: number, expected: number): void {
  expect(Math.abs(found - expected)).toBeLessThanOrEqual(1e-6 * (1 + Math.abs(expected)));
}

describe.each(ESTIMATORS)('%s', (estimator) => {
  it('moves with a shift, scales with the unit, and does not mind the order', () => {
    fc.assert(
      fc.property(
        comparisons,
        fc.integer({ min: -50, max: 50 }),
        fc.integer({ min: 1, max: 20 }),
        (r, by, factor) => {
          const base = referenceValue(r, estimator);
          close(
            referenceValue({ ...r, values: r.values.map((x) => x + by) }, estimator).value,
            base.value + by,
          );
          const scaled = referenceValue(
            {
              values: r.values.map((x) => x * factor),
              uncertainties: r.uncertainties.map((u) => u * factor),
            },
            estimator,
          );
          close(scaled.value, base.value * factor);
          close(scaled.standardUncertainty, base.standardUncertainty * factor);
          close(scaled.chiSquared, base.chiSquared);
          const turned = referenceValue(
            { values: r.values.toReversed(), uncertainties: r.uncertainties.toReversed() },
            estimator,
          );
          close(turned.value, base.value);
          close(turned.standardUncertainty, base.standardUncertainty);
        },
      ),
      SETTINGS,
    );
  });

  it('has coefficients that sum to 1', () => {
    fc.assert(
      fc.property(comparisons, (r) => {
        close(
          referenceValue(r, estimator).coefficients.reduce((sum, c) => sum + c, 0),
          1,
        );
      }),
      SETTINGS,
    );
  });
});

describe('differences', () => {
  it('members of the weighted mean have the minus sign, outsiders the plus sign', () => {
    fc.assert(
      fc.property(comparisons, (r) => {
        const kept = { ...r, counts: r.values.map((_, i) => i > 0) };
        const ref = referenceValue(kept, 'weighted-mean');
        degreesOfEquivalence(kept, ref).forEach((degree, i) => {
          const sign = i === 0 ? 1 : -1;
          close(
            (degree.expandedUncertainty / 2) ** 2,
            r.uncertainties[i]! ** 2 + sign * ref.standardUncertainty ** 2,
          );
        });
      }),
      SETTINGS,
    );
  });

  it('a pair is the difference of two degrees of equivalence, whatever the estimator', () => {
    fc.assert(
      fc.property(comparisons, fc.constantFrom(...ESTIMATORS), (r, estimator) => {
        const degrees = degreesOfEquivalence(r, referenceValue(r, estimator));
        for (const { i, j, difference } of pairwise(r)) {
          close(difference, degrees[i]!.difference - degrees[j]!.difference);
        }
      }),
      SETTINGS,
    );
  });

  it('a covariance without correlations is the same as uncertainties', () => {
    fc.assert(
      fc.property(comparisons, (r) => {
        // One tiny correlation sends the evaluation down the road of full matrices.
        const covariance = r.uncertainties.map((u, i) =>
          r.uncertainties.map((_, j) => (i === j ? u * u : 1e-14)),
        );
        for (const estimator of ['weighted-mean', 'mandel-paule', 'dersimonian-laird'] as const) {
          const [plain, full] = [
            referenceValue(r, estimator),
            referenceValue({ values: r.values, covariance }, estimator),
          ];
          close(full.value, plain.value);
          close(full.standardUncertainty, plain.standardUncertainty);
        }
      }),
      SETTINGS,
    );
  });

  it('no subset with one more member is consistent', () => {
    fc.assert(
      fc.property(comparisons, (r) => {
        const { members } = largestConsistentSubset(r);
        r.values.forEach((_, i) => {
          if (members.includes(i)) return;
          const counts = r.values.map((_unused, j) => j === i || members.includes(j));
          expect(referenceValue({ ...r, counts }, 'weighted-mean').pValue).toBeLessThan(0.05);
        });
      }),
      SETTINGS,
    );
  });
});

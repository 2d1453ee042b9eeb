import { describe, expect, it } from 'vitest';
import { LINK_SET } from './check-data/link-set.ts';
import { degreesOfEquivalence } from './degrees-of-equivalence.ts';
import { link } from './link.ts';
import { referenceValue } from './reference-value.ts';

const linking = LINK_SET.linking.map(({ common, ...places }) => ({ ...places, covariance: common ** 2 }));
const found = link({ ...LINK_SET, linking });

describe('link: S7, a regional comparison to another (synthetic, mpmath at 50 digits)', () => {
  it('finds the offset by the linking laboratories, weighted by what their results do not share', () => {
    expect(found.offset).toBeCloseTo(LINK_SET.offset, 13);
    expect(found.offsetUncertainty).toBeCloseTo(LINK_SET.uOffset, 13);
    found.weights.forEach((weight, l) => expect(weight).toBeCloseTo(LINK_SET.weights[l]!, 12));
    found.differences.forEach(({ difference, standardUncertainty }, l) => {
      expect(difference).toBeCloseTo(LINK_SET.differences[l]!, 13);
      expect(standardUncertainty).toBeCloseTo(LINK_SET.uDifferences[l]!, 13);
    });
    expect(found.chiSquared).toBeCloseTo(LINK_SET.chiSquared, 11);
    expect(found.degreesOfFreedom).toBe(1);
    expect(found.covarianceWithReference).toBeCloseTo(LINK_SET.covarianceWithReference, 16);
  });

  it('gives the regional degrees of equivalence and all pairs between the comparisons', () => {
    found.degreesOfEquivalence.forEach((degree, j) => {
      expect(degree.difference).toBeCloseTo(LINK_SET.degrees[j]!.difference, 13);
      expect(degree.expandedUncertainty).toBeCloseTo(LINK_SET.degrees[j]!.expanded, 12);
    });
    for (const [i, j, difference, expanded] of LINK_SET.pairs) {
      const pair = found.pairs.find((each) => each.i === i && each.j === j)!;
      expect(pair.difference).toBeCloseTo(difference!, 13);
      expect(pair.expandedUncertainty).toBeCloseTo(expanded!, 12);
    }
  });

  it('leaves the reference comparison as it was', () => {
    const ref = referenceValue(LINK_SET.reference, 'weighted-mean');
    expect(found.reference.value).toBe(ref.value);
    expect(ref.value).toBeCloseTo(LINK_SET.value, 13);
    expect(ref.standardUncertainty).toBeCloseTo(LINK_SET.u, 14);
    expect(ref.chiSquared).toBeCloseTo(6.706458906380556, 11);
    degreesOfEquivalence(LINK_SET.reference, ref).forEach((degree, i) => {
      expect(degree.difference).toBeCloseTo(LINK_SET.ofReference[i]!.difference, 13);
      expect(degree.expandedUncertainty).toBeCloseTo(LINK_SET.ofReference[i]!.expanded, 12);
    });
  });

  it('takes a published reference value of another estimator, and a single linking laboratory', () => {
    const published = referenceValue(LINK_SET.reference, 'arithmetic-mean');
    const single = link({ ...LINK_SET, linking: linking.slice(0, 1), published });
    expect(single.reference).toBe(published);
    expect(single).toMatchObject({ chiSquared: 0, degreesOfFreedom: 0, pValue: 1, weights: [1] });
    expect(single.degreesOfEquivalence[0]!.difference).toBeCloseTo(0.209 - published.value, 13);
  });

  it.each([
    [[], 'no-link', 'linking'],
    [[{ reference: 9, regional: 0, covariance: 0 }], 'out-of-range', 'linking[0].reference'],
    [[{ reference: 0, regional: 7, covariance: 0 }], 'out-of-range', 'linking[0].regional'],
    [[{ reference: 0.5, regional: 0, covariance: 0 }], 'not-whole', 'linking[0].reference'],
    [[{ reference: 0, regional: 0, covariance: NaN }], 'not-finite', 'linking[0].covariance'],
    [[{ reference: 0, regional: 0, covariance: 1 }], 'not-positive-semidefinite', 'covariance[0][9]'],
  ])('refuses %j', (wrong, code, field) => {
    expect(() => link({ ...LINK_SET, linking: wrong })).toThrow(expect.objectContaining({ code, field }));
  });
});

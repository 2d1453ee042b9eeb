import { describe, expect, it } from 'vitest';
import type { CheckSet } from './check-data/check-set.ts';
import { CORRELATED_SETS } from './check-data/correlated-sets.ts';
import { FORTY_PARTICIPANTS } from './check-data/forty-participants.ts';
import { PUBLISHED_SETS } from './check-data/published-sets.ts';
import { ROBUST_SETS } from './check-data/robust-sets.ts';
import { TRAP_SETS } from './check-data/trap-sets.ts';
import { UNCORRELATED_SETS } from './check-data/uncorrelated-sets.ts';
import { VACCINE_SET } from './check-data/vaccine-set.ts';
import { consistency } from './consistency.ts';
import { degreesOfEquivalence, pairwise } from './degrees-of-equivalence.ts';
import { largestConsistentSubset } from './largest-consistent-subset.ts';
import { medianAbsoluteDeviation, normalizedInterquartileRange } from './order-statistics.ts';
import { referenceValue } from './reference-value.ts';

const SETS = [
  ...PUBLISHED_SETS,
  ...UNCORRELATED_SETS,
  ...TRAP_SETS,
  ...CORRELATED_SETS,
  ...FORTY_PARTICIPANTS,
];
const named = SETS.map((set): [string, CheckSet] => [`${set.id} (${set.source})`, set]);

/** Large values with a tiny spread (P05) are held in doubles to 1e-16 of themselves only. */
const tolerance = ({ id }: CheckSet) => (id === 'P05' ? 1e-7 : 1e-10);

function near(found: number, expected: number, relative: number, scale = Math.abs(expected)): void {
  expect(Math.abs(found - expected)).toBeLessThanOrEqual(relative * scale);
}

function allNear(found: number[], expected: number[], relative: number, scale: number): void {
  expect(found).toHaveLength(expected.length);
  found.forEach((value, i) => near(value, expected[i]!, relative, scale));
}

describe('the estimators against published and independently computed values', () => {
  it.each(named)('weighted mean, its weights and its test: %s', (_, set) => {
    const found = referenceValue(set, 'weighted-mean');
    const expected = set.weightedMean;
    near(found.value, expected.value, tolerance(set), expected.u);
    near(found.standardUncertainty, expected.u, 1e-11);
    allNear(found.coefficients, expected.coefficients, 1e-11, 1);
    near(found.chiSquared, expected.chiSquared, tolerance(set), 1 + expected.chiSquared);
    expect(found.degreesOfFreedom).toBe(expected.degreesOfFreedom);
    near(found.pValue, expected.pValue, 1e-7);
    near(found.birgeRatio, expected.birgeRatio, tolerance(set), 1);
    const test = consistency(set);
    near(test.critical, expected.critical, 1e-9);
    allNear([test.birgeLimits.one, test.birgeLimits.two], expected.birgeLimits, 1e-12, 1);
    expect(test.consistent).toBe(expected.chiSquared <= expected.critical);
  });

  it.each(named)('degrees of equivalence about the weighted mean: %s', (_, set) => {
    const degrees = degreesOfEquivalence(set, referenceValue(set, 'weighted-mean'));
    const scale = set.weightedMean.u;
    allNear(
      degrees.map((d) => d.difference),
      set.degrees.difference,
      tolerance(set),
      scale,
    );
    degrees.forEach((d, i) => near(d.expandedUncertainty, set.degrees.expanded[i]!, 1e-11));
    allNear(
      degrees.map((d) => d.en),
      set.degrees.en,
      tolerance(set) * 10,
      1,
    );
  });

  it.each(named)('arithmetic mean and sample median: %s', (_, set) => {
    const { values, arithmetic } = set;
    const propagated = referenceValue(set, 'arithmetic-mean');
    near(propagated.value, arithmetic.value, tolerance(set), set.weightedMean.u);
    near(propagated.standardUncertainty, arithmetic.uPropagated, 1e-11);
    near(
      referenceValue({ values }, 'arithmetic-mean').standardUncertainty,
      arithmetic.uScatter,
      tolerance(set),
    );
    const middle = referenceValue({ values }, 'median');
    near(middle.value, set.median.value, 1e-15, 1 + Math.abs(set.median.value));
    near(middle.standardUncertainty, set.median.u, tolerance(set));
    near(medianAbsoluteDeviation(values), set.median.mad, tolerance(set));
  });

  it.each(named)('random effects, both conventions for U: %s', (_, set) => {
    const pairs = [
      ['dersimonian-laird', set.derSimonianLaird],
      ['mandel-paule', set.pauleMandel],
    ] as const;
    for (const [estimator, expected] of pairs) {
      const found = referenceValue(set, estimator);
      const loose = set.id === 'P05' ? 1e-6 : 1e-9;
      near(found.betweenVariance, expected.tau2, loose, expected.tau2 + set.weightedMean.u ** 2);
      near(found.value, expected.value, loose, expected.u);
      near(found.standardUncertainty, expected.u, loose);
      const without = degreesOfEquivalence(set, found);
      const withTau = degreesOfEquivalence(set, found, { includeBetweenVariance: true });
      without.forEach((d, i) => near(d.expandedUncertainty, expected.withoutTau[i]!, loose));
      withTau.forEach((d, i) => near(d.expandedUncertainty, expected.withTau[i]!, loose));
    }
  });

  it.each(named)('largest consistent subset, and what it leaves out with the plus sign: %s', (_, set) => {
    const found = largestConsistentSubset(set);
    const expected = set.subset;
    expect(found.members).toEqual(expected.members);
    near(found.value, expected.value, tolerance(set), expected.u);
    near(found.standardUncertainty, expected.u, 1e-11);
    near(found.chiSquared, expected.chiSquared, tolerance(set), 1 + expected.chiSquared);
    expect(found.consistentOfThisSize).toBe(expected.count);
    expect(found.exhaustive).toBe(true);
    if (expected.runnerUp === null) expect(found.runnerUp).toBeNull();
    else near(found.runnerUp!.chiSquared, expected.runnerUp, 1e-10);
    const counts = set.values.map((_unused, i) => found.members.includes(i));
    const kept = { ...set, counts };
    const degrees = degreesOfEquivalence(kept, referenceValue(kept, 'weighted-mean'));
    allNear(
      degrees.map((d) => d.difference),
      expected.difference,
      tolerance(set),
      expected.u,
    );
    degrees.forEach((d, i) => near(d.expandedUncertainty, expected.expanded[i]!, 1e-11));
  });

  it.each(named.filter(([, set]) => set.pairs))('all pairs: %s', (_, set) => {
    const found = pairwise(set);
    expect(found.map(({ i, j }) => [i, j])).toEqual(set.pairs!.map(([i, j]) => [i, j]));
    found.forEach((pair, at) => {
      near(pair.difference, set.pairs![at]![2]!, 1e-12, 1 + Math.abs(set.pairs![at]![2]!));
      near(pair.expandedUncertainty, set.pairs![at]![3]!, 1e-11);
    });
  });

  it('Q = 152.23301 and the random-effects estimates of dat.bcg (R metafor 3.8.1)', () => {
    const results = { values: VACCINE_SET.values, uncertainties: VACCINE_SET.variances.map(Math.sqrt) };
    near(referenceValue(results, 'weighted-mean').chiSquared, VACCINE_SET.q, 1e-11);
    for (const [estimator, expected] of [
      ['dersimonian-laird', VACCINE_SET.derSimonianLaird],
      ['mandel-paule', VACCINE_SET.pauleMandel],
    ] as const) {
      const found = referenceValue(results, estimator);
      near(found.betweenVariance, expected.tau2, 1e-11);
      near(found.value, expected.mean, 1e-11);
      near(found.standardUncertainty, expected.se, 1e-11);
    }
  });
});

describe('the robust estimators of ISO 13528:2015 annex C', () => {
  it.each(ROBUST_SETS.map((set) => [`${set.id} (${set.source})`, set] as const))('%s', (_, set) => {
    const a = referenceValue(set, 'algorithm-a');
    near(a.value, set.algorithmA.value, 1e-9);
    near(a.spread!, set.algorithmA.spread, 1e-9);
    near(a.standardUncertainty, set.algorithmA.u, 1e-9);
    const q = referenceValue(set, 'q-hampel');
    near(q.spread!, set.q, 1e-9);
    near(q.value, set.hampel.value, 1e-9);
    near(q.standardUncertainty, set.hampel.u, 1e-9);
    near(normalizedInterquartileRange(set.values), set.nIqr, 1e-12);
    near(referenceValue(set, 'median').value, set.median, 1e-14);
  });

  it('gives the printed values of the worked example (from memory): 0.2620, 0.0402, 0.2570, 0.0426, 0.2600', () => {
    const set = ROBUST_SETS.find(({ id }) => id === 'P16')!;
    near(referenceValue(set, 'median').value, 0.262, 5e-5, 1);
    near(normalizedInterquartileRange(set.values), 0.0402, 5e-5, 1);
    near(referenceValue(set, 'algorithm-a').value, 0.257, 5e-5, 1);
    const hampel = referenceValue(set, 'q-hampel');
    near(hampel.spread!, 0.0426, 5e-5, 1);
    near(hampel.value, 0.26, 5e-5, 1);
  });
});

describe('the printed figures of published comparisons', () => {
  it('CCM.M-K8.2024: -10.7, 6.4 and L7 - L8 = 28.0 with u = 18 (second-hand copy, tolerances 0.06 and 0.5)', () => {
    const set = PUBLISHED_SETS[0]!;
    const found = referenceValue(set, 'weighted-mean');
    near(found.value, -10.7, 0.06, 1);
    near(found.standardUncertainty, 6.4, 0.06, 1);
    const pair = pairwise(set).find(({ i, j }) => i === 6 && j === 7)!;
    near(pair.difference, 28, 0.05, 1);
    near(pair.expandedUncertainty / 2, 18, 0.5, 1);
    const degrees = degreesOfEquivalence(set, found);
    expect(degrees.filter((d) => Math.abs(d.en) <= 1)).toHaveLength(8);
  });

  it('CCM.M-K8.2024: the result outside the reference value has the plus sign, U = 75.31', () => {
    const set = PUBLISHED_SETS[0]!;
    const all = {
      values: [...set.values, 4],
      uncertainties: [...set.uncertainties, 37.1],
      counts: [...set.values.map(() => true), false],
    };
    const outsider = degreesOfEquivalence(all, referenceValue(all, 'weighted-mean'))[9]!;
    near(outsider.difference, 14.710960939151349, 1e-12);
    near(outsider.expandedUncertainty, 75.31384061573354, 1e-12);
  });

  it('CODATA 2018, constant of gravitation: 6.674290(38), chi-squared per degree 13.2, Birge ratio 3.63', () => {
    const found = referenceValue(PUBLISHED_SETS[2]!, 'weighted-mean');
    near(found.value, 6.67429, 5e-7, 1);
    near(found.standardUncertainty, 3.8e-5, 5e-7, 1);
    near(found.chiSquared, 197.8399, 1e-4, 1);
    near(found.chiSquared / 15, 13.2, 0.05, 1);
    near(found.birgeRatio, 3.63, 0.005, 1);
  });

  it('Planck constant 2017: Q = 3.442127, p = 0.1788758', () => {
    const found = referenceValue(PUBLISHED_SETS[1]!, 'weighted-mean');
    near(found.chiSquared, 3.442127, 1e-6, 1);
    near(found.pValue, 0.1788758, 1e-7, 1);
  });
});

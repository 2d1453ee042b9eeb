import { describe, expect, it } from 'vitest';
import { CORRELATED_SETS } from './check-data/correlated-sets.ts';
import { DRIFT_SET } from './check-data/drift-set.ts';
import { LINK_SET } from './check-data/link-set.ts';
import { PUBLISHED_SETS } from './check-data/published-sets.ts';
import { ROBUST_SETS } from './check-data/robust-sets.ts';
import { TRAP_SETS } from './check-data/trap-sets.ts';
import { UNCORRELATED_SETS } from './check-data/uncorrelated-sets.ts';
import { VACCINE_SET } from './check-data/vaccine-set.ts';
import { chiSquaredUpperPoint } from './chi-squared.ts';
import { chiSquaredAbout, consistency } from './consistency.ts';
import { degreesOfEquivalence, pairwise } from './degrees-of-equivalence.ts';
import { largestConsistentSubset } from './largest-consistent-subset.ts';
import { link } from './link.ts';
import { referToCommonDate } from './refer-to-common-date.ts';
import { referenceValue } from './reference-value.ts';
import { enScore } from './scores.ts';

const [KILOGRAM, PLANCK, GRAVITATION] = PUBLISHED_SETS;
const set = (id: string) =>
  [...UNCORRELATED_SETS, ...TRAP_SETS, ...CORRELATED_SETS].find((each) => each.id === id)!;

describe('traps of comparisons, each with its numbers', () => {
  it('1: the sign in u(d) decides: L7 of CCM.M-K8.2024 is not covered by 19.76, but would be by 26.90', () => {
    const ref = referenceValue(KILOGRAM!, 'weighted-mean');
    const member = degreesOfEquivalence(KILOGRAM!, ref)[6]!;
    expect(member.difference).toBeCloseTo(20.21, 2);
    expect(member.expandedUncertainty).toBeCloseTo(19.76, 2);
    expect(Math.abs(member.en)).toBeGreaterThan(1);
    const counts = KILOGRAM!.values.map((_, i) => i !== 6);
    const without = { ...KILOGRAM!, counts };
    const rest = referenceValue(without, 'weighted-mean');
    const outsider = degreesOfEquivalence(without, rest)[6]!;
    const plus = 2 * Math.hypot(KILOGRAM!.uncertainties[6]!, rest.standardUncertainty);
    expect(outsider.expandedUncertainty).toBeCloseTo(plus, 10);
    expect(2 * Math.hypot(KILOGRAM!.uncertainties[6]!, ref.standardUncertainty)).toBeCloseTo(26.9, 2);
  });

  it('2: with equal weights the general formula holds where the minus sign would give a negative variance', () => {
    const results = { values: [0, 0.1, 0.3], uncertainties: [0.01, 1, 1] };
    const ref = referenceValue(results, 'arithmetic-mean');
    expect(0.01 ** 2 - ref.standardUncertainty ** 2).toBeLessThan(0);
    const degree = degreesOfEquivalence(results, ref)[0]!;
    // d = 2/3 x1 - 1/3 x2 - 1/3 x3.
    expect(degree.expandedUncertainty).toBeCloseTo(2 * Math.sqrt((4 * 1e-4 + 1 + 1) / 9), 12);
  });

  it('3: one dominant laboratory keeps the digits of its U', () => {
    const uncertainties = [1e-7, 1, 1];
    const results = { values: [0, 1, 2], uncertainties };
    const ref = referenceValue(results, 'weighted-mean');
    expect(ref.coefficients[0]).toBeGreaterThan(1 - 1e-10);
    const degree = degreesOfEquivalence(results, ref)[0]!;
    const others = ref.coefficients[1]! + ref.coefficients[2]!;
    expect(degree.expandedUncertainty / (2 * 1e-7 * Math.sqrt(others))).toBeCloseTo(1, 9);
    const alone = degreesOfEquivalence(
      { values: [5], uncertainties: [1] },
      referenceValue({ values: [5], uncertainties: [1] }, 'weighted-mean'),
    );
    expect(alone[0]).toEqual({ difference: 0, expandedUncertainty: 0, en: 0 });
  });

  it('4: values large beside their spread keep the digits that doubles hold', () => {
    const ref = referenceValue(PLANCK!, 'weighted-mean');
    const shifted = { ...PLANCK!, values: PLANCK!.values.map((x) => x - 6.62607) };
    expect(ref.chiSquared / referenceValue(shifted, 'weighted-mean').chiSquared).toBeCloseTo(1, 8);
  });

  it('5: the root of Paule and Mandel is found to the last digits; a negative estimate is cut at 0 and says so', () => {
    const results = { values: VACCINE_SET.values, uncertainties: VACCINE_SET.variances.map(Math.sqrt) };
    expect(referenceValue(results, 'mandel-paule').betweenVariance).toBeCloseTo(0.318068452205, 11);
    const cut = referenceValue(set('S0'), 'dersimonian-laird');
    expect(cut.betweenVariance).toBe(0);
    expect(cut.warnings).toEqual(['between-variance-cut-at-zero']);
    expect(referenceValue(set('T2'), 'mandel-paule').betweenVariance).toBe(0);
  });

  it('6: the largest consistent subset need not be unique, and a large search is bounded', () => {
    const tie = largestConsistentSubset(set('T3'));
    expect([tie.members, ...tie.ties]).toEqual([
      [0, 1],
      [2, 3],
    ]);
    expect(tie.value).toBeCloseTo(0.005, 12);
    const two = largestConsistentSubset(GRAVITATION!);
    expect(two.consistentOfThisSize).toBe(2);
    expect(two.ties).toEqual([]);
    expect([two.chiSquared, two.runnerUp!.chiSquared].map((x) => x.toFixed(2))).toEqual(['13.94', '15.41']);
    const values = Array.from({ length: 30 }, (_, i) => (i % 3 === 0 ? i * 10 : i * 0.01));
    const many = largestConsistentSubset({ values, uncertainties: values.map(() => 1) });
    expect(many.exhaustive).toBe(false);
    expect(many.members).toHaveLength(21);
  });

  it('7: a comparison may pass as a whole while a pair differs by more than its U', () => {
    const results = {
      values: [0, 0.1, -0.1, 0.05, -0.05, 0, 1.45, -1.45],
      uncertainties: Array.from({ length: 8 }, () => 1),
    };
    expect(consistency(results).consistent).toBe(true);
    const worst = Math.max(...pairwise(results).map((p) => Math.abs(p.difference) / p.expandedUncertainty));
    expect(worst).toBeGreaterThan(1);
  });

  it('8: CCM.M-K8.2024 sums chi-squared over ten about the value of nine: 5.5 against 16.9 at nine degrees', () => {
    const all = { values: [...KILOGRAM!.values, 4], uncertainties: [...KILOGRAM!.uncertainties, 37.1] };
    const { value } = referenceValue(KILOGRAM!, 'weighted-mean');
    expect(chiSquaredAbout(all, value)).toBeCloseTo(5.456445832718627, 10);
    expect(chiSquaredUpperPoint(0.05, 9)).toBeCloseTo(16.91897760462045, 9);
    expect(9 + Math.sqrt(18)).toBeCloseTo(13.2, 1);
  });

  it('9: a link counts the covariance of a linking laboratory, and never moves the reference value', () => {
    const linking = LINK_SET.linking.map(({ common, ...places }) => ({ ...places, covariance: common ** 2 }));
    const linked = link({ ...LINK_SET, linking });
    expect(linked.degreesOfEquivalence[0]!.expandedUncertainty).toBeCloseTo(0.0338, 4);
    const ignored = Math.hypot(
      LINK_SET.regional.uncertainties[0]!,
      linked.offsetUncertainty,
      linked.reference.standardUncertainty,
    );
    expect(2 * ignored).toBeCloseTo(0.0466, 4);
    expect(linked.reference.value).toBeCloseTo(0.205513, 6);
    expect(Math.abs(linked.reference.value - LINK_SET.jointFitValue)).toBeGreaterThan(3e-4);
  });

  it('10: the shared drift fit moves the reference value from -0.00441194 to -0.00461854', () => {
    const referred = referToCommonDate(DRIFT_SET.circulation);
    const alone = referred.covariance.map((row, i) => row.map((value, j) => (i === j ? value : 0)));
    const withFit = referenceValue(referred, 'weighted-mean');
    expect(withFit.value).toBeCloseTo(-0.00461853627261, 12);
    expect(referenceValue({ ...referred, covariance: alone }, 'weighted-mean').value).toBeCloseTo(
      DRIFT_SET.ignoringSharedFit.x_ref,
      12,
    );
    expect(referred.participants.filter((name) => name === 'P')).toHaveLength(1);
  });

  it('11: negative weights are right for T1, put the mean outside the correlated pair, and are warned of', () => {
    const ref = referenceValue(set('T1'), 'weighted-mean');
    expect(ref.coefficients.map((c) => c.toFixed(4))).toEqual(['1.2531', '-0.3381', '0.0850']);
    expect(ref.value).toBeLessThan(0.1);
    expect(ref.warnings).toEqual(['negative-weights']);
    expect(referenceValue(set('S2'), 'weighted-mean').warnings).toEqual([]);
  });

  it('12: the plus sign of the normalised error misses a member that its degree of equivalence finds', () => {
    const ref = referenceValue(KILOGRAM!, 'weighted-mean');
    const plus = enScore({
      value: KILOGRAM!.values[6]!,
      expandedUncertainty: 2 * KILOGRAM!.uncertainties[6]!,
      reference: ref.value,
      referenceExpandedUncertainty: 2 * ref.standardUncertainty,
    });
    expect(plus).toBeCloseTo(0.7513967620458967, 10);
    expect(degreesOfEquivalence(KILOGRAM!, ref)[6]!.en).toBeCloseTo(1.022864071849766, 10);
  });

  it('13: u recomputes as 6.452 from printed inputs where the report prints 6.4', () => {
    const { standardUncertainty } = referenceValue(KILOGRAM!, 'weighted-mean');
    expect(Math.abs(standardUncertainty - 6.4)).toBeLessThan(0.06);
    expect(standardUncertainty).toBeCloseTo(6.452, 3);
  });

  it('14: Algorithm A uses 1.134 and full convergence: 0.6741501 for the copper data, not 0.6736526', () => {
    const chem = ROBUST_SETS.find(({ id }) => id === 'chem')!;
    expect(referenceValue(chem, 'algorithm-a').spread).toBeCloseTo(0.6741501, 7);
  });

  it('15: of two roots of Hampel the one near the median is taken, not the outlier 28.95', () => {
    const chem = ROBUST_SETS.find(({ id }) => id === 'chem')!;
    expect(referenceValue(chem, 'q-hampel').value).toBeCloseTo(3.146764252832589, 10);
  });

  it('16: the difference from a median has an interval that is not symmetric', () => {
    const s0 = set('S0');
    const ref = referenceValue(s0, 'median', { draws: 20_000 });
    const [low, high] = degreesOfEquivalence(s0, ref)[1]!.interval!;
    const centre = (low + high) / 2;
    expect(Math.abs(centre - degreesOfEquivalence(s0, ref)[1]!.difference)).toBeGreaterThan(0.002);
  });

  it('17: U is exactly 2u, and the test takes the upper 5 % point on one side', () => {
    expect(pairwise({ values: [0, 1], uncertainties: [3, 4] })[0]!.expandedUncertainty).toBe(10);
    expect(consistency({ values: [0, 1], uncertainties: [1, 1] }).critical).toBeCloseTo(
      3.8414588206941285,
      10,
    );
  });
});

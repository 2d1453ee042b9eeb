import { describe, expect, it } from 'vitest';
import { DRIFT_SET } from './check-data/drift-set.ts';
import { degreesOfEquivalence } from './degrees-of-equivalence.ts';
import { type Circulation, referToCommonDate } from './refer-to-common-date.ts';
import { referenceValue } from './reference-value.ts';

const { circulation } = DRIFT_SET;

function nearly(found: number[], expected: number[], digits = 12): void {
  expect(found).toHaveLength(expected.length);
  found.forEach((value, i) => expect(value).toBeCloseTo(expected[i]!, digits));
}

describe('referToCommonDate: S3, two loops with drift (synthetic, mpmath at 50 digits)', () => {
  const found = referToCommonDate(circulation);

  it('finds both drift lines and tells which is significant', () => {
    found.fits.forEach((fit, i) => {
      const expected = DRIFT_SET.fits[i]!;
      expect(fit.intercept).toBeCloseTo(expected.intercept_at_day0, 13);
      expect(fit.slope).toBeCloseTo(expected.slope_per_day, 15);
      expect(fit.slopeUncertainty).toBeCloseTo(expected.u_slope, 15);
      expect(fit.slope / fit.slopeUncertainty).toBeCloseTo(expected.slope_over_u, 10);
      expect(fit.chiSquared).toBeCloseTo(expected.chi2_of_fit, 11);
      expect(fit.degreesOfFreedom).toBe(expected.dof);
    });
    expect(found.fits.map((fit) => fit.significant)).toEqual([true, false]);
  });

  it('refers every result to the pilot with the covariance of the shared fit', () => {
    expect(found.participants).toEqual(DRIFT_SET.participants);
    nearly(found.values, DRIFT_SET.values);
    found.covariance.forEach((row, i) => nearly(row, DRIFT_SET.covariance[i]!, 15));
  });

  it('leads to the reference value, chi-squared and degrees of equivalence', () => {
    const ref = referenceValue(found, 'weighted-mean');
    expect(ref.value).toBeCloseTo(DRIFT_SET.reference, 13);
    expect(ref.standardUncertainty).toBeCloseTo(DRIFT_SET.u, 13);
    expect(ref.chiSquared).toBeCloseTo(DRIFT_SET.chiSquared, 10);
    nearly(ref.coefficients, DRIFT_SET.weights);
    expect(ref.pValue).toBeCloseTo(DRIFT_SET.pValue, 12);
    const degrees = degreesOfEquivalence(found, ref);
    nearly(degrees.map((d) => d.difference), DRIFT_SET.differences, 13); // prettier-ignore
    nearly(degrees.map((d) => d.expandedUncertainty), DRIFT_SET.expanded, 13); // prettier-ignore
    nearly(degrees.map((d) => d.en), DRIFT_SET.en, 10); // prettier-ignore
  });

  it('without drift takes the mean of the visits', () => {
    nearly(referToCommonDate({ ...circulation, drift: 'none' }).values.slice(0, 7), DRIFT_SET.uncorrected);
  });
});

describe('referToCommonDate: petals and several standards', () => {
  const petal: Circulation = {
    pilot: 'P',
    pilotRepeatability: 0.3,
    pilotSystematic: 1,
    drift: 'bracketing',
    observations: [
      { participant: 'P', standard: 'S', time: 10, value: 2 },
      { participant: 'P', standard: 'S', time: 0, value: 0 },
      { participant: 'A', standard: 'S', time: 4, value: 3, standardUncertainty: 1 },
      { participant: 'B', standard: 'S', time: 15, value: 5, standardUncertainty: 2 },
      { participant: 'P', standard: 'S', time: 20, value: 8 },
    ],
  };

  it('brackets each result between the visits around it; neighbours share the visit between them', () => {
    const found = referToCommonDate(petal);
    nearly(found.values, [3 - 0.8, 5 - 5, 0]);
    expect(found.covariance[0]![0]).toBeCloseTo(1 + 0.09 * (0.36 + 0.16), 12);
    expect(found.covariance[0]![1]).toBeCloseTo(0.09 * 0.4 * 0.5, 12);
  });

  it('adds the wandering of the standard between visits, shared within one petal only', () => {
    const wandering: Circulation = {
      ...petal,
      randomWalk: 0.5,
      observations: [
        ...petal.observations,
        { participant: 'C', standard: 'S', time: 6, value: 0, standardUncertainty: 1 },
      ],
    };
    const [still, moved] = [referToCommonDate({ ...wandering, randomWalk: 0 }), referToCommonDate(wandering)];
    const added = (i: number, j: number) => moved.covariance[i]![j]! - still.covariance[i]![j]!;
    expect(added(0, 0)).toBeCloseTo((0.25 * 4 * 6) / 10, 12);
    expect(added(0, 2)).toBeCloseTo((0.25 * 4 * 4) / 10, 12);
    expect(added(0, 1)).toBe(0);
    const later = (circulation: Circulation) => ({
      ...circulation,
      observations: circulation.observations.map((each) => ({ ...each, time: each.time + 1000 })),
    });
    referToCommonDate(later(wandering)).covariance.forEach((row, i) => nearly(row, moved.covariance[i]!, 11));
    const onVisit = petal.observations.map((o) => (o.participant === 'A' ? { ...o, time: 10 } : o));
    const there = referToCommonDate({ ...petal, observations: onVisit, randomWalk: 0.5 });
    expect(there.covariance[0]![0]).toBeCloseTo(1 + 0.09, 12);
  });

  it('merges a participant with two standards by generalised least squares, its common part counted once', () => {
    const both: Circulation = {
      pilot: 'P',
      pilotRepeatability: 0.1,
      pilotSystematic: 1,
      drift: 'none',
      observations: ['S', 'T'].flatMap((standard, i) => [
        { participant: 'P', standard, time: 0, value: 10 * i },
        {
          participant: 'A',
          standard,
          time: 1,
          value: 10 * i + 1 + i,
          standardUncertainty: 1,
          commonUncertainty: 0.8,
        },
      ]),
    };
    const found = referToCommonDate(both);
    nearly(found.values, [1.5, 0]);
    expect(found.covariance[0]![0]).toBeCloseTo(0.64 + (0.36 + 0.01) / 2, 12);
    expect(found.fits).toEqual([]);
  });

  it('takes two visits as a line without a test of it', () => {
    const two = { ...petal, drift: 'line' as const, observations: petal.observations.slice(0, 3) };
    expect(referToCommonDate(two).fits[0]).toMatchObject({ degreesOfFreedom: 0, chiSquared: 0, pValue: 1 });
  });

  const observation = petal.observations[2]!;
  const [first] = petal.observations;
  it.each<[string, Partial<Circulation>, string, string]>([
    [
      'a standard the pilot never saw',
      { observations: [{ ...observation, standard: 'X' }] },
      'no-visit',
      'observations[0].standard',
    ],
    [
      'a line through one day',
      { drift: 'line', observations: [first!, observation] },
      'one-date',
      'observations[1].time',
    ],
    [
      'a result after the last visit',
      { observations: [...petal.observations, { ...observation, participant: 'C', time: 30 }] },
      'not-bracketed',
      'observations[5].time',
    ],
    [
      'a result without uncertainty',
      { observations: [first!, { ...observation, standardUncertainty: undefined }] },
      'missing-uncertainties',
      'observations[1].standardUncertainty',
    ],
    [
      'an uncertainty of 0',
      { observations: [first!, { ...observation, standardUncertainty: 0 }] },
      'out-of-range',
      'observations[1].standardUncertainty',
    ],
    [
      'two results without their common part',
      { observations: [...petal.observations, observation] },
      'missing-common-uncertainty',
      'observations[2].commonUncertainty',
    ],
    [
      'a common part above the whole',
      { observations: [...petal.observations, observation].map((o) => ({ ...o, commonUncertainty: 3 })) },
      'out-of-range',
      'observations[2].commonUncertainty',
    ],
    [
      'a time that is no number',
      { observations: [{ ...first!, time: NaN }] },
      'not-finite',
      'observations[0].time',
    ],
    [
      'a value that is no number',
      { observations: [{ ...first!, value: NaN }] },
      'not-finite',
      'observations[0].value',
    ],
    ['a repeatability of 0', { pilotRepeatability: 0 }, 'out-of-range', 'pilotRepeatability'],
    ['a systematic part of 0', { pilotSystematic: 0 }, 'out-of-range', 'pilotSystematic'],
    ['a negative transport part', { transport: -1 }, 'out-of-range', 'transport'],
    ['a negative random walk', { randomWalk: -1 }, 'out-of-range', 'randomWalk'],
  ])('refuses %s', (_, wrong, code, field) => {
    expect(() => referToCommonDate({ ...petal, ...wrong })).toThrow(expect.objectContaining({ code, field }));
  });
});

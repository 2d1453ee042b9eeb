import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { randomSource } from '../uncertainty/random.ts';
import { conformanceProbability } from './conformance-probability.ts';
import { globalRisks } from './global-risks.ts';
import { guardBandedAcceptance } from './guard-bands.ts';

describe('conformanceProbability', () => {
  it.each([
    // J106-7. JCGM 106:2012, 7.3.3 examples 1 and 2, and 7.4, read in the document; to two digits.
    ['reference voltage', { value: -5.47, standardUncertainty: 0.05, upper: -5.4 }, 0.92],
    ['container', { value: 509.7, standardUncertainty: 8.6, lower: 490 }, 0.99],
    ['oil', { value: 13.6, standardUncertainty: 1.8, lower: 12.5, upper: 16.3 }, 0.66],
  ])('J106-7: %s', (_name, input, expected) => {
    expect(Math.abs(conformanceProbability(input) - expected)).toBeLessThan(0.005);
  });

  it.each([
    // J106-T1. JCGM 106:2012, 7.3.3, Table 1, read in the document; the deviates to two decimals.
    [0.84, 0.8],
    [1.28, 0.9],
    [1.64, 0.95],
    [2.33, 0.99],
    [3.09, 0.999],
  ])('J106-T1: %s deviations below an upper limit', (z, expected) => {
    const probability = conformanceProbability({ value: 0, standardUncertainty: 1, upper: z });
    // The tolerance is what half a digit of the deviate amounts to.
    expect(Math.abs(probability - expected)).toBeLessThan(0.006 * 0.3);
  });

  it.each([
    // J106-8.3.2. JCGM 106:2012, 8.3.2.3, read in the document: 1 kg of E1, U a third of the MPE; recomputed.
    [1 / 3, 0.97725],
    [0.25, 0.99865],
    [0.4, 0.88493],
    [0.5, 0.5],
    [0.55, 0.27425],
  ])('J106-8.3.2: a deviation of %s mg', (value, expected) => {
    const probability = conformanceProbability({
      value,
      standardUncertainty: 0.5 / 6,
      lower: -0.5,
      upper: 0.5,
    });
    expect(probability).toBeCloseTo(expected, 5);
  });

  it('J106-8.3.2: at the guarded limit at most 2.3 % are accepted wrongly', () => {
    const { upper = NaN } = guardBandedAcceptance({ upper: 1, expandedUncertainty: 0.2, multiplier: 1 });
    const probability = conformanceProbability({ value: upper, standardUncertainty: 0.1, upper: 1 });
    expect(Math.abs(1 - probability - 0.02275)).toBeLessThan(0.0003);
  });

  it('keeps the digits of a tail far away on either side', () => {
    const tail = { standardUncertainty: 1, lower: 10, upper: 11 };
    // 7.6198530241605e-24: 1 - Phi(10) from tables of the normal integral.
    expect(conformanceProbability({ ...tail, value: 0 }) / 7.6198530241605e-24).toBeCloseTo(1, 3);
    expect(conformanceProbability({ value: 21, standardUncertainty: 1, lower: 10, upper: 11 })).toBeCloseTo(
      conformanceProbability({ ...tail, value: 0 }),
      30,
    );
  });

  it('is 0 or 1 without uncertainty, limits included', () => {
    expect(conformanceProbability({ value: 1, standardUncertainty: 0, upper: 1 })).toBe(1);
    expect(conformanceProbability({ value: 1, standardUncertainty: 0, lower: 1 })).toBe(1);
    expect(conformanceProbability({ value: 1.1, standardUncertainty: 0, upper: 1 })).toBe(0);
    expect(conformanceProbability({ value: 0.9, standardUncertainty: 0, lower: 1 })).toBe(0);
  });

  it('stays between 0 and 1 and does not change with the unit or the origin', () => {
    const real = fc.double({ min: -50, max: 50, noNaN: true });
    const positive = fc.double({ min: 0.01, max: 50, noNaN: true });
    fc.assert(
      fc.property(real, positive, real, positive, positive, (value, u, lower, width, unit) => {
        const upper = lower + width;
        const probability = conformanceProbability({ value, standardUncertainty: u, lower, upper });
        expect(probability).toBeGreaterThanOrEqual(0);
        expect(probability).toBeLessThanOrEqual(1);
        const scaled = conformanceProbability({
          value: (value + 1) * unit,
          standardUncertainty: u * unit,
          lower: (lower + 1) * unit,
          upper: (upper + 1) * unit,
        });
        expect(scaled).toBeCloseTo(probability, 9);
      }),
    );
  });

  it('refuses no limit, limits that cross, and numbers that are none', () => {
    const base = { value: 0, standardUncertainty: 1 };
    expect(() => conformanceProbability(base)).toThrow(expect.objectContaining({ code: 'missing-limit' }));
    expect(() => conformanceProbability({ ...base, lower: 2, upper: 1 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'upper' }),
    );
    expect(() => conformanceProbability({ ...base, lower: NaN })).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'lower' }),
    );
    expect(() => conformanceProbability({ ...base, standardUncertainty: -1, upper: 1 })).toThrow(
      expect.objectContaining({ field: 'standardUncertainty' }),
    );
  });
});

describe('guardBandedAcceptance', () => {
  it('moves each limit given inwards, or outwards with a negative multiplier', () => {
    const both = { lower: -0.5, upper: 0.5, expandedUncertainty: 0.125 };
    expect(guardBandedAcceptance({ ...both, multiplier: 1 })).toEqual({ lower: -0.375, upper: 0.375 });
    expect(guardBandedAcceptance({ ...both, multiplier: -1 })).toEqual({ lower: -0.625, upper: 0.625 });
    expect(guardBandedAcceptance({ ...both, multiplier: 0 })).toEqual({ lower: -0.5, upper: 0.5 });
    expect(guardBandedAcceptance({ lower: 1, expandedUncertainty: 0.5, multiplier: 2 })).toEqual({
      lower: 2,
    });
    expect(guardBandedAcceptance({ upper: 1, expandedUncertainty: 0.5, multiplier: 2 })).toEqual({
      upper: 0,
    });
  });

  it('refuses guard bands that leave nothing', () => {
    const wide = { lower: -0.5, upper: 0.5, multiplier: 1 };
    expect(guardBandedAcceptance({ ...wide, expandedUncertainty: 0.5 })).toEqual({ lower: 0, upper: 0 });
    expect(() => guardBandedAcceptance({ ...wide, expandedUncertainty: 0.51 })).toThrow(
      expect.objectContaining({ code: 'empty-acceptance', field: 'expandedUncertainty' }),
    );
    expect(() => guardBandedAcceptance({ expandedUncertainty: 1, multiplier: 1 })).toThrow(
      expect.objectContaining({ code: 'missing-limit' }),
    );
    expect(() => guardBandedAcceptance({ ...wide, expandedUncertainty: 0.1, multiplier: NaN })).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'multiplier' }),
    );
  });
});

describe('globalRisks', () => {
  const resistors = {
    mean: 1500,
    standardDeviation: 0.12,
    standardUncertainty: 0.04,
    lower: 1499.8,
    upper: 1500.2,
    acceptanceLower: 1499.82,
    acceptanceUpper: 1500.18,
  };

  it('J106-9.5.3: precision resistors', () => {
    // JCGM 106:2012, 9.5.3, read in the document: p 0.9, consumer 0.01, producer 0.07; recomputed to 5e-7.
    const risks = globalRisks(resistors);
    expect(Math.abs(risks.conforming - 0.904419)).toBeLessThan(1e-6);
    expect(Math.abs(risks.consumer - 0.0098783)).toBeLessThan(1e-7);
    expect(Math.abs(risks.producer - 0.0690265)).toBeLessThan(1e-7);
  });

  it('agrees with draws of items and measurements', () => {
    const random = randomSource(11);
    const trials = 200_000;
    let producer = 0;
    let consumer = 0;
    for (let i = 0; i < trials; i += 1) {
      const item = 1500 + 0.12 * random.normal();
      const reading = item + 0.04 * random.normal();
      const conforms = Math.abs(item - 1500) <= 0.2;
      const accepted = Math.abs(reading - 1500) <= 0.18;
      if (conforms && !accepted) producer += 1;
      if (!conforms && accepted) consumer += 1;
    }
    const risks = globalRisks(resistors);
    // Four standard deviations of a share of 200 000 draws.
    expect(Math.abs(producer / trials - risks.producer)).toBeLessThan(4 * Math.sqrt(risks.producer / trials));
    expect(Math.abs(consumer / trials - risks.consumer)).toBeLessThan(4 * Math.sqrt(risks.consumer / trials));
  });

  it('turns into the shares of items as the measurement becomes exact', () => {
    const exact = globalRisks({
      ...resistors,
      standardUncertainty: 1e-7,
      acceptanceLower: 1499.8,
      acceptanceUpper: 1500.2,
    });
    expect(exact.producer).toBeLessThan(1e-5);
    expect(exact.consumer).toBeLessThan(1e-5);
  });

  it('with one-sided limits at the mean gives the textbook quarter angle', () => {
    // Items and readings correlate with r = 1/sqrt 2, for which the orthant probability is 3/8.
    const risks = globalRisks({
      mean: 0,
      standardDeviation: 1,
      standardUncertainty: 1,
      upper: 0,
      acceptanceUpper: 0,
    });
    expect(risks.producer).toBeCloseTo(0.125, 9);
    expect(risks.consumer).toBeCloseTo(0.125, 9);
    expect(risks.conforming).toBe(0.5);
  });

  it('mirrors with the axis: lower limits give the same risks as upper ones', () => {
    const upper = globalRisks({
      mean: 0.3,
      standardDeviation: 1,
      standardUncertainty: 0.4,
      upper: 1,
      acceptanceUpper: 0.8,
    });
    const lower = globalRisks({
      mean: -0.3,
      standardDeviation: 1,
      standardUncertainty: 0.4,
      lower: -1,
      acceptanceLower: -0.8,
    });
    expect(lower.producer).toBeCloseTo(upper.producer, 12);
    expect(lower.consumer).toBeCloseTo(upper.consumer, 12);
  });

  it('refuses a missing limit and a spread that is none', () => {
    expect(() => globalRisks({ ...resistors, lower: undefined, upper: undefined })).toThrow(
      expect.objectContaining({ code: 'missing-limit', field: 'lower' }),
    );
    expect(() =>
      globalRisks({ ...resistors, acceptanceLower: undefined, acceptanceUpper: undefined }),
    ).toThrow(expect.objectContaining({ code: 'missing-limit', field: 'acceptanceLower' }));
    expect(() => globalRisks({ ...resistors, standardDeviation: 0 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'standardDeviation' }),
    );
    expect(() => globalRisks({ ...resistors, standardUncertainty: 0 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'standardUncertainty' }),
    );
  });
});

import { describe, expect, it } from 'vitest';
import { enScore, scoreSignal, zetaScore, zPrimeScore, zScore, zScoreAllowed } from './scores.ts';

// Formulas of ISO/IEC 17043 and ISO 13528 clause 9; figures worked apart with mpmath.
const CASES = [
  [100.0008, 100.0002, 0.0006, 0.0004, 0.0005, 0.8320502943378437, 1.2, 1.1141720290623112],
  [999.9985, 1000.0012, 0.002, 0.001, 0.0012, -1.2074767078498865, -2.25, -2.076923076923077],
  [5.00021, 5.0002, 4e-5, 2e-5, 3e-5, 0.22360679774997896, 0.3333333333333333, 0.31622776601683794],
] as const;

describe('scores', () => {
  it.each(CASES)('of %d against %d', (value, reference, expanded, ofReference, sigma, en, z, zPrime) => {
    const u = ofReference / 2;
    const digits = 9;
    expect(
      enScore({ value, reference, expandedUncertainty: expanded, referenceExpandedUncertainty: ofReference }),
    ).toBeCloseTo(en, digits);
    expect(
      zetaScore({ value, reference, standardUncertainty: expanded / 2, referenceStandardUncertainty: u }),
    ).toBeCloseTo(2 * en, digits);
    expect(zScore({ value, reference, standardDeviation: sigma })).toBeCloseTo(z, digits);
    expect(
      zPrimeScore({ value, reference, standardDeviation: sigma, referenceStandardUncertainty: u }),
    ).toBeCloseTo(zPrime, digits);
    expect(zScoreAllowed({ referenceStandardUncertainty: u, standardDeviation: sigma })).toBe(false);
  });

  it('allows a z score below 0.3 of the standard deviation only', () => {
    expect(zScoreAllowed({ referenceStandardUncertainty: 0.29, standardDeviation: 1 })).toBe(true);
    expect(zScoreAllowed({ referenceStandardUncertainty: 0.3, standardDeviation: 1 })).toBe(false);
  });

  it.each([
    [2, 'none'],
    [-2.01, 'warning'],
    [2.99, 'warning'],
    [3, 'action'],
    [-3, 'action'],
  ])('signals %d as %s', (score, signal) => {
    expect(scoreSignal(score)).toBe(signal);
  });

  it('refuses what has no scale', () => {
    const en = { value: 1, reference: 0, expandedUncertainty: 0, referenceExpandedUncertainty: 0 };
    expect(() => enScore(en)).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'expandedUncertainty' }),
    );
    expect(() => enScore({ ...en, value: NaN })).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'value' }),
    );
    expect(() => zScore({ value: 1, reference: NaN, standardDeviation: 1 })).toThrow(
      expect.objectContaining({ field: 'reference' }),
    );
    expect(() => zScore({ value: 1, reference: 0, standardDeviation: -1 })).toThrow(
      expect.objectContaining({ field: 'standardDeviation' }),
    );
    expect(() => zScoreAllowed({ referenceStandardUncertainty: 0, standardDeviation: 0 })).toThrow(
      expect.objectContaining({ code: 'out-of-range' }),
    );
    expect(() => scoreSignal(NaN)).toThrow(expect.objectContaining({ field: 'score' }));
  });
});

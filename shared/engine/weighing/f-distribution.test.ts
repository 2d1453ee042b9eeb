import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { coverageFactor } from '../uncertainty/coverage-factor.ts';
import { studentTwoSidedTail } from '../uncertainty/student-t.ts';
import { fCriticalValue, fUpperTail } from './f-distribution.ts';

const positive = (max: number) => fc.integer({ min: 0, max: max * 100 }).map((n) => 1 + n / 100);

describe('F and Student t', () => {
  it('agrees with the closed form for two degrees of freedom in the numerator', () => {
    fc.assert(
      fc.property(positive(50), positive(400), (shifted, denominator) => {
        const ratio = shifted - 1;
        const exact = (1 + (2 * ratio) / denominator) ** (-denominator / 2);
        expect(fUpperTail(ratio, 2, denominator)).toBeCloseTo(exact, 12);
      }),
    );
  });

  it('agrees with the closed forms of Student t for one and two degrees of freedom', () => {
    fc.assert(
      fc.property(positive(100), (t) => {
        expect(studentTwoSidedTail(t, 1)).toBeCloseTo(1 - (2 / Math.PI) * Math.atan(t), 12);
        expect(studentTwoSidedTail(-t, 2)).toBeCloseTo(1 - t / Math.sqrt(2 + t * t), 12);
      }),
    );
  });

  it('turns into its mirror image when the ratio is inverted', () => {
    fc.assert(
      fc.property(positive(20), positive(60), positive(60), (ratio, left, right) => {
        expect(fUpperTail(ratio, left, right) + fUpperTail(1 / ratio, right, left)).toBeCloseTo(1, 11);
      }),
    );
  });

  it('inverts itself', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 999 }), positive(60), positive(500), (mille, left, right) => {
        expect(fUpperTail(fCriticalValue(mille / 1000, left, right), left, right)).toBeCloseTo(
          mille / 1000,
          9,
        );
      }),
    );
  });

  it('gives published quantiles', () => {
    // NIST/SEMATECH e-Handbook, 2.3.5.1.1 (procedure read, quantile recomputed elsewhere).
    expect(fCriticalValue(0.01, 3, 351)).toBeCloseTo(3.837866, 6);
  });

  it('agrees with the coverage factors of Student', () => {
    for (const nu of [1, 3, 6.5, 40, 1000])
      expect(studentTwoSidedTail(coverageFactor(0.99, nu), nu)).toBeCloseTo(0.01, 12);
  });

  it('holds at the ends', () => {
    expect(fUpperTail(0, 3, 5)).toBe(1);
    expect(fUpperTail(1.7e308, 5, 3)).toBe(0);
    expect(fUpperTail(1e10, 3, 5)).toBeGreaterThan(0);
    expect(Number.isFinite(fCriticalValue(1e-100, 1, 1))).toBe(true);
    expect(fCriticalValue(0.999999, 1, 1)).toBeGreaterThan(0);
    expect(fCriticalValue(1e-9, 1, 1)).toBeCloseTo(4.05285e17, -13);
  });

  it('refuses what is no probability and no degrees of freedom', () => {
    expect(() => fCriticalValue(0, 1, 1)).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'level' }),
    );
    expect(() => fCriticalValue(1, 1, 1)).toThrow(expect.objectContaining({ code: 'out-of-range' }));
    expect(() => fCriticalValue(Number.NaN, 1, 1)).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'level' }),
    );
    expect(() => fUpperTail(-1, 1, 1)).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'ratio' }),
    );
    expect(() => fUpperTail(1, 0, 1)).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'numerator' }),
    );
    expect(() => fUpperTail(1, 1, Number.POSITIVE_INFINITY)).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'denominator' }),
    );
  });
});

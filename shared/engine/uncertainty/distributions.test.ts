import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { coverageFactor } from './coverage-factor.ts';
import { normalBetween, normalDistribution, normalQuantile, normalUpperTail } from './normal-distribution.ts';
import { studentAreas } from './student-t.ts';

describe('normal distribution', () => {
  it.each([
    // J106-T1. JCGM 106:2012, 7.3.3, Table 1, read in the document; two decimals, 0.006.
    [0.8, 0.84],
    [0.9, 1.28],
    [0.95, 1.64],
    [0.99, 2.33],
    [0.999, 3.09],
  ])('J106-T1: the deviate of %s', (probability, printed) => {
    expect(Math.abs(normalQuantile(probability) - printed)).toBeLessThan(0.006);
  });

  it.each([
    // Computed independently (scipy 1.17, norm.sf).
    [1, 0.15865525393145707],
    [2.9999, 0.001350341282954925],
    [3, 0.0013498980316300933],
    [6, 9.865876450376946e-10],
    [20, 2.7536241186061556e-89],
  ])('exceeds %s with probability %s', (z, expected) => {
    expect(normalUpperTail(z) / expected).toBeCloseTo(1, 12);
  });

  it('quantile and distribution undo each other, in the tail too', () => {
    fc.assert(
      fc.property(fc.double({ min: -37, max: 6, noNaN: true }), (z) => {
        expect(Math.abs(normalQuantile(normalDistribution(z)) - z)).toBeLessThan(1e-6);
      }),
    );
    expect(normalQuantile(1e-200)).toBeCloseTo(-30.20559417957964, 10);
    expect(Object.is(normalQuantile(0.5), 0)).toBe(true);
  });

  it('takes infinite limits and is symmetric', () => {
    expect([normalUpperTail(Infinity), normalUpperTail(-Infinity)]).toEqual([0, 1]);
    expect(normalBetween(-Infinity, Infinity)).toBe(1);
    expect(normalBetween(1, 2)).toBeCloseTo(normalBetween(-2, -1), 15);
  });

  it.each([0, 1, -0.1, NaN])('refuses the probability %s', (probability) => {
    expect(() => normalQuantile(probability)).toThrow(expect.objectContaining({ field: 'probability' }));
  });
});

describe('coverageFactor', () => {
  it.each([
    // GUM-G.2. JCGM 100:2008, Table G.2, 95.45 %, read in the document; as printed, 0.006.
    [1, 13.97],
    [2, 4.53],
    [3, 3.31],
    [4, 2.87],
    [5, 2.65],
    [6, 2.52],
    [7, 2.43],
    [8, 2.37],
    [9, 2.32],
    [10, 2.28],
    [15, 2.18],
    [20, 2.13],
    [50, 2.05],
    [100, 2.025],
  ])('GUM-G.2: 95.45 %% with %s degrees of freedom', (degreesOfFreedom, printed) => {
    expect(Math.abs(coverageFactor(0.9545, degreesOfFreedom) - printed)).toBeLessThan(0.006);
  });

  it('GUM-H1: 99 % with 16 degrees of freedom is 2.92', () => {
    // JCGM 100:2008, H.1, read in the document.
    expect(Math.abs(coverageFactor(0.99, 16) - 2.92)).toBeLessThan(0.005);
  });

  it('is 2.00 only at infinity', () => {
    expect(coverageFactor(0.954499736103642, Infinity)).toBeCloseTo(2, 12);
    expect(coverageFactor(0.954499736103642, 1000)).toBeGreaterThan(2.002);
  });

  it.each([
    // Computed independently (scipy 1.17, t.isf), real numbers of degrees of freedom.
    [0.95, 9, 2.262157162798205],
    [0.95, 16.7, 2.1127064206595905],
    [0.95, 0.9, 16.580058171327135],
    [0.1, 3.3, 0.13559091888878483],
    [0.9973, 250.5, 3.030193289661818],
    [0.999999, 0.5, 411396462502.876],
    [0.95, 1e5, 1.95998770753461],
    [0.9545, 1e6, 2.0000049439106093],
    [1 - 1e-12, 30, 11.72201888681061],
  ])('probability %s, %s degrees of freedom', (probability, degreesOfFreedom, expected) => {
    expect(coverageFactor(probability, degreesOfFreedom) / expected).toBeCloseTo(1, 11);
  });

  it.each([
    [0.5, 1, 1],
    [0.9, 1, Math.tan(0.45 * Math.PI)],
    [0.9, 2, (0.9 * Math.SQRT2) / Math.sqrt(1 - 0.81)],
    [1e-6, 2, (1e-6 * Math.SQRT2) / Math.sqrt(1 - 1e-12)],
  ])('closed form: probability %s, %s degrees of freedom', (probability, degreesOfFreedom, expected) => {
    expect(coverageFactor(probability, degreesOfFreedom) / expected).toBeCloseTo(1, 12);
  });

  it('solves what it claims, and falls with the degrees of freedom', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 0.9999, noNaN: true }),
        fc.double({ min: 0.5, max: 1e5, noNaN: true }),
        (probability, degreesOfFreedom) => {
          const k = coverageFactor(probability, degreesOfFreedom);
          expect(studentAreas(k, degreesOfFreedom).inside).toBeCloseTo(probability, 11);
          expect(coverageFactor(probability, degreesOfFreedom * 1.1)).toBeLessThan(k);
          expect(coverageFactor(probability, Infinity)).toBeLessThan(k);
        },
      ),
    );
  });

  it('passes from the solved to the expanded form without a step', () => {
    expect(coverageFactor(0.95, 1e5) - coverageFactor(0.95, 1e5 * (1 + 1e-9))).toBeLessThan(1e-11);
  });

  it('refuses a probability or degrees of freedom outside the domain', () => {
    for (const probability of [0, 1, NaN]) {
      expect(() => coverageFactor(probability, 9)).toThrow(expect.objectContaining({ field: 'probability' }));
    }
    for (const degrees of [0, -1, NaN, -Infinity]) {
      expect(() => coverageFactor(0.95, degrees)).toThrow(
        expect.objectContaining({ field: 'degreesOfFreedom' }),
      );
    }
    expect(() => coverageFactor(0.999, 0.01)).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'degreesOfFreedom' }),
    );
  });
});

describe('studentAreas', () => {
  it('the areas add to one and the density is their slope', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.05, max: 20, noNaN: true }),
        fc.double({ min: 0.5, max: 500, noNaN: true }),
        (t, degreesOfFreedom) => {
          const { inside, outside, density } = studentAreas(t, degreesOfFreedom);
          expect(inside + outside).toBeCloseTo(1, 13);
          const step = 1e-5 * t;
          const slope =
            (studentAreas(t + step, degreesOfFreedom).inside -
              studentAreas(t - step, degreesOfFreedom).inside) /
            (2 * step);
          expect(Math.abs(slope - density)).toBeLessThan(1e-7 + 1e-6 * density);
        },
      ),
    );
  });
});

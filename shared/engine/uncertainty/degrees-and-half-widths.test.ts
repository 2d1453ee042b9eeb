import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { coverageFactor } from './coverage-factor.ts';
import { effectiveDegreesOfFreedom, truncateDegreesOfFreedom } from './effective-degrees-of-freedom.ts';
import { standardUncertainty } from './standard-uncertainty.ts';

describe('standardUncertainty', () => {
  it('GUM-4.3.3: a certificate at three standard deviations', () => {
    // JCGM 100:2008, 4.3.3, read in the document: 240 ug at k = 3 gives 80 ug, 6.4e-9 g2.
    const u = standardUncertainty({ halfWidth: 240, distribution: 'normal', coverageFactor: 3 });
    expect(u).toBe(80);
    expect((u * 1e-6) ** 2).toBeCloseTo(6.4e-9, 20);
  });

  it('R111-C6: resolution of a difference of two readings, 0.01 mg', () => {
    // OIML R 111-1:2004, C.6.4.3, from memory: (d/2)/sqrt 3 times sqrt 2; arithmetic to 1e-8.
    const one = standardUncertainty({ halfWidth: 0.005, distribution: 'rectangular' });
    expect(Math.abs(one * Math.SQRT2 - 0.00408248)).toBeLessThan(1e-8);
  });

  it('divides by the root of 3, 6 and 2', () => {
    const of = (distribution: 'rectangular' | 'triangular' | 'u-shaped') =>
      standardUncertainty({ halfWidth: 1, distribution });
    expect(of('rectangular')).toBeCloseTo(0.57735026919, 11);
    expect(of('triangular')).toBeCloseTo(0.40824829046, 11);
    expect(of('u-shaped')).toBeCloseTo(0.70710678119, 11);
  });

  it('wants a coverage factor where there is one, and only there', () => {
    expect(() => standardUncertainty({ halfWidth: 1, distribution: 'normal' })).toThrow(
      expect.objectContaining({ code: 'missing-coverage-factor', field: 'coverageFactor' }),
    );
    expect(() =>
      standardUncertainty({ halfWidth: 1, distribution: 'triangular', coverageFactor: 2 }),
    ).toThrow(expect.objectContaining({ code: 'needless-coverage-factor' }));
    expect(() => standardUncertainty({ halfWidth: 1, distribution: 'normal', coverageFactor: 0 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'coverageFactor' }),
    );
    expect(() => standardUncertainty({ halfWidth: -1, distribution: 'triangular' })).toThrow(
      expect.objectContaining({ field: 'halfWidth' }),
    );
    expect(() => standardUncertainty({ halfWidth: 1, distribution: 'flat' as 'normal' })).toThrow(
      expect.objectContaining({ code: 'unknown-choice' }),
    );
  });
});

describe('effectiveDegreesOfFreedom', () => {
  const of = (pairs: [number, number, string?][]) =>
    effectiveDegreesOfFreedom(
      pairs.map(([contribution, degreesOfFreedom, estimate]) => ({
        contribution,
        degreesOfFreedom,
        estimate,
      })),
    );

  it('GUM-G.4.1: 19.0, and the factor 2.09 with it', () => {
    // JCGM 100:2008, G.4.1, read in the document: 1.03 %, 19.0; 0.05.
    const degrees = of([
      [0.25, 9],
      [0.57, 4],
      [0.82, 14],
    ]);
    expect(Math.abs(degrees - 19)).toBeLessThan(0.05);
    expect(Math.abs(coverageFactor(0.95, degrees) - 2.09)).toBeLessThan(0.005);
  });

  it('GUM-H1: 16.7 with unrounded uncertainties, 16 after truncation', () => {
    // JCGM 100:2008, H.1, Table H.1, read in the document; 0.1 with the printed components.
    const degrees = of([
      [25, 18],
      [9.7, 25.6],
      [2.9, 50],
      [16.6, 2],
    ]);
    expect(Math.abs(degrees - 16.7)).toBeLessThan(0.1);
    expect(Math.trunc(degrees)).toBe(16);
  });

  it('counts one estimate once, however often it is used', () => {
    expect(
      of([
        [3, 5, 'pooled'],
        [4, 5, 'pooled'],
      ]),
    ).toBeCloseTo(5, 12);
    expect(
      of([
        [3, 5, 'pooled'],
        [4, 5, 'other'],
      ]),
    ).toBeGreaterThan(5);
    expect(
      of([
        [3, 5],
        [4, 5],
      ]),
    ).toBeCloseTo(
      of([
        [3, 5, 'one'],
        [4, 5, 'two'],
      ]),
      12,
    );
  });

  it('adds the squares that rest on one estimate before it spreads them', () => {
    // (25 + 25)^2 / (25^2/5 + 25^2/10) by hand.
    expect(
      of([
        [3, 5, 'pooled'],
        [4, 5, 'pooled'],
        [5, 10],
      ]),
    ).toBeCloseTo(40 / 3, 12);
  });

  it('is infinite where nothing is estimated from few data', () => {
    expect(
      of([
        [1, Infinity],
        [2, Infinity],
      ]),
    ).toBe(Infinity);
    expect(of([[0, 5]])).toBe(Infinity);
    expect(
      of([
        [1, 5],
        [1, Infinity],
      ]),
    ).toBeCloseTo(20, 12);
  });

  const lines = fc.array(
    fc.tuple(fc.double({ min: 0.01, max: 100, noNaN: true }), fc.double({ min: 1, max: 1000, noNaN: true })),
    { minLength: 1, maxLength: 8 },
  );

  it('lies between the smallest and the sum, and does not change with the unit', () => {
    // JCGM 100:2008, G.4.1, note: the effective number is at most the sum.
    fc.assert(
      fc.property(lines, fc.constantFrom(1e-200, 1e-3, 1e6, 1e200), (pairs, unit) => {
        const degrees = of(pairs);
        expect(degrees).toBeGreaterThanOrEqual(Math.min(...pairs.map(([, one]) => one)) * (1 - 1e-12));
        expect(degrees).toBeLessThanOrEqual(pairs.reduce((sum, [, one]) => sum + one, 0) * (1 + 1e-12));
        expect(of(pairs.map(([c, one]) => [c * unit, one])) / degrees).toBeCloseTo(1, 9);
      }),
    );
  });

  it('refuses one estimate with two numbers, and numbers that are none', () => {
    expect(() =>
      of([
        [1, 5, 'pooled'],
        [1, 6, 'pooled'],
      ]),
    ).toThrow(
      expect.objectContaining({
        code: 'conflicting-degrees-of-freedom',
        field: 'components[1].degreesOfFreedom',
      }),
    );
    expect(() => of([])).toThrow(expect.objectContaining({ code: 'too-few-values' }));
    expect(() => of([[NaN, 5]])).toThrow(expect.objectContaining({ field: 'components[0].contribution' }));
    expect(() => of([[1, 0]])).toThrow(expect.objectContaining({ code: 'out-of-range' }));
  });
});

describe('truncateDegreesOfFreedom', () => {
  it.each([
    [18.999, 18],
    [16.7, 16],
    [19, 19],
    [19 * (1 - 2e-16), 19],
    [Infinity, Infinity],
    [0.9, 0],
  ])('%d is stated as %d', (real, stated) => {
    expect(truncateDegreesOfFreedom(real)).toBe(stated);
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { combine, type BudgetComponent } from './combine.ts';
import { coverageFactor } from './coverage-factor.ts';
import { effectiveDegreesOfFreedom } from './effective-degrees-of-freedom.ts';
import { standardUncertainty } from './standard-uncertainty.ts';

const line = (name: string, u: number, sensitivity = 1, degreesOfFreedom?: number): BudgetComponent => ({
  name,
  standardUncertainty: u,
  sensitivity,
  degreesOfFreedom,
});

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
    expect(Math.abs(coverageFactor(0.95, Math.trunc(degrees + 0.01)) - 2.09)).toBeLessThan(0.005);
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
    expect(() => of([])).toThrow(expect.objectContaining({ code: 'empty' }));
    expect(() => of([[NaN, 5]])).toThrow(expect.objectContaining({ field: 'components[0].contribution' }));
    expect(() => of([[1, 0]])).toThrow(expect.objectContaining({ code: 'out-of-range' }));
  });
});

describe('combine', () => {
  it('EA-S2: weight of nominal value 10 kg', () => {
    // EA-4/02, supplement, example S2, from memory: components, 29.3 mg and U = 59 mg; 0.1 mg.
    const rectangular = (halfWidth: number) =>
      standardUncertainty({ halfWidth, distribution: 'rectangular' });
    const reference = standardUncertainty({ halfWidth: 45, distribution: 'normal', coverageFactor: 2 });
    const components = [
      line('reference', reference),
      line('drift', rectangular(15)),
      line('weighing', 25 / Math.sqrt(3)),
      line('eccentricity and magnetism', rectangular(10)),
      line('buoyancy', rectangular(10)),
    ];
    const printed = [22.5, 8.66, 14.43, 5.77, 5.77];
    components.forEach((one, i) => {
      expect(Math.abs(one.standardUncertainty - (printed[i] ?? NaN))).toBeLessThan(0.005);
    });
    const { standardUncertainty: u, degreesOfFreedom } = combine(components);
    expect(Math.abs(u - 29.3)).toBeLessThan(0.1);
    expect(Math.round(2 * u)).toBe(59);
    expect(degreesOfFreedom).toBe(Infinity);
  });

  it('R111-C6: the balance terms and the budget add in squares', () => {
    // OIML R 111-1:2004, C.6.4.6 and C.6.5, from memory; arithmetic.
    const balance = combine([line('sensitivity', 3), line('resolution', 4), line('eccentricity', 12)]);
    expect(balance.standardUncertainty).toBe(13);
    const whole = combine([line('weighing', 84), line('balance', balance.standardUncertainty)]);
    expect(whole.standardUncertainty).toBe(85);
  });

  it('GUM-H1: 32 nm, and 93 nm at 99 %', () => {
    // JCGM 100:2008, H.1, read in the document: 1002 nm2 printed, 31.66 nm from the printed components.
    const budget = combine([
      line('standard', 25, 1, 18),
      line('difference', 9.7, 1, 25.6),
      line('expansion', 2.9, 1, 50),
      line('temperature', 16.6, 1, 2),
    ]);
    expect(Math.abs(budget.standardUncertainty - 32)).toBeLessThan(0.5);
    expect(Math.abs(budget.standardUncertainty ** 2 - 1002)).toBeLessThan(1.5);
    const k = coverageFactor(0.99, Math.trunc(budget.degreesOfFreedom ?? NaN));
    expect(Math.abs(k * budget.standardUncertainty - 93)).toBeLessThan(1);
  });

  it('GUM-H1: the second-order terms bring it to 34 nm', () => {
    // JCGM 100:2008, H.1.7, read in the document: 11.7 nm and 1.7 nm beside 32 nm.
    const { standardUncertainty: u } = combine([line('first order', 31.66), line('a', 11.7), line('b', 1.7)]);
    expect(Math.abs(u - 33.8)).toBeLessThan(0.05);
  });

  it('GUM-5.2.2: ten items from one standard add linearly', () => {
    // JCGM 100:2008, 5.2.2, note 1, read in the document: 1.0 ohm, not 0.32 ohm.
    const ten = Array.from({ length: 10 }, (_, i) => line(`item ${i + 1}`, 0.1));
    const ones = ten.map(() => ten.map(() => 1));
    expect(combine(ten, ones).standardUncertainty).toBeCloseTo(1, 12);
    expect(Math.abs(combine(ten).standardUncertainty - 0.32)).toBeLessThan(0.005);
  });

  it.each([
    // GUM-F.1.2.3. JCGM 100:2008, F.1.2.3, example 2, read in the document; three digits.
    [1e-4, 0.5],
    [1e-5, 0.99],
    [1e-6, 1],
  ])('GUM-F.1.2.3: two items from one standard, u(alpha) = %s', (uAlpha, expected) => {
    const { standardUncertainty: ofSum } = combine([
      line('standard', 1e-4, 2),
      line('a', uAlpha),
      line('b', uAlpha),
    ]);
    const variance = 1e-8 + uAlpha ** 2;
    expect(Math.abs((ofSum ** 2 - 2 * variance) / (2 * variance) - expected)).toBeLessThan(0.0005);
  });

  it('has no degrees of freedom with a correlation matrix', () => {
    const two = [line('a', 3, 1, 5), line('b', 4, 1, 5)];
    expect(
      combine(two, [
        [1, 0],
        [0, 1],
      ]),
    ).toEqual({ standardUncertainty: 5, degreesOfFreedom: null });
    expect(combine(two).degreesOfFreedom).toBeGreaterThan(5);
  });

  it('cancels to nothing where all is shared with opposite sign', () => {
    const two = [line('a', 3, 1), line('b', 3, -1)];
    expect(
      combine(two, [
        [1, 1],
        [1, 1],
      ]).standardUncertainty,
    ).toBe(0);
    expect(combine([line('a', 0)], [[1]]).standardUncertainty).toBe(0);
  });

  it('a correlation of zero changes nothing, and the order does not matter', () => {
    const budget = fc.array(
      fc.tuple(fc.double({ min: 0, max: 100, noNaN: true }), fc.double({ min: -10, max: 10, noNaN: true })),
      { minLength: 1, maxLength: 6 },
    );
    fc.assert(
      fc.property(budget, (pairs) => {
        const components = pairs.map(([u, c], i) => line(`${i}`, u, c));
        const identity = pairs.map((_, i) => pairs.map((_unused, j) => (i === j ? 1 : 0)));
        const u = combine(components).standardUncertainty;
        expect(combine(components, identity).standardUncertainty).toBeCloseTo(u, 9);
        expect(combine(components.toReversed()).standardUncertainty).toBeCloseTo(u, 9);
        const doubled = components.map((one) => ({
          ...one,
          standardUncertainty: 2 * one.standardUncertainty,
        }));
        expect(combine(doubled).standardUncertainty).toBeCloseTo(2 * u, 9);
      }),
    );
  });

  it('names the pair where the whole matrix is impossible', () => {
    const three = [line('pressure', 1), line('temperature', 1), line('humidity', 1)];
    const matrix = [
      [1, 0.9, 0.9],
      [0.9, 1, -0.9],
      [0.9, -0.9, 1],
    ];
    expect(() => combine(three, matrix)).toThrow(
      expect.objectContaining({
        code: 'not-positive-semidefinite',
        field: expect.stringMatching(/^correlation\[/),
      }),
    );
    // Each pair alone would do.
    expect(
      combine(three.slice(0, 2), [
        [1, 0.9],
        [0.9, 1],
      ]).standardUncertainty,
    ).toBeCloseTo(Math.sqrt(3.8), 12);
  });

  it('names the two components of the offending coefficient', () => {
    const four = ['a', 'b', 'c', 'd'].map((name) => line(name, 1));
    const matrix = [
      [1, 0, 0, 0],
      [0, 1, 0.99, 0.99],
      [0, 0.99, 1, -0.5],
      [0, 0.99, -0.5, 1],
    ];
    expect(() => combine(four, matrix)).toThrow(/correlation of "[bcd]" and "[bcd]"/);
  });

  it('refuses a matrix of another size, one that is not symmetric, and coefficients beyond 1', () => {
    const two = [line('a', 1), line('b', 1)];
    expect(() => combine(two, [[1]])).toThrow(expect.objectContaining({ code: 'wrong-size' }));
    expect(() => combine(two, [[1, 0], [0]])).toThrow(expect.objectContaining({ code: 'wrong-size' }));
    expect(() =>
      combine(two, [
        [1, 0.5],
        [0.4, 1],
      ]),
    ).toThrow(
      expect.objectContaining({ code: 'not-symmetric', message: expect.stringContaining('"a" and "b"') }),
    );
    expect(() =>
      combine(two, [
        [1, 1.1],
        [1.1, 1],
      ]),
    ).toThrow(expect.objectContaining({ code: 'out-of-range', field: 'correlation[0][1]' }));
    expect(() =>
      combine(two, [
        [0.9, 0],
        [0, 1],
      ]),
    ).toThrow(expect.objectContaining({ code: 'out-of-range', field: 'correlation[0][0]' }));
  });

  it('refuses an empty budget and lines that are none', () => {
    expect(() => combine([])).toThrow(expect.objectContaining({ code: 'empty' }));
    expect(() => combine([line('a', -1)])).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'components[0].standardUncertainty' }),
    );
    expect(() => combine([line('a', 1, Infinity)])).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'components[0].sensitivity' }),
    );
  });
});

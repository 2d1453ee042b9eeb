import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { combine, type BudgetComponent } from './combine.ts';
import { coverageFactor } from './coverage-factor.ts';
import { standardUncertainty } from './standard-uncertainty.ts';

const line = (name: string, u: number, sensitivity = 1, degreesOfFreedom?: number): BudgetComponent => ({
  name,
  standardUncertainty: u,
  sensitivity,
  degreesOfFreedom,
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
    expect(() => combine(four, matrix)).toThrow(/for "[bcd]" and "[bcd]"/);
  });

  it('refuses a matrix of another size, one that is not symmetric, and coefficients beyond 1', () => {
    const two = [line('a', 1), line('b', 1)];
    expect(() => combine(two, [[1]])).toThrow(expect.objectContaining({ code: 'size-mismatch' }));
    expect(() => combine(two, [[1, 0], [0]])).toThrow(expect.objectContaining({ code: 'size-mismatch' }));
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
    expect(() => combine(two, [[1, -1.1], [-1.1, 1]])).toThrow(expect.objectContaining({ code: 'out-of-range', field: 'correlation[0][1]' })); // prettier-ignore
    expect(() =>
      combine(two, [
        [0.9, 0],
        [0, 1],
      ]),
    ).toThrow(expect.objectContaining({ code: 'out-of-range', field: 'correlation[0][0]' }));
  });

  it('refuses an empty budget and lines that are none', () => {
    expect(() => combine([])).toThrow(expect.objectContaining({ code: 'too-few-values' }));
    expect(() => combine([line('a', -1)])).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'components[0].standardUncertainty' }),
    );
    expect(() => combine([line('a', 1, Infinity)])).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'components[0].sensitivity' }),
    );
  });
});

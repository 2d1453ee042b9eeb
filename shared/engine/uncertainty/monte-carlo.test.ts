import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { combine } from './combine.ts';
import { coverageFactor } from './coverage-factor.ts';
import { coverageInterval } from './coverage-interval.ts';
import type { Distribution } from './input-distribution.ts';
import { monteCarlo, numericalTolerance } from './monte-carlo.ts';

const rectangular = (lower: number, upper: number): Distribution => ({
  distribution: 'rectangular',
  lower,
  upper,
});
const normal = (mean: number, standardUncertainty: number): Distribution => ({
  distribution: 'normal',
  mean,
  standardUncertainty,
});
const at = (x: number[], i: number): number => x[i] ?? NaN;

describe('monteCarlo: JCGM101-9.3, mass calibration', () => {
  // JCGM 101:2008, 9.3, Tables 5 to 7, read in the document. Its own tolerance: u 0.0003 mg, ends 0.003 mg (the
  // printed ends of the shortest interval lie 1.3e-3 below the converged ones, so never to four decimals).
  const inputs = [
    normal(100_000, 0.05),
    normal(1.234, 0.02),
    rectangular(1.1, 1.3),
    rectangular(7000, 9000),
    rectangular(7950, 8050),
  ];
  const model = (x: number[]) =>
    (at(x, 0) + at(x, 1)) * (1 + (at(x, 2) - 1.2) * (1 / at(x, 3) - 1 / at(x, 4))) - 100_000;

  it('two digits settled: mean, u and the interval', () => {
    const result = monteCarlo(model, inputs, { seed: 20080101 });
    expect(result.stable).toBe(true);
    expect(Math.abs(result.mean - 1.2341)).toBeLessThan(0.0005);
    expect(Math.abs(result.standardUncertainty - 0.0754)).toBeLessThan(0.0003);
    expect(Math.abs(result.interval[0] - 1.0834)).toBeLessThan(0.003);
    expect(Math.abs(result.interval[1] - 1.3825)).toBeLessThan(0.003);
  });

  it("the shortest interval, to the tolerance of one digit, which is the document's 0.005 mg", () => {
    const { interval } = monteCarlo(model, inputs, { seed: 20080101, digits: 1, interval: 'shortest' });
    expect(Math.abs(interval[0] - 1.0834)).toBeLessThan(0.005);
    expect(Math.abs(interval[1] - 1.3825)).toBeLessThan(0.005);
  });

  it('the first order alone is not enough here, as the document says', () => {
    // GUM1: u = 0.0539 mg, [1.1285, 1.3395]; d_low = 0.0451 is larger than delta = 0.005.
    const u = Math.hypot(0.05, 0.02);
    expect(Math.abs(u - 0.0539)).toBeLessThan(0.0001);
    const { interval } = monteCarlo(model, inputs, { seed: 1, digits: 1 });
    const low = Math.abs(1.234 - 1.959964 * u - interval[0]);
    expect(Math.abs(low - 0.0451)).toBeLessThan(0.003);
    expect(low).toBeGreaterThan(0.005);
  });

  it('with the second order terms, [1.087, 1.381] with u = 0.075, the first order and Monte Carlo agree', () => {
    // The products of the air density and each density: m u(rho_a) u(rho) / rho^2, in mg.
    const product = (density: number) =>
      ((100_000 * 0.1) / Math.sqrt(3)) * (density / Math.sqrt(3) / 8000 ** 2);
    const line = (name: string, standardUncertainty: number) => ({
      name,
      standardUncertainty,
      sensitivity: 1,
    });
    const budget = [line('reference', 0.05), line('difference', 0.02), line('weight', product(1000)), line('standard', product(50))]; // prettier-ignore
    const u = combine(budget).standardUncertainty;
    expect(Math.abs(u - 0.075)).toBeLessThan(0.0001);
    const k = coverageFactor(0.95, Infinity);
    expect(Math.abs(1.234 - k * u - 1.087)).toBeLessThan(0.0005);
    expect(Math.abs(1.234 + k * u - 1.381)).toBeLessThan(0.0005);
    const { interval } = monteCarlo(model, inputs, { seed: 1, digits: 1 });
    expect(Math.abs(1.234 - k * u - interval[0])).toBeLessThan(0.005);
    expect(Math.abs(1.234 + k * u - interval[1])).toBeLessThan(0.005);
  });
});

describe('monteCarlo against closed forms', () => {
  it.each([
    ['normal', normal(5, 2), 5, 2, 1.959964],
    ['rectangular', rectangular(-1, 1), 0, 1 / Math.sqrt(3), 0.95 * Math.sqrt(3)],
    [
      'triangular',
      { distribution: 'triangular', lower: -1, upper: 1 },
      0,
      1 / Math.sqrt(6),
      (1 - Math.sqrt(0.05)) * Math.sqrt(6),
    ],
    [
      'u-shaped',
      { distribution: 'u-shaped', lower: -1, upper: 1 },
      0,
      Math.SQRT1_2,
      Math.sin(0.475 * Math.PI) * Math.SQRT2,
    ],
    [
      'student-t',
      { distribution: 'student-t', mean: 1, scale: 2, degreesOfFreedom: 9.5 },
      1,
      2 * Math.sqrt(9.5 / 7.5),
      2.244 / Math.sqrt(9.5 / 7.5),
    ],
    [
      'student-t, infinite',
      { distribution: 'student-t', mean: 1, scale: 2, degreesOfFreedom: Infinity },
      1,
      2,
      1.959964,
    ],
  ] as [string, Distribution, number, number, number][])('%s', (_name, input, mean, u, factor) => {
    const result = monteCarlo((x) => at(x, 0), [input], { seed: 7, digits: 1 });
    expect(result.stable).toBe(true);
    // 100 000 trials and more: four standard deviations of the ends are 0.034 u.
    expect(Math.abs(result.mean - mean)).toBeLessThan(0.015 * u);
    expect(Math.abs(result.standardUncertainty / u - 1)).toBeLessThan(0.015);
    expect(Math.abs(result.interval[1] - mean - factor * u)).toBeLessThan(0.034 * u);
    expect(Math.abs(mean - result.interval[0] - factor * u)).toBeLessThan(0.034 * u);
  });

  it('a linear model agrees with the law of propagation', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -3, max: 3, noNaN: true }),
        fc.double({ min: 0.1, max: 3, noNaN: true }),
        fc.nat(),
        (a, b, seed) => {
          const result = monteCarlo((x) => a * at(x, 0) + b * at(x, 1), [normal(1, 1), rectangular(-1, 1)], {
            seed,
            digits: 1,
          });
          const u = Math.hypot(a, b / Math.sqrt(3));
          expect(Math.abs(result.standardUncertainty / u - 1)).toBeLessThan(0.05);
        },
      ),
      { numRuns: 8 },
    );
  });

  it('keeps its digits on large values with small spreads', () => {
    const result = monteCarlo((x) => at(x, 0), [normal(1e9, 1e-3)], { seed: 3, digits: 1 });
    expect(Math.abs(result.standardUncertainty / 1e-3 - 1)).toBeLessThan(0.01);
  });
});

describe('monteCarlo: the procedure', () => {
  it('the same seed gives the same result, another seed another', () => {
    const run = (seed: number) => monteCarlo((x) => at(x, 0), [normal(0, 1)], { seed, digits: 1 });
    expect(run(5)).toEqual(run(5));
    expect(run(5).mean).not.toBe(run(6).mean);
  });

  it('mean and standard uncertainty are those of all model values together', () => {
    const values: number[] = [];
    const record = (x: number[]) => {
      values.push(at(x, 0));
      return at(x, 0);
    };
    const result = monteCarlo(record, [normal(2, 5)], { seed: 8, digits: 1 });
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
    expect(result.trials).toBe(values.length);
    expect(result.mean / mean).toBeCloseTo(1, 11);
    expect(result.standardUncertainty / Math.sqrt(squares / (values.length - 1))).toBeCloseTo(1, 11);
  });

  it('makes more trials for more digits, in whole blocks', () => {
    const run = (digits: number) => monteCarlo((x) => at(x, 0), [normal(0, 5)], { seed: 5, digits }).trials;
    expect(run(2)).toBeGreaterThan(2 * run(1));
    expect(run(2) % 10_000).toBe(0);
  });

  it('says so when the trials run out', () => {
    const result = monteCarlo((x) => at(x, 0), [normal(0, 1)], { seed: 5, maximumTrials: 29_999 });
    expect(result).toMatchObject({ stable: false, trials: 20_000 });
  });

  it('settles at once on a constant', () => {
    const result = monteCarlo(() => 3, [rectangular(1, 1)], { seed: 5 });
    expect(result).toMatchObject({
      mean: 3,
      standardUncertainty: 0,
      interval: [3, 3],
      trials: 100_000,
      stable: true,
    });
  });

  it('enlarges the blocks for a high probability', () => {
    const result = monteCarlo((x) => at(x, 0), [rectangular(0, 1)], {
      seed: 5,
      digits: 1,
      probability: 0.999,
    });
    expect(result.trials % 100_000).toBe(0);
    expect(result.interval[1] - result.interval[0]).toBeCloseTo(0.999, 3);
  });

  it('refuses a model that gives no number', () => {
    expect(() => monteCarlo((x) => Math.sqrt(at(x, 0)), [normal(0, 1)], { seed: 1 })).toThrow(
      expect.objectContaining({ code: 'model-not-finite', field: 'model' }),
    );
  });

  it.each([
    [{ seed: -1 }, 'seed'],
    [{ seed: NaN }, 'seed'],
    [{ seed: 1, digits: 3 }, 'options.digits'],
    [{ seed: 1, maximumTrials: 100 }, 'options.maximumTrials'],
    // A block has 100 values beyond the interval: 20 000 trials at 99.5 %, and two blocks are the fewest.
    [{ seed: 1, probability: 0.995, maximumTrials: 39_000 }, 'options.maximumTrials'],
    [{ seed: 1, probability: 1 }, 'options.probability'],
    [{ seed: 1, interval: 'longest' as 'shortest' }, 'options.interval'],
  ])('refuses the options %j', (options, field) => {
    expect(() => monteCarlo((x) => at(x, 0), [normal(0, 1)], options)).toThrow(
      expect.objectContaining({ field }),
    );
  });

  it.each([
    [normal(NaN, 1), 'inputs[0].mean'],
    [normal(0, -1), 'inputs[0].standardUncertainty'],
    [rectangular(1, 0), 'inputs[0].upper'],
    [{ distribution: 'student-t', mean: 0, scale: 1, degreesOfFreedom: 0 }, 'inputs[0].degreesOfFreedom'],
    [{ distribution: 'student-t', mean: 0, scale: -1, degreesOfFreedom: 1 }, 'inputs[0].scale'],
    [{ distribution: 'lognormal' }, 'inputs[0].distribution'],
  ])('refuses the input %j', (input, field) => {
    expect(() => monteCarlo((x) => at(x, 0), [input as Distribution], { seed: 1 })).toThrow(
      expect.objectContaining({ field }),
    );
  });

  it('refuses no input at all', () => {
    expect(() => monteCarlo(() => 1, [], { seed: 1 })).toThrow(
      expect.objectContaining({ code: 'too-few-values' }),
    );
  });
});

describe('numericalTolerance', () => {
  it.each([
    // JCGM 101:2008, 7.9.2, examples: 0.000 35 with two digits is 35e-5; 0.000 4 with one digit.
    [0.00035, 2, 0.5e-5],
    [0.0004, 1, 0.5e-4],
    [2, 2, 0.05],
    [9.96, 2, 0.5],
    [0, 2, 0],
  ])('of %s with %s digits', (u, digits, expected) => {
    expect(numericalTolerance(u, digits)).toBeCloseTo(expected, 12);
  });
});

describe('coverageInterval', () => {
  it('counts as the document does: r = (M - q)/2, or its upper half', () => {
    // JCGM 101:2008, 7.7.2: M = 100, q = 90, r = 5: the fifth and the ninety-fifth value.
    const hundred = Float64Array.from({ length: 100 }, (_, i) => i + 1);
    expect(coverageInterval(hundred, 0.9, 'symmetric')).toEqual([5, 95]);
    // q = 95: (100 - 95 + 1)/2 = 3.
    expect(coverageInterval(hundred, 0.95, 'symmetric')).toEqual([3, 98]);
  });

  it('finds the shortest among all with the probability', () => {
    const skew = Float64Array.from({ length: 100 }, (_, i) => (i + 1) ** 2);
    expect(coverageInterval(skew, 0.9, 'shortest')).toEqual([1, 91 ** 2]);
    const between = Float64Array.of(-50, -30, 0, 1, 2, 3, 4, 5, 6, 40);
    expect(coverageInterval(between, 0.6, 'shortest')).toEqual([0, 6]);
    const shifted = between.map((value) => value + 1000);
    expect(coverageInterval(shifted, 0.6, 'shortest')).toEqual([1000, 1006]);
    const mirrored = skew.map((value) => -value).reverse();
    expect(coverageInterval(mirrored, 0.9, 'shortest')).toEqual([-(91 ** 2), -1]);
  });
});

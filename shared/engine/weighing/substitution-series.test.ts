import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { item } from '../linear/entries.ts';
import { pooledStandardDeviation } from './pooled-standard-deviation.ts';
import { type SubstitutionCycle, substitutionSeries } from './substitution-series.ts';

/** Readings of a series without noise: reference at `base`, tests above it, a constant step from one to the next. */
function madeUp(
  cycle: SubstitutionCycle,
  cycles: number,
  tests: number[],
  drift: number,
  alternating = false,
): number[] {
  const readings: number[] = [];
  const take = (level: number) => readings.push(7 + level + drift * readings.length);
  for (let i = 0; i < cycles; i += 1) {
    const order = alternating && i % 2 === 1 ? [...tests].reverse() : tests;
    const middle = cycle === 'ABBA' ? [item(tests, 0), item(tests, 0)] : order;
    for (const level of [0, ...middle, 0]) take(level);
  }
  return readings;
}

const level = fc.integer({ min: -5000, max: 5000 }).map((n) => n / 100);

describe('substitutionSeries', () => {
  // EA-4/02 M, example S2, 10 kg (from memory): readings S X X S in g.
  const ea = [0.01, 0.02, 0.025, 0.015, 0.025, 0.05, 0.055, 0.02, 0.025, 0.045, 0.04, 0.02];

  it('EA-S2: gives the differences of the worked example (from memory)', () => {
    const result = substitutionSeries({ readings: ea, cycle: 'ABBA' });
    [0.01, 0.03, 0.02].forEach((expected, i) => expect(result.differences[i]).toBeCloseTo(expected, 12));
    expect(result.difference).toBeCloseTo(0.02, 12);
    expect(result.standardDeviation).toBeCloseTo(0.01, 12);
    expect(result.degreesOfFreedom).toBe(2);
    expect(result.tests).toHaveLength(1);
  });

  it.each<[SubstitutionCycle, number]>([
    ['ABBA', 1],
    ['ABA', 1],
    ['AB1..BnA', 3],
  ])('%s gives back difference and drift whatever the drift', (cycle, testCount) => {
    fc.assert(
      fc.property(level, level, fc.boolean(), (difference, drift, alternating) => {
        const tests = Array.from({ length: testCount }, (_, j) => difference + j);
        const turn = alternating && cycle === 'AB1..BnA';
        const readings = madeUp(cycle, 3, tests, drift, turn);
        const result = substitutionSeries({ readings, cycle, testCount, alternating: turn });
        result.tests.forEach((test, j) => expect(test.difference).toBeCloseTo(difference + j, 9));
        expect(result.difference).toBe(result.tests[0]?.difference);
        expect(result.drift).toBeCloseTo(drift, 9);
        expect(result.standardDeviation).toBeCloseTo(0, 9);
        expect(result.degreesOfFreedom).toBe(2 * testCount);
      }),
    );
  });

  it('spreads the drift of ABBA by least squares over all four readings', () => {
    // Slope of 0, 1, 2, 6 against -1.5, -0.5, 0.5, 1.5 with the B pair lifted: (1.5 * 6 + 0.5 * 1) / 5.
    expect(substitutionSeries({ readings: [0, 1, 2, 6], cycle: 'ABBA' }).drift).toBeCloseTo(1.9, 12);
  });

  it('scales with the sensitivity, sign included', () => {
    fc.assert(
      fc.property(fc.array(level, { minLength: 12, maxLength: 12 }), (readings) => {
        const plain = substitutionSeries({ readings, cycle: 'ABBA' });
        const scaled = substitutionSeries({ readings, cycle: 'ABBA', sensitivity: -2 });
        expect(scaled.difference).toBeCloseTo(-2 * plain.difference, 9);
        expect(scaled.drift).toBeCloseTo(-2 * plain.drift, 9);
        expect(scaled.standardDeviation).toBeCloseTo(2 * plain.standardDeviation, 9);
      }),
    );
  });

  it('does not depend on the order of the cycles', () => {
    fc.assert(
      fc.property(fc.array(level, { minLength: 9, maxLength: 9 }), (readings) => {
        const turned = [...readings.slice(3), ...readings.slice(0, 3)];
        const before = substitutionSeries({ readings, cycle: 'ABA' });
        const after = substitutionSeries({ readings: turned, cycle: 'ABA' });
        expect(after.difference).toBeCloseTo(before.difference, 9);
        expect(after.standardDeviation).toBeCloseTo(before.standardDeviation, 9);
      }),
    );
  });

  it('pools the scatter over the test weights', () => {
    // B1 differs by 0 and 2, B2 by 0 and 4: variances 2 and 8, pooled 5.
    const result = substitutionSeries({
      readings: [0, 0, 0, 0, 0, 2, 4, 0],
      cycle: 'AB1..BnA',
      testCount: 2,
    });
    expect(result.tests.map(({ differences }) => differences)).toEqual([[0, 2], [0, 4]]); // prettier-ignore
    expect(result.standardDeviation).toBeCloseTo(Math.sqrt(5), 12);
    expect(result.degreesOfFreedom).toBe(2);
  });

  it('says by 0 degrees of freedom that one cycle shows no scatter', () => {
    expect(substitutionSeries({ readings: [0, 1, 1, 0], cycle: 'ABBA' })).toMatchObject({
      difference: 1,
      standardDeviation: 0,
      degreesOfFreedom: 0,
    });
  });

  it.each([
    [{ readings: [1, 2, 3, 4, 5], cycle: 'ABBA' }, 'incomplete-cycle', 'readings'],
    [{ readings: [1, 2], cycle: 'ABA' }, 'too-few-values', 'readings'],
    [{ readings: [1, Number.NaN, 3], cycle: 'ABA' }, 'not-finite', 'readings[1]'],
    [{ readings: [1, 2, 3], cycle: 'ABC' }, 'unknown-choice', 'cycle'],
    [{ readings: [1, 2, 3], cycle: 'ABA', testCount: 2 }, 'out-of-range', 'testCount'],
    [{ readings: [1, 2, 3], cycle: 'AB1..BnA', testCount: 0 }, 'out-of-range', 'testCount'],
    [{ readings: [1, 2, 3], cycle: 'AB1..BnA', testCount: 1.5 }, 'not-whole', 'testCount'],
    [{ readings: [1, 2, 3], cycle: 'ABA', sensitivity: 0 }, 'no-response', 'sensitivity'],
    [{ readings: [1, 2, 3], cycle: 'ABA', sensitivity: Number.NaN }, 'not-finite', 'sensitivity'],
  ])('refuses %o', (input, code, field) => {
    expect(() => substitutionSeries(input as Parameters<typeof substitutionSeries>[0])).toThrow(
      expect.objectContaining({ code, field }),
    );
  });
});

describe('pooledStandardDeviation', () => {
  it('averages variances by their degrees of freedom', () => {
    expect(
      pooledStandardDeviation([
        { standardDeviation: 3, degreesOfFreedom: 1 },
        { standardDeviation: 5, degreesOfFreedom: 3 },
      ]),
    ).toEqual({ standardDeviation: Math.sqrt(21), degreesOfFreedom: 4 });
  });

  it('does not depend on order and scales', () => {
    const estimate = fc.record({
      standardDeviation: fc.integer({ min: 0, max: 1000 }),
      degreesOfFreedom: fc.integer({ min: 1, max: 50 }),
    });
    fc.assert(
      fc.property(fc.array(estimate, { minLength: 1, maxLength: 8 }), (estimates) => {
        const pooled = pooledStandardDeviation(estimates);
        const turned = pooledStandardDeviation([...estimates].reverse());
        const scaled = pooledStandardDeviation(
          estimates.map((one) => ({ ...one, standardDeviation: one.standardDeviation * 3 })),
        );
        expect(turned.standardDeviation).toBeCloseTo(pooled.standardDeviation, 9);
        expect(scaled.standardDeviation).toBeCloseTo(3 * pooled.standardDeviation, 9);
      }),
    );
  });

  it('refuses nothing, negative and no degrees of freedom', () => {
    const code = (estimates: { standardDeviation: number; degreesOfFreedom: number }[]) => {
      try {
        pooledStandardDeviation(estimates);
      } catch (error) {
        return error;
      }
      return undefined;
    };
    expect(code([])).toMatchObject({ code: 'too-few-values', field: 'estimates' });
    expect(code([{ standardDeviation: -1, degreesOfFreedom: 1 }])).toMatchObject({
      code: 'out-of-range',
      field: 'estimates[0].standardDeviation',
    });
    expect(code([{ standardDeviation: 1, degreesOfFreedom: 0 }])).toMatchObject({
      code: 'out-of-range',
      field: 'estimates[0].degreesOfFreedom',
    });
  });
});

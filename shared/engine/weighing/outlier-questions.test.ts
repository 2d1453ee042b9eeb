import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { item } from '../linear/entries.ts';
import { grubbsCriticalValue, outlierQuestions } from './outlier-questions.ts';

describe('outlierQuestions', () => {
  it('asks about the farthest value and keeps every value', () => {
    const values = [0.11, 0.12, 0.1, 0.13, 0.11, 0.98];
    const kept = [...values];
    const [found, ...others] = outlierQuestions({ values });
    expect(found).toMatchObject({ index: 5, value: 0.98 });
    expect(found?.question).toMatch(/Value 6 \(0\.98\).*Is there a reason\?/);
    expect(others).toEqual([]);
    expect(values).toEqual(kept);
  });

  it('is silent about ordinary scatter, equal values and two values', () => {
    expect(outlierQuestions({ values: [1, 2, 3, 4, 5] })).toEqual([]);
    expect(outlierQuestions({ values: [2, 2, 2, 2] })).toEqual([]);
    expect(outlierQuestions({ values: [1, 100] })).toEqual([]);
  });

  it('asks when all others agree to the last digit', () => {
    const [found] = outlierQuestions({ values: [5, 5, 5, 5.1] });
    expect(found?.index).toBe(3);
    expect(found?.pValue).toBeLessThan(1e-6);
  });

  it('turns over exactly at the critical value of Grubbs', () => {
    // ISO 5725-2, table of Grubbs' test (from memory): 6 values, two-sided 5 %, 1.887; 10 values, 2.290.
    expect(grubbsCriticalValue(6, 0.05)).toBeCloseTo(1.887, 3);
    expect(grubbsCriticalValue(10, 0.05)).toBeCloseTo(2.29, 3);
    const series = (far: number) => [-1, -0.5, 0, 0.5, 1, far];
    const distance = (values: number[]) => {
      const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
      const s = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
      return (item(values, 5) - mean) / s;
    };
    for (let far = 2; far < 6; far += 0.05) {
      const asked = outlierQuestions({ values: series(far), level: 0.05 }).length === 1;
      expect(asked).toBe(distance(series(far)) > grubbsCriticalValue(6, 0.05));
    }
  });

  it('judges every value when a pooled standard deviation is known', () => {
    const precision = { standardDeviation: 0.01, degreesOfFreedom: 40 };
    const found = outlierQuestions({ values: [1, 1, 1, 1.2, 0.8], precision });
    expect(found.map(({ index }) => index)).toEqual([3, 4]);
    expect(found[0]?.statistic).toBeCloseTo(20 / Math.sqrt(0.8), 9);
    // Two values: far apart for this comparator, unjudgeable without its history.
    expect(outlierQuestions({ values: [1, 1.1], precision })).toHaveLength(2);
  });

  it('does not depend on origin, unit and order', () => {
    const series = fc.array(fc.integer({ min: -50, max: 50 }), { minLength: 3, maxLength: 9 });
    fc.assert(
      fc.property(series, (values) => {
        const farValues = [...values, 400];
        const asked = outlierQuestions({ values: farValues, level: 0.05 }).map(({ value }) => value);
        const moved = outlierQuestions({
          values: farValues.map((value) => value * 8 + 1024).reverse(),
          level: 0.05,
        });
        expect(moved.map(({ value }) => (value - 1024) / 8)).toEqual(asked);
      }),
    );
  });

  it('refuses what cannot be judged', () => {
    expect(() => outlierQuestions({ values: [1] })).toThrow(
      expect.objectContaining({ code: 'too-few-values', field: 'values' }),
    );
    expect(() => outlierQuestions({ values: [1, 2, Number.NaN] })).toThrow(
      expect.objectContaining({ field: 'values[2]' }),
    );
    expect(() => outlierQuestions({ values: [1, 2], level: 1 })).toThrow(
      expect.objectContaining({ code: 'out-of-range' }),
    );
    expect(() => outlierQuestions({ values: [1, 2], level: 0 })).toThrow(
      expect.objectContaining({ code: 'out-of-range' }),
    );
    const precision = { standardDeviation: 0, degreesOfFreedom: 3 };
    expect(() => outlierQuestions({ values: [1, 2], precision })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'precision.standardDeviation' }),
    );
    expect(() => grubbsCriticalValue(2, 0.05)).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'count' }),
    );
    expect(() => grubbsCriticalValue(3.5, 0.05)).toThrow(expect.objectContaining({ code: 'not-whole' }));
  });
});

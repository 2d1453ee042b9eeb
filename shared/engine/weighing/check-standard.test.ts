import { describe, expect, it } from 'vitest';
import { checkStandardTest, precisionTest } from './check-standard.ts';

describe('checkStandardTest', () => {
  const history = { mean: -0.0194, standardDeviation: 0.0003, count: 11 };

  it('accepts up to the limit and no further', () => {
    const { limit, criticalValue } = checkStandardTest({ value: history.mean, history });
    // t(0.975; 10) = 2.2281 (JCGM 100:2008, Table G.2 prints 2.23; from memory).
    expect(criticalValue).toBeCloseTo(2.2281, 4);
    expect(limit).toBeCloseTo(2.2281 * 0.0003 * Math.sqrt(12 / 11), 7);
    expect(checkStandardTest({ value: history.mean + limit * 0.999, history }).withinHistory).toBe(true);
    expect(checkStandardTest({ value: history.mean - limit * 1.001, history }).withinHistory).toBe(false);
  });

  it('tells the side and the probability', () => {
    const low = checkStandardTest({ value: history.mean - 0.0009, history });
    expect(low.statistic).toBeCloseTo(-3 / Math.sqrt(12 / 11), 9);
    expect(low.pValue).toBeLessThan(0.05);
    expect(low.pValue).toBe(checkStandardTest({ value: history.mean + 0.0009, history }).pValue);
    expect(checkStandardTest({ value: history.mean - 0.0009, history, level: 0.001 }).withinHistory).toBe(
      true,
    );
  });

  it('refuses a history that is none', () => {
    const test =
      (change: object, value = 0) =>
      () =>
        checkStandardTest({ value, history: { ...history, ...change } });
    expect(test({ count: 1 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'history.count' }),
    );
    expect(test({ count: 2.5 })).toThrow(expect.objectContaining({ code: 'not-whole' }));
    expect(test({ standardDeviation: 0 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'history.standardDeviation' }),
    );
    expect(test({ mean: Number.NaN })).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'history.mean' }),
    );
    expect(test({}, Number.NaN)).toThrow(expect.objectContaining({ code: 'not-finite', field: 'value' }));
  });
});

describe('precisionTest', () => {
  // HB-3511: NIST/SEMATECH e-Handbook, 2.3.5.1.1: 117 runs of a design with 3 degrees of freedom pooled.
  const history = { standardDeviation: 0.03065, degreesOfFreedom: 351 };
  const run = (standardDeviation: number) => ({ standardDeviation, degreesOfFreedom: 3 });

  it('HB-3511: gives the limit of the handbook', () => {
    const { criticalValue, limit } = precisionTest({ run: run(0.03), history });
    expect(Math.abs(criticalValue - 3.838)).toBeLessThan(5e-4);
    expect(Math.abs(limit / history.standardDeviation - 1.959)).toBeLessThan(5e-4);
  });

  it('asks only when the balance has become worse', () => {
    expect(precisionTest({ run: run(0), history })).toMatchObject({
      withinHistory: true,
      statistic: 0,
      pValue: 1,
    });
    expect(precisionTest({ run: run(1.95 * 0.03065), history }).withinHistory).toBe(true);
    const worse = precisionTest({ run: run(2 * 0.03065), history });
    expect(worse.withinHistory).toBe(false);
    expect(worse.pValue).toBeLessThan(0.01);
    expect(precisionTest({ run: run(2 * 0.03065), history, level: 0.001 }).withinHistory).toBe(true);
  });

  it('refuses estimates that are none', () => {
    expect(() => precisionTest({ run: run(-1), history })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'run.standardDeviation' }),
    );
    expect(() => precisionTest({ run: { standardDeviation: 1, degreesOfFreedom: 0 }, history })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'run.degreesOfFreedom' }),
    );
    expect(() =>
      precisionTest({ run: run(1), history: { standardDeviation: 0, degreesOfFreedom: 3 } }),
    ).toThrow(expect.objectContaining({ field: 'history.standardDeviation' }));
    expect(() =>
      precisionTest({ run: run(1), history: { standardDeviation: 1, degreesOfFreedom: 0 } }),
    ).toThrow(expect.objectContaining({ field: 'history.degreesOfFreedom' }));
  });
});

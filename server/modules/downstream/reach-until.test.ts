import { describe, expect, it } from 'vitest';
import { expandedUAfter, lastDayWithin } from './reach-until.ts';

describe('expandedUAfter', () => {
  it('is 2u on the day of calibration, and adds drift in full and its uncertainty in quadrature', () => {
    const ageing = { u: 0.00003, rate: -0.00001, rateU: 0.00002 };
    expect(expandedUAfter(ageing, 0)).toBe(0.00006);
    // Two years: 2 * hypot(30, 40) + 20 micrograms.
    expect(expandedUAfter(ageing, 730.5)).toBeCloseTo(0.00012, 12);
  });
});

describe('lastDayWithin', () => {
  it('is the last whole day on which U is within the limit', () => {
    const ageing = { u: 0.00003, rate: 0.00001, rateU: 0.00002 };
    const last = lastDayWithin(ageing, 0.00012)!;
    expect(last).toBe(730);
    expect(expandedUAfter(ageing, last)).toBeLessThanOrEqual(0.00012);
    expect(expandedUAfter(ageing, last + 1)).toBeGreaterThan(0.00012);
  });

  it('is null beyond fifty years, and 0 where the limit is reached already', () => {
    expect(lastDayWithin({ u: 0.00003, rate: 0, rateU: 0 }, 0.0001)).toBeNull();
    expect(lastDayWithin({ u: 0.00003, rate: 0, rateU: 0.00001 }, 0.00006)).toBe(0);
  });
});

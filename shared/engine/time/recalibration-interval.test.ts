import { describe, expect, it } from 'vitest';
import type { HistoryEntry } from './history.ts';
import { predictValue } from './predict-value.ts';
import {
  type ControlChart,
  type InUseTime,
  recalibrationInterval,
  type Staircase,
} from './recalibration-interval.ts';

// ILAC-G24:2022 / OIML D 10:2022, 6.2 to 6.4: titles of the methods read in a reproduction. Lengthening within 80 %
// of the permissible error is an example of the document from memory; step sizes are common practice, no source.
describe('ILAC-G24: staircase', () => {
  const found = (
    deviation: number,
    change: Partial<Staircase> & { minimumMonths?: number; maximumMonths?: number } = {},
  ) =>
    recalibrationInterval({
      method: 'staircase',
      currentMonths: 24,
      deviation,
      maximumPermissibleError: 0.5,
      ...change,
    });

  it('lengthens within 80 %, keeps up to the limit, shortens beyond it, on both sides', () => {
    expect([0, 0.4, 0.401, 0.5, 0.501].map((deviation) => found(deviation).months)).toEqual([
      36, 36, 24, 24, 12,
    ]);
    expect([-0.4, -0.401, -0.501].map((deviation) => found(deviation).months)).toEqual([36, 24, 12]);
  });

  it('gives the reason', () => {
    expect(found(0.1)).toMatchObject({
      method: 'staircase (OIML D 10, 6.2)',
      reason: expect.stringMatching(/^Found at 20\.0 %.*grows/),
    });
    expect(found(0.45).reason).toMatch(/^Found at 90\.0 %.*stays/);
    expect(found(0.75).reason).toMatch(/^Found at 150 %.*shrinks/);
  });

  it('obeys the share, the factors and the bounds of the programme', () => {
    expect(found(0.3, { lengthenWithin: 0.5 }).months).toBe(24);
    expect(found(0.1, { lengthenBy: 2 }).months).toBe(48);
    expect(found(0.9, { shortenBy: 0.25 }).months).toBe(6);
    expect(found(0.1, { currentMonths: 50 }).months).toBe(60);
    expect(found(0.1, { maximumMonths: 30 }).months).toBe(30);
    expect(found(0.9, { minimumMonths: 18 }).months).toBe(18);
    expect(found(0.1, { currentMonths: 5 }).months).toBe(7);
    expect(found(0.9, { currentMonths: 100, shortenBy: 0.29 }).months).toBe(29);
  });

  it.each<[Parameters<typeof found>[1], string]>([
    [{ currentMonths: 0 }, 'currentMonths'],
    [{ deviation: Number.NaN }, 'deviation'],
    [{ maximumPermissibleError: 0 }, 'maximumPermissibleError'],
    [{ lengthenWithin: 1.1 }, 'lengthenWithin'],
    [{ lengthenBy: 0.9 }, 'lengthenBy'],
    [{ shortenBy: 0 }, 'shortenBy'],
    [{ minimumMonths: 0 }, 'minimumMonths'],
    [{ maximumMonths: 1201 }, 'maximumMonths'],
    [{ minimumMonths: 20, maximumMonths: 10 }, 'minimumMonths'],
  ])('refuses %o', (change, field) => {
    expect(() => found(0.1, change)).toThrow(expect.objectContaining({ field }));
  });
});

describe('ILAC-G24: control chart', () => {
  const history: HistoryEntry[] = [
    { date: '2018-01-01', value: 0, standardUncertainty: 5 },
    { date: '2020-01-01', value: 20, standardUncertainty: 5 },
    { date: '2022-01-01', value: 40, standardUncertainty: 5 },
  ];
  const chart = (limit: number, change: Partial<ControlChart> & { maximumMonths?: number } = {}) =>
    recalibrationInterval({ method: 'control-chart', history, limit, ...change });

  it('stops at the last month at which value and uncertainty still fit inside', () => {
    const { months, reason, method } = chart(80);
    expect(method).toBe('control chart (OIML D 10, 6.3)');
    expect(reason).toMatch(/^Drifting 10 per year, .* after \d+ months\.$/);
    const reach = (month: number) => {
      const date = new Date(Date.UTC(2022, 0, 1) + Math.round((month * 365.25) / 12) * 86_400_000)
        .toISOString()
        .slice(0, 10);
      const { value, standardUncertainty } = predictValue(history, date);
      return value + 2 * standardUncertainty;
    };
    expect(reach(months)).toBeLessThanOrEqual(80);
    expect(reach(months + 1)).toBeGreaterThan(80);
  });

  it('is shorter for a closer limit, a larger factor and a lower target', () => {
    const { months } = chart(80);
    expect(chart(70).months).toBeLessThan(months);
    expect(chart(80, { coverageFactor: 3 }).months).toBeLessThan(months);
    expect(chart(80, { target: -5 }).months).toBeLessThan(months);
    expect(chart(80, { target: 5 }).months).toBeGreaterThan(months);
  });

  it('does not depend on the order of the history, nor on the side', () => {
    const { months } = chart(80);
    expect(chart(80, { history: [...history].reverse() }).months).toBe(months);
    expect(chart(80, { history: history.map((one) => ({ ...one, value: -one.value })) }).months).toBe(months);
  });

  it('stops at the longest interval allowed and says so', () => {
    expect(chart(1000)).toMatchObject({
      months: 60,
      reason: expect.stringContaining('longest interval allowed'),
    });
    expect(chart(1000, { maximumMonths: 30.5 }).months).toBe(30);
  });

  it('proposes none where the value may be beyond the limit already', () => {
    expect(chart(45)).toMatchObject({ months: 0, reason: expect.stringContaining('calibrate before use') });
  });

  it('refuses what predictValue refuses, and limits that are none', () => {
    expect(() => chart(80, { history: history.slice(0, 1) })).toThrow(
      expect.objectContaining({ code: 'too-few-values' }),
    );
    expect(() => chart(0)).toThrow(expect.objectContaining({ code: 'out-of-range', field: 'limit' }));
    expect(() => chart(80, { coverageFactor: -1 })).toThrow(
      expect.objectContaining({ field: 'coverageFactor' }),
    );
    expect(() => chart(80, { target: Number.NaN })).toThrow(expect.objectContaining({ field: 'target' }));
    const interventions = [{ lastGood: '2019-01-01', firstBad: '2019-01-01' }];
    expect(() => chart(80, { prediction: { interventions } })).toThrow(
      expect.objectContaining({ code: 'crosses-epoch' }),
    );
  });
});

describe('ILAC-G24: in-use time', () => {
  const used = (change: Partial<InUseTime> = {}) =>
    recalibrationInterval({
      method: 'in-use-time',
      allowedUses: 500,
      countedUses: 100,
      countedMonths: 6,
      ...change,
    });

  it('turns the uses allowed into months at the pace observed', () => {
    expect(used()).toEqual({
      months: 30,
      method: 'in-use time (OIML D 10, 6.4)',
      reason: 'At 16.7 uses a month the 500 allowed last 30 months.',
    });
    expect(used({ countedUses: 110 }).months).toBe(27);
  });

  it('says when they are used up and when they outlast the programme', () => {
    expect(used({ countedUses: 500 })).toMatchObject({
      months: 6,
      reason: expect.stringContaining('used up; calibrate before use'),
    });
    expect(used({ countedUses: 499 }).reason).not.toContain('used up');
    expect(used({ countedUses: 10 })).toMatchObject({
      months: 60,
      reason: expect.stringContaining('outlast'),
    });
    expect(used({ countedUses: 0 }).months).toBe(60);
  });

  it('refuses counts that are none', () => {
    expect(() => used({ allowedUses: 0 })).toThrow(expect.objectContaining({ field: 'allowedUses' }));
    expect(() => used({ countedUses: -1 })).toThrow(expect.objectContaining({ field: 'countedUses' }));
    expect(() => used({ countedMonths: 0 })).toThrow(expect.objectContaining({ field: 'countedMonths' }));
    expect(() => recalibrationInterval({ method: 'hunch' } as unknown as InUseTime)).toThrow(
      expect.objectContaining({ code: 'unknown-choice', field: 'method' }),
    );
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { entry, item } from '../linear/entries.ts';
import { fitLine } from './fit-line.ts';
import type { HistoryEntry } from './history.ts';
import { predictValue } from './predict-value.ts';

const history: HistoryEntry[] = [
  { date: '2016-03-01', value: 212, standardUncertainty: 8 },
  { date: '2018-02-14', value: 221, standardUncertainty: 6 },
  { date: '2020-06-30', value: 230, standardUncertainty: 6 },
  { date: '2023-01-10', value: 244, standardUncertainty: 5 },
];

/** Histories of three to seven calibrations on different days. */
const anyHistory = fc
  .uniqueArray(fc.integer({ min: 0, max: 9000 }), { minLength: 3, maxLength: 7 })
  .chain((days) =>
    fc.tuple(
      ...days.map((day) =>
        fc.record({
          day: fc.constant(day),
          value: fc.integer({ min: -500, max: 500 }),
          u: fc.integer({ min: 1, max: 30 }),
        }),
      ),
    ),
  )
  .map((entries) =>
    entries.map(({ day, value, u }): HistoryEntry => ({
      date: new Date(Date.UTC(2000, 0, 1) + day * 86_400_000).toISOString().slice(0, 10),
      value,
      standardUncertainty: u,
    })),
  );
const at = '2026-07-01';

describe('predictValue: published histories', () => {
  it('K20-K4: follows the national prototype 4 from 1889 to 1984 at -0.326 ug a year', () => {
    // R. S. Davis, J. Res. NBS 90 (1985) 263, abstract (reproduction); mg, days of the year made up, u made up.
    const k4 = [
      { date: '1889-07-01', value: -0.075, standardUncertainty: 0.003 },
      { date: '1984-07-01', value: -0.106, standardUncertainty: 0.003 },
    ];
    const { slope, value, degreesOfFreedom } = predictValue(k4, '1984-07-01');
    expect(1000 * (item(k4, 1).value - item(k4, 0).value)).toBeCloseTo(-31, 9);
    expect(1000 * slope).toBeCloseTo(-0.326, 3);
    expect(value).toBeCloseTo(-0.106, 12);
    expect(degreesOfFreedom).toBe(0);
  });

  it('K20-K4: shows that prototype 20 does not follow a line', () => {
    const k20 = [
      { date: '1889-07-01', value: -0.039, standardUncertainty: 0.003 },
      { date: '1948-07-01', value: -0.019, standardUncertainty: 0.003 },
      { date: '1984-07-01', value: -0.022, standardUncertainty: 0.003 },
    ];
    const change = (i: number) => 1000 * (item(k20, i + 1).value - item(k20, i).value);
    expect(change(0)).toBeCloseTo(20, 9);
    expect(change(1)).toBeCloseTo(-3, 9);
    // A line through the ends misses 1948 by 9 ug; with all three the scatter shows it.
    const ends = predictValue([item(k20, 0), item(k20, 2)], '1948-07-01');
    expect(1000 * (item(k20, 1).value - ends.value)).toBeCloseTo(9.44, 2);
    const all = predictValue(k20, '2000-01-01');
    expect(all.birgeRatio).toBeGreaterThan(2);
    const wide = predictValue(k20, '2000-01-01', { scatter: 'observed' });
    expect(wide.standardUncertainty / all.standardUncertainty).toBeCloseTo(all.birgeRatio, 12);
    expect(wide.slopeUncertainty / all.slopeUncertainty).toBeCloseTo(all.birgeRatio, 12);
  });

  it('BIPM-35ug: a shift of 35 ug in 22 years is 1.59 ug a year', () => {
    // CIPM, 104th meeting (2015), Recommendation 1; a line is the mean rate only, the real model was another.
    const unit = [
      { date: '1992-01-01', value: 0, standardUncertainty: 3 },
      { date: '2014-01-01', value: 35, standardUncertainty: 3 },
    ];
    expect(predictValue(unit, '2003-01-01').slope).toBeCloseTo(1.59, 2);
  });
});

describe('predictValue: properties', () => {
  it('is the line through exact points, anywhere', () => {
    const line = history.map((calibration, i) => ({
      ...calibration,
      date: `20${10 + 4 * i}-01-01`,
      value: 10 + 4 * 2.5 * i,
    }));
    // 2010, 2014, 2018, 2022: 1461 days apart, exactly four Julian years.
    const { value, slope, chiSquared, birgeRatio } = predictValue(line, '2026-01-01');
    expect(slope).toBeCloseTo(2.5, 12);
    expect(value).toBeCloseTo(50, 10);
    expect(chiSquared).toBeCloseTo(0, 12);
    expect(birgeRatio).toBeCloseTo(0, 6);
  });

  it('does not depend on the order of the calibrations', () => {
    fc.assert(
      fc.property(anyHistory, (entries) => {
        const forward = predictValue(entries, at);
        const backward = predictValue([...entries].reverse(), at);
        expect(backward.value).toBeCloseTo(forward.value, 6);
        expect(backward.standardUncertainty / forward.standardUncertainty).toBeCloseTo(1, 9);
      }),
    );
  });

  it('is linear in the values, scales with the unit and moves with the origin', () => {
    fc.assert(
      fc.property(anyHistory, (entries) => {
        const plain = predictValue(entries, at);
        const changed = predictValue(
          entries.map((one) => ({
            ...one,
            value: one.value * -4 + 100,
            standardUncertainty: one.standardUncertainty * 4,
          })),
          at,
        );
        expect(changed.value).toBeCloseTo(plain.value * -4 + 100, 5);
        expect(changed.slope).toBeCloseTo(plain.slope * -4, 6);
        expect(changed.standardUncertainty / plain.standardUncertainty).toBeCloseTo(4, 9);
        expect(changed.chiSquared).toBeCloseTo(plain.chiSquared, 5);
      }),
    );
  });

  it('adds a shared part in quadrature and leaves the drift alone', () => {
    fc.assert(
      fc.property(anyHistory, fc.integer({ min: 1, max: 40 }), (entries, shared) => {
        const covariance = entries.map((one, i) =>
          entries.map((_, j) => shared ** 2 + (i === j ? one.standardUncertainty ** 2 : 0)),
        );
        const alone = predictValue(entries, at);
        const together = predictValue(entries, at, { covariance });
        expect(together.slope).toBeCloseTo(alone.slope, 5);
        expect(together.slopeUncertainty / alone.slopeUncertainty).toBeCloseTo(1, 6);
        expect(together.standardUncertainty / Math.hypot(alone.standardUncertainty, shared)).toBeCloseTo(
          1,
          6,
        );
      }),
    );
  });

  it('grows less certain away from the calibrations', () => {
    const spread = (date: string) => predictValue(history, date).standardUncertainty;
    expect(spread('2030-01-01')).toBeGreaterThan(spread('2025-01-01'));
    expect(spread('2020-06-30')).toBeLessThan(spread('2016-03-01'));
    expect(spread('2020-06-30')).toBeLessThan(6);
  });

  it('agrees with the line about another origin', () => {
    const days = history.map(({ date }) => Date.parse(date) / 86_400_000 / 365.25);
    const fit = fitLine(days.map((day) => day - 50), history.map(({ value }) => value), history.map((one, i) => history.map((_, j) => (i === j ? one.standardUncertainty ** 2 : 0)))); // prettier-ignore
    const x = Date.parse(at) / 86_400_000 / 365.25 - 50;
    const { value, standardUncertainty, slope, slopeUncertainty } = predictValue(history, at);
    expect(value).toBeCloseTo(item(fit.parameters, 0) + x * item(fit.parameters, 1), 9);
    expect(slope).toBeCloseTo(item(fit.parameters, 1), 12);
    const variance =
      entry(fit.covariance, 0, 0) + 2 * x * entry(fit.covariance, 0, 1) + x * x * entry(fit.covariance, 1, 1);
    expect(standardUncertainty).toBeCloseTo(Math.sqrt(variance), 9);
    expect(slopeUncertainty).toBeCloseTo(Math.sqrt(entry(fit.covariance, 1, 1)), 12);
  });
});

describe('predictValue: interval', () => {
  const half = (options: Parameters<typeof predictValue>[2]) => {
    const { value, interval } = predictValue(history, at, options);
    expect((interval[0] + interval[1]) / 2).toBeCloseTo(value, 9);
    return (interval[1] - interval[0]) / 2;
  };
  const { standardUncertainty, degreesOfFreedom } = predictValue(history, at);

  it('is normal for stated and Student for observed scatter', () => {
    expect(half({}) / standardUncertainty).toBeCloseTo(1.95996, 4);
    expect(half({ probability: 0.6826894921 }) / standardUncertainty).toBeCloseTo(1, 5);
    expect(degreesOfFreedom).toBe(2);
    // t(0.975; 2) = 4.303 (from memory); the history agrees with a line, so the scatter widens nothing.
    expect(half({ scatter: 'observed' }) / standardUncertainty).toBeCloseTo(4.303, 3);
  });

  it('takes in the uncertainty of the calibration to come', () => {
    expect(half({ nextStandardUncertainty: 5 })).toBeCloseTo(1.95996 * Math.hypot(standardUncertainty, 5), 3);
  });
});

describe('predictValue: refusals', () => {
  const first = item(history, 0);
  it.each<[string, HistoryEntry[], string, Parameters<typeof predictValue>[2], string, string]>([
    ['one calibration', [first], at, {}, 'too-few-values', 'history'],
    ['no calibration', [], at, {}, 'too-few-values', 'history'],
    ['one date', [first, { ...first, value: 1 }], at, {}, 'one-date', 'history'],
    [
      'a date that does not exist',
      [first, { ...first, date: '2021-02-30' }],
      at,
      {},
      'not-a-date',
      'history[1].date',
    ],
    ['a date in another notation', history, '1 July 2026', {}, 'not-a-date', 'at'],
    ['a month that does not exist', history, '2026-13-01', {}, 'not-a-date', 'at'],
    [
      'a value that is none',
      [first, { ...first, value: Number.NaN }],
      at,
      {},
      'not-finite',
      'history[1].value',
    ],
    [
      'certainty',
      [first, { ...first, standardUncertainty: 0 }],
      at,
      {},
      'out-of-range',
      'history[1].standardUncertainty',
    ],
    ['a covariance of another size', history, at, { covariance: [[1]] }, 'size-mismatch', 'covariance'],
    [
      'scatter of two points',
      history.slice(0, 2),
      at,
      { scatter: 'observed' },
      'no-scatter',
      'options.scatter',
    ],
    [
      'a negative next uncertainty',
      history,
      at,
      { nextStandardUncertainty: -1 },
      'out-of-range',
      'options.nextStandardUncertainty',
    ],
    ['a probability of 1', history, at, { probability: 1 }, 'out-of-range', 'options.probability'],
    ['a history across an adjustment', history, at, { interventions: [{ lastGood: '2019-01-01', firstBad: '2019-01-01' }] }, 'crosses-epoch', 'history'], // prettier-ignore
    ['a date beyond an adjustment', history, at, { interventions: [{ lastGood: '2024-01-01', firstBad: '2024-01-01' }] }, 'crosses-epoch', 'history'], // prettier-ignore
    ['a calibration that may be on either side', history, at, { interventions: [{ lastGood: '2015-01-01', firstBad: '2017-01-01' }] }, 'crosses-epoch', 'history'], // prettier-ignore
  ])('refuses %s', (_, entries, date, options, code, field) => {
    expect(() => predictValue(entries, date, options)).toThrow(expect.objectContaining({ code, field }));
  });

  it('accepts interventions outside the stretch it uses', () => {
    const interventions = [
      { lastGood: '2010-01-01', firstBad: '2012-01-01' },
      { lastGood: '2030-01-01', firstBad: '2030-01-01' },
    ];
    expect(predictValue(history, at, { interventions })).toEqual(predictValue(history, at));
  });
});

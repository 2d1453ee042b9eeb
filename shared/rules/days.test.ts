import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addMonths, dateText, isBefore, isNotAfter, periodOf } from './days.ts';

describe('periodOf', () => {
  it.each([
    ['2024-02-10', 'day', '2024-02-10', '2024-02-10'],
    ['2024-02-10', 'month', '2024-02-01', '2024-02-29'],
    ['2023-02-10', 'month', '2023-02-01', '2023-02-28'],
    ['1948-07-01', 'year', '1948-01-01', '1948-12-31'],
  ] as const)('%s known to the %s is %s to %s', (day, precision, first, last) => {
    expect(periodOf(day, precision)).toEqual({ first, last });
  });
});

describe('order of dates', () => {
  it('is by calendar day: the same day is not after itself, nor before', () => {
    const day = periodOf('2025-03-10', 'day');
    expect(isNotAfter(day, day)).toBe(true);
    expect(isBefore(day, day)).toBe(false);
  });

  it('is open where the precision cannot decide', () => {
    const year = periodOf('1948-01-01', 'year');
    expect(isNotAfter(year, periodOf('1948-06-01', 'day'))).toBeNull();
    expect(isBefore(year, year)).toBeNull();
    expect(isBefore(year, periodOf('1949-01-01', 'day'))).toBe(true);
    expect(isNotAfter(year, periodOf('1947-12-31', 'day'))).toBe(false);
  });

  it('never contradicts itself', () => {
    const days = fc.date({ min: new Date('1889-01-01'), max: new Date('2100-01-01'), noInvalidDate: true });
    const periods = fc
      .tuple(days, fc.constantFrom('day', 'month', 'year'))
      .map(([date, precision]) => periodOf(date.toISOString().slice(0, 10), precision));
    fc.assert(
      fc.property(periods, periods, (a, b) => {
        if (isBefore(a, b) === true) {
          expect(isNotAfter(a, b)).toBe(true);
          expect(isNotAfter(b, a)).toBe(false);
        }
      }),
    );
  });
});

describe('addMonths', () => {
  it('keeps the day where the month has it, else takes the last', () => {
    expect(addMonths(periodOf('2024-01-31', 'day'), 1).first).toBe('2024-02-29');
    expect(addMonths(periodOf('2024-11-15', 'day'), 2).first).toBe('2025-01-15');
    expect(addMonths(periodOf('2024-12-31', 'day'), 12).first).toBe('2025-12-31');
  });
});

it('reads a date as exactly as it is known', () => {
  expect(dateText('1948-07-01', 'year')).toBe('1948');
  expect(dateText('2019-05-20', 'month')).toBe('2019-05');
  expect(dateText('2019-05-20', 'day')).toBe('2019-05-20');
});

import { describe, expect, it } from 'vitest';
import { dateAsKnown, dayNumber, dayOf, possibleDays } from './days.ts';
import { timeTicks, valueTicks } from './ticks.ts';

describe('valueTicks', () => {
  it.each([
    [-170, 170, 5, [-100, 0, 100]],
    [-0.3, 0.31, 6, [-0.2, 0, 0.2]],
    [0.04, 0.11, 5, [0.04, 0.06, 0.08, 0.1]],
    [-1200, 800, 4, [-1000, -500, 0, 500]],
  ])('covers %d to %d by about %i round numbers', (low, high, count, expected) => {
    expect(valueTicks(low, high, count)).toEqual(expected);
  });

  it('leaves no trace of binary fractions', () => {
    expect(valueTicks(0, 0.7, 7)).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7]);
  });

  it('has one mark for a stretch without length', () => {
    expect(valueTicks(3, 3, 5)).toEqual([3]);
  });
});

describe('timeTicks', () => {
  const labels = (from: string, to: string, count: number) =>
    timeTicks(dayNumber(from), dayNumber(to), count).map((tick) => tick.label);

  it('steps by years that fit', () => {
    expect(labels('2015-06-01', '2028-06-01', 7)).toEqual([
      '2016',
      '2018',
      '2020',
      '2022',
      '2024',
      '2026',
      '2028',
    ]);
    expect(labels('1889-01-01', '2026-01-01', 5)).toEqual(['1900', '1950', '2000']);
  });

  it('steps by months over a short stretch', () => {
    expect(labels('2024-01-15', '2025-03-15', 6)).toEqual(['2024-04', '2024-07', '2024-10', '2025-01']);
  });

  it('puts a mark where the year begins', () => {
    expect(
      timeTicks(dayNumber('2019-12-01'), dayNumber('2025-02-01'), 4).map((tick) => dayOf(tick.at)),
    ).toEqual(['2020-01-01', '2022-01-01', '2024-01-01']);
  });
});

describe('dates known to a year only', () => {
  const year = { performedEnd: '1948-12-31', datePrecision: 'year' } as const;

  it('may be any day of it', () => {
    const { first, last } = possibleDays(year);
    expect([dayOf(first), dayOf(last)]).toEqual(['1948-01-01', '1948-12-31']);
    const month = possibleDays({ performedEnd: '2024-02-29', datePrecision: 'month' });
    expect([dayOf(month.first), dayOf(month.last)]).toEqual(['2024-02-01', '2024-02-29']);
  });

  it('are written no more exactly than they are known', () => {
    expect(dateAsKnown(year)).toBe('1948');
    expect(dateAsKnown({ performedEnd: '2024-09-12', datePrecision: 'day' })).toBe('2024-09-12');
  });
});

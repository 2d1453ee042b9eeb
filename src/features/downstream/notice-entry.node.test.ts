import { describe, expect, it } from 'vitest';
import { EMPTY_NOTICE, noticeFrom } from './notice-entry.ts';

const ISSUER = '01550af9-f000-757e-8b57-e8b94d4a37fd';
const entry = {
  ...EMPTY_NOTICE,
  issuerId: ISSUER,
  points: [
    { on: '2003-01-01', shift: '-4 µg' },
    { on: '2013-01-01', shift: '-35 µg' },
  ],
};

describe('noticeFrom', () => {
  it('reads a correction that grows with the day of calibration, in grams per kilogram', () => {
    const typed = { ...entry, quantity: 'mass', nominalFrom: '1 kg', nominalTo: '10 kg', addedU: '3 µg' };
    expect(noticeFrom(typed, '.').change).toEqual({
      kind: 'notice',
      issuerId: ISSUER,
      quantity: 'mass',
      nominalFrom: '1000',
      nominalTo: '10000',
      shiftPerKilogram: [
        { on: '2003-01-01', shift: '-0.000004' },
        { on: '2013-01-01', shift: '-0.000035' },
      ],
      addedUPerKilogram: 0.000003,
    });
  });

  it('takes a shift of zero without a unit: a notice may add uncertainty only', () => {
    const read = noticeFrom({ ...entry, points: [{ on: '2019-05-20', shift: '0' }], addedU: '10 µg' }, '.');
    expect(read.change).toMatchObject({
      shiftPerKilogram: [{ on: '2019-05-20', shift: '0' }],
      addedUPerKilogram: 0.00001,
    });
  });

  it.each([
    ['a shift without its unit', { points: [{ on: '2003-01-01', shift: '20' }] }, 'points.0.shift'],
    ['no day', { points: [{ on: '', shift: '1 mg' }] }, 'points.0.on'],
    ['a day that is none', { points: [{ on: '2003-13-01', shift: '1 mg' }] }, 'points.0.on'],
    ['a negative nominal', { nominalFrom: '-1 kg' }, 'nominalFrom'],
    [
      'days of calibration the wrong way round',
      { performedFrom: '2010-01-01', performedTo: '2000-01-01' },
      'performedFrom',
    ],
    ['days of shifts out of order', { points: [entry.points[1]!, entry.points[0]!] }, 'whole'],
  ])('says what is wrong with %s, at its field', (_, part, field) => {
    const read = noticeFrom({ ...entry, ...part }, '.');
    expect(read.change).toBeNull();
    expect(Object.keys(read.problems)).toEqual([field]);
  });
});

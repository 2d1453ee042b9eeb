import { describe, expect, it } from 'vitest';
import { broughtTo, shiftOn, type Coverable } from './brought-to.ts';
import type { Notice, NoticeTermFacts } from './notice.ts';

const term = (changes: Partial<NoticeTermFacts> = {}): NoticeTermFacts => ({
  quantity: null,
  performedFrom: null,
  performedTo: null,
  nominalFrom: null,
  nominalTo: null,
  addedU: 0,
  shifts: [{ on: '2000-01-01', shift: '0' }],
  ...changes,
});
const notice = (number: string, changes: Partial<Notice> = {}): Notice => ({
  id: number,
  number,
  title: number,
  issuerId: 'institute',
  fromScale: 'first',
  toScale: null,
  effectiveOn: '2020-01-01',
  madeKnownOn: '2019-12-01',
  recordedAt: '2019-12-01T09:00:00.000000Z',
  replacesId: null,
  terms: [term()],
  ...changes,
});
const kilogram: Coverable = {
  issuerId: 'institute',
  quantity: 'mass',
  nominal: '1000',
  performedEnd: '2010-07-02',
  scaleVersion: 'first',
};
const numbersOf = (value: Coverable, notices: Notice[]) =>
  broughtTo(value, notices).map((each) => each.notice.number);

describe('shiftOn', () => {
  const line = [
    { on: '2010-01-01', shift: '-0.000004' },
    { on: '2010-01-11', shift: '-0.000034' },
  ];
  it.each([
    ['2009-05-01', '-0.000004'],
    ['2010-01-01', '-0.000004'],
    ['2010-01-03', '-0.00001'],
    ['2010-01-11', '-0.000034'],
    ['2030-01-01', '-0.000034'],
  ])('on %s is %s', (day, shift) => {
    expect(shiftOn(line, day).toFixed()).toBe(shift);
  });
});

describe('broughtTo', () => {
  it('is in proportion to mass, exactly', () => {
    const shifts = [{ on: '2000-01-01', shift: '-0.000007' }];
    const [brought] = broughtTo({ ...kilogram, nominal: '0.05' }, [
      notice('1', { terms: [term({ shifts, addedU: 2e-5 })] }),
    ]);
    expect(brought!.shift.toFixed()).toBe('-0.00000000035');
    expect(brought!.addedU).toBeCloseTo(1e-9, 20);
  });

  it.each<[string, Partial<NoticeTermFacts>, boolean]>([
    ['its first day', { performedFrom: '2010-07-02' }, true],
    ['the day before', { performedTo: '2010-07-01' }, false],
    ['its nominal as the largest', { nominalTo: '1000.000' }, true],
    ['a larger nominal', { nominalFrom: '1000.1' }, false],
    ['the other quantity', { quantity: 'conventional mass' }, false],
  ])('asks for %s', (_, changes, isCovered) => {
    expect(numbersOf(kilogram, [notice('1', { terms: [term(changes)] })])).toHaveLength(isCovered ? 1 : 0);
  });

  it('covers values of its issuer on its scale version only', () => {
    expect(numbersOf({ ...kilogram, issuerId: 'another' }, [notice('1')])).toEqual([]);
    expect(numbersOf({ ...kilogram, scaleVersion: 'second' }, [notice('1')])).toEqual([]);
    expect(numbersOf({ ...kilogram, scaleVersion: null }, [notice('1')])).toEqual(['1']);
  });

  it('takes a value from scale to scale, one notice after the other', () => {
    const notices = [
      notice('1', { toScale: 'second' }),
      notice('2', { fromScale: 'second', toScale: 'third' }),
      notice('again', { toScale: 'second' }),
    ];
    expect(numbersOf(kilogram, notices)).toEqual(['1', '2']);
    expect(numbersOf({ ...kilogram, scaleVersion: 'second' }, notices)).toEqual(['2']);
    expect(numbersOf({ ...kilogram, scaleVersion: 'third' }, notices)).toEqual([]);
  });

  it('takes the first term that covers it, and no second', () => {
    const terms = [term({ addedU: 1e-6 }), term({ addedU: 2e-6 })];
    expect(broughtTo(kilogram, [notice('1', { terms })]).map((each) => each.addedU)).toEqual([1e-6]);
  });
});

import { describe, expect, it } from 'vitest';
import type { WhatIfGroup } from '#shared/contracts/downstream.ts';
import { groupName, inOrder } from './groups.ts';
import { ratioText, roundedText } from './rounded.ts';

const plain = (text: string) => text.replace(/\s/g, ' ');

describe('groupName', () => {
  it('names a decade of nominals by its ends, in the units they are engraved in', () => {
    expect(plain(groupName({ key: '3', laboratory: null }, 'nominal'))).toBe('1 kg to under 10 kg');
    expect(plain(groupName({ key: '-1', laboratory: null }, 'nominal'))).toBe('100 mg to under 1 g');
  });

  it('says what has no class and what is not told', () => {
    expect(groupName({ key: 'none', laboratory: null }, 'class')).toBe('No class stated');
    expect(groupName({ key: 'withheld', laboratory: null }, 'year')).toBe('Not told: weights of others');
  });
});

describe('inOrder', () => {
  const group = (key: string, rest: Partial<WhatIfGroup>): WhatIfGroup => ({
    key,
    laboratory: null,
    count: 1,
    warned: 0,
    words: { none: 0, material: 0, verdictChanges: 0 },
    largestShift: 0,
    largestRatio: 0,
    ...rest,
  });
  const groups = [
    group('a', { words: { none: 0, material: 9, verdictChanges: 0 }, largestShift: 3, largestRatio: null }),
    group('b', { words: { none: 0, material: 0, verdictChanges: 1 }, largestShift: 1, largestRatio: 2 }),
    group('c', { largestShift: null, largestRatio: 1 }),
  ];
  const keys = (sort: 'word' | 'shift' | 'ratio') => inOrder(groups, sort).map(({ key }) => key);

  it('puts a changed verdict before any number of material shifts', () => {
    expect(keys('word')).toEqual(['b', 'a', 'c']);
  });

  it('puts what cannot be computed first among shifts, and what is not told last among ratios', () => {
    expect(keys('shift')).toEqual(['c', 'a', 'b']);
    expect(keys('ratio')).toEqual(['b', 'c', 'a']);
  });
});

describe('a computed number in words', () => {
  it('keeps three significant digits and no noise of binary fractions', () => {
    expect(roundedText(0.1 + 0.2)).toBe('0.3');
    expect(roundedText(0.000123456)).toBe('0.000123');
  });

  it('never shows a ratio that is not zero as zero', () => {
    expect(plain(ratioText(0.001))).toBe('below 0.01');
    expect(ratioText(-0.131, { isSigned: true })).toBe('−0.13');
  });
});

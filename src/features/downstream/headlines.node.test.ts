import { describe, expect, it } from 'vitest';
import { leaningHeadline, whatIfHeadline } from './headlines.ts';

describe('leaningHeadline', () => {
  it('counts values apart from the weights of others', () => {
    expect(leaningHeadline({ count: 15, warned: 9 })).toBe('6 values and 9 weights of others lean on it');
    expect(leaningHeadline({ count: 1, warned: 0 })).toBe('1 value leans on it');
    expect(leaningHeadline({ count: 0, warned: 0 })).toBe('Nothing leans on it');
  });
});

describe('whatIfHeadline', () => {
  const total = (verdictChanges: number, material: number) => ({
    count: 15,
    warned: 9,
    words: { none: 15 - verdictChanges - material, material, verdictChanges },
  });

  it('says the worst that would follow', () => {
    expect(whatIfHeadline(total(1, 7))).toBe('The verdict would change for 1 of 15');
    expect(whatIfHeadline(total(0, 7))).toBe('It would be material for 7 of 15');
    expect(whatIfHeadline(total(0, 0))).toBe('It would be material for none of 15');
  });
});

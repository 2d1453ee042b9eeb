import { describe, expect, it } from 'vitest';
import { chainDegreesOfFreedom } from './degrees-of-freedom.ts';

describe('chainDegreesOfFreedom', () => {
  it('follows the formula of Welch and Satterthwaite, truncated', () => {
    // (0.04 + 0.01)^2 / (0.04^2 / 5 + 0.01^2 / 8) = 7.52
    const terms = [{ variance: 0.04, degreesOfFreedom: 5 }, { variance: 0.01, degreesOfFreedom: 8 }]; // prettier-ignore
    expect(chainDegreesOfFreedom(terms)).toBe(7);
    expect(chainDegreesOfFreedom(terms.map((term) => ({ ...term, variance: term.variance * 1e6 })))).toBe(7);
  });

  it('adds what rests on one estimate before squaring, and takes the smaller number where two are stated', () => {
    const estimate = 'balance';
    const once = { variance: 0.05, degreesOfFreedom: 6, estimate };
    // All of the variance rests on the one estimate, wherever it enters.
    expect(chainDegreesOfFreedom([once, once, once])).toBe(6);
    expect(chainDegreesOfFreedom([once, { ...once, degreesOfFreedom: 4 }])).toBe(4);
    // (0.1 + 0.3)^2 / (0.1^2 / 6) = 96, and not 192 of two estimates.
    expect(chainDegreesOfFreedom([once, once, { variance: 0.3, degreesOfFreedom: Infinity }])).toBe(96);
  });

  it('an exact integer is not lost to rounding, and nothing finite is infinite', () => {
    expect(chainDegreesOfFreedom([1, 2, 3].map(() => ({ variance: 0.1, degreesOfFreedom: 3 })))).toBe(9);
    expect(chainDegreesOfFreedom([{ variance: 1, degreesOfFreedom: Infinity }])).toBe(Infinity);
    expect(chainDegreesOfFreedom([])).toBe(Infinity);
    expect(chainDegreesOfFreedom([{ variance: 0, degreesOfFreedom: 3 }])).toBe(Infinity);
  });
});

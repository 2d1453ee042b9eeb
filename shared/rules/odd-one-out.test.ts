import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { historyFacts } from './example-facts.ts';
import { isOddOne, isSwapVisible, signLikeness, unitLikeness, type Likeness } from './odd-one-out.ts';

const result = (deviation: string, expandedU: string | null = '0.0003') =>
  historyFacts({ deviation, expandedU });

describe('isOddOne', () => {
  it('needs more contradictions than agreements, and two where nothing was there before', () => {
    expect(isOddOne(['contradicts'], [])).toBe(true);
    expect(isOddOne(['contradicts', 'agrees'], [])).toBe(false);
    expect(isOddOne([], ['contradicts'])).toBe(false);
    expect(isOddOne([], ['contradicts', 'contradicts'])).toBe(true);
    expect(isOddOne([], [])).toBe(false);
  });

  it('never finds more than one odd value among three of which two agree', () => {
    // Places of the three in time; the odd one contradicts both, the others agree with each other.
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 2 }), (odd) => {
        const found = [0, 1, 2].filter((place) => {
          const likeness = (other: number): Likeness =>
            place === odd || other === odd ? 'contradicts' : 'agrees';
          const earlier = [0, 1, 2].filter((other) => other < place).map(likeness);
          return isOddOne(earlier, [0, 1, 2].filter((other) => other > place).map(likeness));
        });
        expect(found).toEqual([odd]);
      }),
    );
  });
});

describe('likeness', () => {
  it('is open without U', () => {
    expect(signLikeness(result('0.0006', null), result('-0.0006'))).toBe('undecided');
    expect(unitLikeness(result('0.6', null), result('0.0006'))).toBe('undecided');
    expect(isSwapVisible(result('0.0006', null), result('-0.0006'))).toBeNull();
  });

  it('of units is open where only U jumps, or by another factor', () => {
    expect(unitLikeness(result('0.0006', '0.3'), result('0.0006'))).toBe('undecided');
    expect(unitLikeness(result('0.06', '0.03'), result('0.0006'))).toBe('undecided');
    expect(unitLikeness(result('0.0006', '0.0000003'), result('0.0006'))).toBe('undecided');
  });

  it('of units sees a factor of 1000 from both sides', () => {
    const size = fc.integer({ min: 300, max: 5000 });
    fc.assert(
      fc.property(size, fc.boolean(), (micrograms, isNegative) => {
        const text = (scale: number) => ((isNegative ? -1 : 1) * micrograms * scale).toFixed(12);
        const [usual, slipped] = [result(text(1e-6)), result(text(1e-3), '0.3')];
        expect(unitLikeness(slipped, usual)).toBe('contradicts');
        expect(unitLikeness(usual, slipped)).toBe('contradicts');
        expect(unitLikeness(usual, usual)).toBe('agrees');
      }),
    );
  });
});

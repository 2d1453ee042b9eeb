import { describe, expect, it } from 'vitest';
import { inferLocal } from './infer-local.ts';

const infer = (expandedUncertainty: string, coverageFactor: number, carried: number) =>
  inferLocal({ expandedUncertainty, coverageFactor, carriedVariance: carried ** 2 });

describe('inferLocal', () => {
  it('takes the carried variance off the stated one', () => {
    const { local, verdict } = infer('0.10', 2, 0.03);
    expect(verdict).toBe('holds');
    expect(local).toBeCloseTo(0.04, 15);
  });

  it('tells nothing within rounding: U = 0.10 stands for 0.095 to 0.105', () => {
    expect(infer('0.10', 2, 0.0474).verdict).toBe('holds');
    expect(infer('0.10', 2, 0.0476)).toEqual({ local: 0, verdict: 'within rounding' });
    expect(infer('0.10', 2, 0.0524)).toEqual({ local: 0, verdict: 'within rounding' });
    expect(infer('0.10', 2, 0.0526)).toEqual({ local: 0, verdict: 'deficit' });
  });

  it('reads the last digit from the text: 0.1 is rounded more than 0.100', () => {
    expect(infer('0.1', 2, 0.07).verdict).toBe('within rounding');
    expect(infer('0.100', 2, 0.051).verdict).toBe('deficit');
    expect(infer('60', 2, 30.2).verdict).toBe('within rounding');
    expect(infer('60', 2, 30.3).verdict).toBe('deficit');
  });

  it('finds no deficit in an uncertainty of zero that carries nothing', () => {
    expect(infer('0', 2, 0)).toEqual({ local: 0, verdict: 'within rounding' });
  });

  it.each([
    ['1e-3', 2, 0, 'not-a-number', 'expandedUncertainty'],
    ['-1', 2, 0, 'not-a-number', 'expandedUncertainty'],
    ['0.1', 0, 0, 'out-of-range', 'coverageFactor'],
    ['0.1', Infinity, 0, 'not-finite', 'coverageFactor'],
    ['0.1', 2, -1, 'out-of-range', 'carriedVariance'],
  ])(
    'refuses U = %s, k = %d, carried variance %d',
    (expandedUncertainty, coverageFactor, carriedVariance, code, field) => {
      expect(() => inferLocal({ expandedUncertainty, coverageFactor, carriedVariance })).toThrow(
        expect.objectContaining({ code, field }),
      );
    },
  );
});

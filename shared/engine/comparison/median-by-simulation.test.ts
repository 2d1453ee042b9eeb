import { describe, expect, it } from 'vitest';
import { PROCEDURE_B_SETS } from './check-data/procedure-b-sets.ts';
import { degreesOfEquivalence } from './degrees-of-equivalence.ts';
import { referenceValue } from './reference-value.ts';

const DRAWS = 40_000;

describe('procedure B: the median by simulation', () => {
  it.each(PROCEDURE_B_SETS.map((set) => [set.id, set] as const))(
    '%s within its own sampling error',
    (_, set) => {
      const found = referenceValue(set, 'median', { draws: DRAWS, seed: 7 });
      const error = set.u / Math.sqrt(DRAWS);
      expect(Math.abs(found.value - set.value)).toBeLessThan(4 * error);
      expect(Math.abs(found.standardUncertainty / set.u - 1)).toBeLessThan(5 / Math.sqrt(2 * DRAWS));
      const width = (ends: number[]) => ends[1]! - ends[0]!;
      expect(width(found.interval!)).toBeLessThan(width(set.symmetric) * 1.02);
      for (const [end, expected] of (set.shortest ?? []).entries()) {
        expect(Math.abs(found.interval![end]! - expected)).toBeLessThan(0.25 * set.u);
      }
      const degrees = degreesOfEquivalence(set, found);
      set.differences?.forEach((expected, i) => {
        const u = degrees[i]!.expandedUncertainty / 2;
        expect(Math.abs(degrees[i]!.difference - expected.difference)).toBeLessThan(4 * error);
        expect(Math.abs(degrees[i]!.interval![0]! - expected.interval[0]!)).toBeLessThan(0.06 * u);
        expect(Math.abs(degrees[i]!.interval![1]! - expected.interval[1]!)).toBeLessThan(0.06 * u);
        expect(Math.abs(found.coefficients[i]! - expected.atom)).toBeLessThan(4 * Math.sqrt(0.25 / DRAWS));
      });
    },
  );

  it('is repeatable by its seed and moves within sampling error with another', () => {
    const set = PROCEDURE_B_SETS[0]!;
    const draw = (seed: number) => referenceValue(set, 'median', { draws: 5000, seed }).value;
    expect(draw(3)).toBe(draw(3));
    expect(draw(3)).not.toBe(draw(4));
  });

  it('draws correlated results together: perfectly shared scatter widens the median as it stands', () => {
    const covariance = [0, 1, 2].map((i) => [0, 1, 2].map((j) => (i === j ? 1.01 : 1)));
    const found = referenceValue({ values: [0, 0, 0], covariance }, 'median', { draws: 20_000, seed: 5 });
    expect(found.standardUncertainty).toBeGreaterThan(0.97);
    expect(found.standardUncertainty).toBeLessThan(1.04);
    expect(
      degreesOfEquivalence({ values: [0, 0, 0], covariance }, found)[0]!.expandedUncertainty,
    ).toBeLessThan(0.3);
  });

  it('leaves results that do not count out of the median, but gives their difference', () => {
    const results = { values: [0, 1, 100], uncertainties: [1, 1, 2], counts: [true, true, false] };
    const found = referenceValue(results, 'median', { draws: 20_000 });
    expect(found.coefficients[2]).toBe(0);
    expect(found.value).toBeCloseTo(0.5, 1);
    const outsider = degreesOfEquivalence(results, found)[2]!;
    expect(outsider.expandedUncertainty / 2).toBeCloseTo(Math.sqrt(4 + 0.5), 1);
  });

  it('gives the shortest interval: -0.20 to 7.45 for a skewed median, where equal tails are -0.06 to 8.11', () => {
    // Ends from the exact distribution p1 p2 + p1 p3 + p2 p3 - 2 p1 p2 p3, searched numerically.
    const results = { values: [0, 5, 5.2], uncertainties: [0.1, 3, 3] };
    const [low, high] = referenceValue(results, 'median', { draws: 40_000 }).interval!;
    expect(low).toBeLessThan(-0.1);
    expect(high).toBeLessThan(7.8);
  });

  it('refuses too few draws', () => {
    const results = { values: [0, 1], uncertainties: [1, 1] };
    for (const [draws, code] of [
      [999, 'out-of-range'],
      [1000.5, 'not-whole'],
    ] as const) {
      expect(() => referenceValue(results, 'median', { draws })).toThrow(
        expect.objectContaining({ code, field: 'draws' }),
      );
    }
  });
});

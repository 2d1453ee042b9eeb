import { describe, expect, it } from 'vitest';
import { advance, COMPONENTS, randomSource } from './random.ts';

describe('randomSource', () => {
  it('has the constants of a full-period generator: modulus = multiplier * quotient + remainder', () => {
    // JCGM 101:2008, annex C.3.2, from memory; the identity would not survive a wrong digit.
    for (const { multiplier, modulus, quotient, remainder } of COMPONENTS) {
      expect(multiplier * quotient + remainder).toBe(modulus);
      expect(remainder).toBeLessThan(quotient);
    }
  });

  it('advances as the recurrence says, held against whole numbers of any length', () => {
    for (const component of COMPONENTS) {
      for (const state of [1, 2, 123_456_789, component.quotient, component.modulus - 1]) {
        const expected = (BigInt(component.multiplier) * BigInt(state)) % BigInt(component.modulus);
        expect(advance(component, state)).toBe(Number(expected));
      }
    }
  });

  it('gives the same numbers for the same seed', () => {
    const five = (seed: number) => {
      const source = randomSource(seed);
      return Array.from({ length: 5 }, () => source.uniform());
    };
    expect(new Set(five(42)).size).toBe(5);
    expect(five(42)).toEqual(five(42));
    expect(five(42)).not.toEqual(five(43));
  });

  it('neighbouring seeds and large seeds start apart', () => {
    const seeds = [0, 1, 2, 3, 2 ** 32, 2 ** 32 + 1, 2 ** 52];
    const first = seeds.map((seed) => randomSource(seed).uniform());
    expect(new Set(first).size).toBe(seeds.length);
  });

  it('fills 100 classes evenly and never gives an end', () => {
    const source = randomSource(2);
    const counts = new Array<number>(100).fill(0);
    let outside = 0;
    for (let i = 0; i < 200_000; i += 1) {
      const u = source.uniform();
      if (u <= 0 || u >= 1) outside += 1;
      const index = Math.floor(u * 100);
      counts[index] = (counts[index] ?? 0) + 1;
    }
    expect(outside).toBe(0);
    const chiSquared = counts.reduce((sum, count) => sum + (count - 2000) ** 2 / 2000, 0);
    // 99 degrees of freedom: mean 99, standard deviation 14.
    expect(chiSquared).toBeGreaterThan(50);
    expect(chiSquared).toBeLessThan(160);
  });

  it('neighbouring numbers do not correlate', () => {
    const source = randomSource(9);
    let before = source.uniform();
    let sum = 0;
    for (let i = 0; i < 100_000; i += 1) {
      const next = source.uniform();
      sum += (before - 0.5) * (next - 0.5);
      before = next;
    }
    // Standard deviation of the coefficient is 1/sqrt(n); four of them.
    expect(Math.abs((12 * sum) / 100_000)).toBeLessThan(4 / Math.sqrt(100_000));
  });

  it('gives normal numbers with the right first four moments', () => {
    const source = randomSource(4);
    const n = 200_000;
    const moments = [0, 0, 0, 0];
    for (let i = 0; i < n; i += 1) {
      const z = source.normal();
      [1, 2, 3, 4].forEach((power, k) => {
        moments[k] = (moments[k] ?? 0) + z ** power / n;
      });
    }
    // Standard deviations of the sample moments: 1, 1.41, 3.87 and 9.8 over sqrt(n); four of each.
    [0, 1, 0, 3].forEach((expected, k) => {
      const deviation = [1, Math.SQRT2, Math.sqrt(15), Math.sqrt(96)][k] ?? NaN;
      expect(Math.abs((moments[k] ?? NaN) - expected)).toBeLessThan((4 * deviation) / Math.sqrt(n));
    });
  });
});

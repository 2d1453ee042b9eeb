import { describe, expect, it } from 'vitest';
import { sensitivityFromWeight, type SensitivityWeighing } from './sensitivity-weight.ts';

const weighing: SensitivityWeighing = {
  readingWithout: 100,
  readingWith: 110,
  mass: 10,
  massUncertainty: 0.001,
  density: 8000,
  airDensity: 1.2,
  readingUncertainty: 0.002,
};

describe('sensitivityFromWeight', () => {
  it('takes the buoyancy of the weight off its mass', () => {
    const { sensitivity, standardUncertainty } = sensitivityFromWeight(weighing);
    expect(sensitivity).toBeCloseTo(0.99985, 12);
    expect(standardUncertainty).toBeCloseTo(0.99985 * Math.hypot(0.0001, 0.0002), 12);
  });

  it('is 1 in vacuum for readings in mg, and keeps the sign of a comparator that counts down', () => {
    expect(sensitivityFromWeight({ ...weighing, airDensity: 0 }).sensitivity).toBe(1);
    const down = sensitivityFromWeight({ ...weighing, airDensity: 0, readingWith: 90 });
    expect(down.sensitivity).toBe(-1);
    expect(down.standardUncertainty).toBeGreaterThan(0);
  });

  it.each<[Partial<SensitivityWeighing>, string, string]>([
    [{ readingWith: 100 }, 'no-response', 'readingWith'],
    [{ readingWith: Number.NaN }, 'not-finite', 'readingWith'],
    [{ readingWithout: Number.POSITIVE_INFINITY }, 'not-finite', 'readingWithout'],
    [{ mass: 0 }, 'out-of-range', 'mass'],
    [{ density: 0 }, 'out-of-range', 'density'],
    [{ massUncertainty: -1 }, 'out-of-range', 'massUncertainty'],
    [{ readingUncertainty: -1 }, 'out-of-range', 'readingUncertainty'],
    [{ airDensity: 8000 }, 'out-of-range', 'density'],
  ])('refuses %o', (change, code, field) => {
    expect(() => sensitivityFromWeight({ ...weighing, ...change })).toThrow(
      expect.objectContaining({ code, field }),
    );
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { entry, item } from '../linear/entries.ts';
import { isPositiveSemidefinite, multiplyVector, quadraticForm } from '../linear/matrix.ts';
import type { WeighingDesignInput } from './design-input.ts';
import { studentCriticalValue } from './f-distribution.ts';
import { solveWeighingDesign } from './weighing-design.ts';
import { type PublishedDesign, weighingDesigns } from './weighing-designs.ts';

function preset(name: string): PublishedDesign {
  const found = weighingDesigns[name];
  if (!found) throw new Error(`no preset ${name}`);
  return found;
}

/** Seeded uniform numbers for the simulations: a 32-bit xorshift, good enough for a thousandth. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return (state >>> 0) / 4294967296;
  };
}

function normal(uniform: () => number): number {
  return Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
}

const number = fc.integer({ min: -1000, max: 1000 }).map((n) => n / 100);
const names = Object.keys(weighingDesigns);

/** A published design with arbitrary differences, restraint and standard deviations. */
const anyDesign = fc.constantFrom(...names).chain((name) => {
  const { design, restraint } = preset(name);
  return fc
    .tuple(
      fc.array(number, { minLength: design.length, maxLength: design.length }),
      number,
      fc.integer({ min: 0, max: 9 }),
      fc.integer({ min: 0, max: 9 }),
    )
    .map(
      ([differences, value, u, between]): WeighingDesignInput & {
        restraint: { weights: number[]; value: number };
      } => ({
        design,
        differences,
        restraint: { weights: restraint, value, standardUncertainty: u },
        betweenStandardDeviation: between,
      }),
    );
});

describe('solveWeighingDesign: properties', () => {
  it('gives back the weights from exact differences', () => {
    fc.assert(
      fc.property(anyDesign, fc.array(number, { minLength: 7, maxLength: 7 }), (input, truth) => {
        const weights = truth.slice(0, item(input.design, 0).length);
        const value = input.restraint.weights.reduce((sum, r, j) => sum + r * item(weights, j), 0);
        const result = solveWeighingDesign({
          ...input,
          differences: multiplyVector(input.design, weights),
          restraint: { weights: input.restraint.weights, value },
        });
        result.estimates.forEach((estimate, j) => expect(estimate).toBeCloseTo(item(weights, j), 9));
        expect(result.residualStandardDeviation).toBeCloseTo(0, 9);
      }),
    );
  });

  it('meets the restraint exactly and gives it no local variance', () => {
    fc.assert(
      fc.property(anyDesign, (input) => {
        const result = solveWeighingDesign(input);
        const { weights, value, standardUncertainty } = input.restraint as {
          weights: number[];
          value: number;
          standardUncertainty: number;
        };
        expect(weights.reduce((sum, r, j) => sum + r * item(result.estimates, j), 0)).toBeCloseTo(value, 9);
        expect(quadraticForm(result.designCovariance, weights)).toBeCloseTo(0, 9);
        expect(quadraticForm(result.covariance, weights)).toBeCloseTo(standardUncertainty ** 2, 8);
      }),
    );
  });

  it('gives covariance matrices that are ones, the full one never smaller', () => {
    fc.assert(
      fc.property(anyDesign, (input) => {
        const { covariance, designCovariance } = solveWeighingDesign(input);
        expect(isPositiveSemidefinite(covariance).ok).toBe(true);
        expect(isPositiveSemidefinite(designCovariance).ok).toBe(true);
        designCovariance.forEach((row, i) =>
          expect(entry(covariance, i, i)).toBeGreaterThanOrEqual(item(row, i) * (1 - 1e-12)),
        );
      }),
    );
  });

  it('is linear: the sensitivities rebuild the estimates', () => {
    fc.assert(
      fc.property(anyDesign, (input) => {
        const result = solveWeighingDesign(input);
        const fromDifferences = multiplyVector(result.sensitivityToObservations, input.differences);
        const fromRestraint = multiplyVector(result.sensitivityToRestraints, [input.restraint.value]);
        result.estimates.forEach((estimate, j) =>
          expect(estimate).toBeCloseTo(item(fromDifferences, j) + item(fromRestraint, j), 9),
        );
      }),
    );
  });

  it('does not depend on the order of weighings and of weights', () => {
    fc.assert(
      fc.property(anyDesign, (input) => {
        const turned = solveWeighingDesign({
          ...input,
          design: [...input.design].reverse().map((row) => [...row].reverse()),
          differences: [...input.differences].reverse(),
          restraint: { ...input.restraint, weights: [...input.restraint.weights].reverse() },
        });
        const result = solveWeighingDesign(input);
        const last = result.estimates.length - 1;
        result.estimates.forEach((estimate, j) => {
          expect(item(turned.estimates, last - j)).toBeCloseTo(estimate, 8);
          expect(entry(turned.covariance, last - j, last)).toBeCloseTo(entry(result.covariance, j, 0), 7);
        });
      }),
    );
  });

  it('changes its results with the unit and nothing else', () => {
    fc.assert(
      fc.property(anyDesign, (input) => {
        const result = solveWeighingDesign(input);
        const unit = 1e-6;
        const scaled = solveWeighingDesign({
          ...input,
          differences: input.differences.map((value) => value * unit),
          restraint: { ...input.restraint, value: input.restraint.value * unit, standardUncertainty: 0 },
          betweenStandardDeviation: (input.betweenStandardDeviation ?? 0) * unit,
        });
        result.estimates.forEach((estimate, j) => {
          expect(item(scaled.estimates, j) / unit).toBeCloseTo(estimate, 8);
          expect(entry(scaled.designCovariance, j, j) / unit ** 2).toBeCloseTo(
            entry(result.designCovariance, j, j),
            7,
          );
          expect(item(scaled.factors, j)).toBeCloseTo(item(result.factors, j), 12);
        });
      }),
    );
  });
});

describe('solveWeighingDesign: coverage', () => {
  it('covers six values that share one pooled standard deviation in 95 % of seeded runs, within 1 %', () => {
    const { design, restraint } = preset('5-3-2-1-1-1');
    const truth = [0.4, -0.2, 0.1, 0.05, -0.3, 0.2];
    const restrained = restraint.reduce((sum, r, j) => sum + r * item(truth, j), 0);
    const exact = multiplyVector(design, truth);
    const draw = seeded(20190520);
    const trials = 6000;
    const hits = truth.map(() => 0);
    let hitsOfSum = 0;
    const k = studentCriticalValue(0.05, 6);
    for (let trial = 0; trial < trials; trial += 1) {
      const differences = exact.map((value) => value + 0.02 * normal(draw));
      const input = { weights: restraint, value: restrained };
      const { estimates, covariance, degreesOfFreedom } = solveWeighingDesign({
        design,
        differences,
        restraint: input,
      });
      expect(degreesOfFreedom).toBe(6);
      truth.forEach((value, j) => {
        if (Math.abs(item(estimates, j) - value) <= k * Math.sqrt(entry(covariance, j, j)))
          hits[j] = item(hits, j) + 1;
      });
      // All six together: one pooled standard deviation counts once, with its 6 degrees of freedom.
      const ones = truth.map(() => 1);
      const error = estimates.reduce((sum, estimate, j) => sum + estimate - item(truth, j), 0);
      if (Math.abs(error) <= k * Math.sqrt(quadraticForm(covariance, ones))) hitsOfSum += 1;
    }
    for (const count of [...hits, hitsOfSum]) expect(Math.abs(count / trials - 0.95)).toBeLessThan(0.01);
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { entry, item } from '../linear/entries.ts';
import { isPositiveSemidefinite, multiplyVector, quadraticForm } from '../linear/matrix.ts';
import { coverageFactor } from '../uncertainty/coverage-factor.ts';
import { randomSource } from '../uncertainty/random.ts';
import type { WeighingDesignInput } from './design-input.ts';
import { designFactors, solveWeighingDesign } from './weighing-design.ts';
import { type PublishedDesign, weighingDesigns } from './weighing-designs.ts';

function preset(name: string): PublishedDesign {
  const found = weighingDesigns[name];
  if (!found) throw new Error(`no preset ${name}`);
  return found;
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
  const { design, restraint } = preset('5-3-2-1-1-1');
  const truth = [0.4, -0.2, 0.1, 0.05, -0.3, 0.2];
  const exact = multiplyVector(design, truth);
  const value = restraint.reduce((sum, r, j) => sum + r * item(truth, j), 0);
  const solveFor = (differences: number[]) =>
    solveWeighingDesign({ design, differences, restraint: { weights: restraint, value } });
  // The solution is linear, so its sensitivities serve for most runs and the solver itself for every hundredth.
  const { sensitivityToObservations, sensitivityToRestraints, factors } = solveFor(exact);
  const ones = truth.map(() => 1);
  const factorOfSum = designFactors(design, restraint, ones).within;

  function quickly(differences: number[]): { estimates: number[]; s: number } {
    const moved = multiplyVector(sensitivityToObservations, differences);
    const estimates = moved.map((part, j) => part + value * item(item(sensitivityToRestraints, j), 0));
    const squares = multiplyVector(design, estimates).reduce(
      (sum, adjusted, i) => sum + (item(differences, i) - adjusted) ** 2,
      0,
    );
    return { estimates, s: Math.sqrt(squares / 6) };
  }

  it(
    'covers six values that share one pooled standard deviation in 95 % of seeded runs, within 1 %',
    { timeout: 30_000 },
    () => {
      const draw = randomSource(20190520);
      const k = coverageFactor(0.95, 6);
      const trials = 20_000;
      const hits = [...truth, 0].map(() => 0);
      for (let trial = 0; trial < trials; trial += 1) {
        const differences = exact.map((difference) => difference + 0.02 * draw.normal());
        const { estimates, s } = quickly(differences);
        if (trial % 100 === 0) {
          const solved = solveFor(differences);
          expect(solved.residualStandardDeviation).toBeCloseTo(s, 12);
          expect(solved.degreesOfFreedom).toBe(6);
          solved.estimates.forEach((estimate, j) => {
            expect(estimate).toBeCloseTo(item(estimates, j), 12);
            expect(Math.sqrt(entry(solved.covariance, j, j))).toBeCloseTo(item(factors, j) * s, 12);
          });
        }
        const errors = estimates.map((estimate, j) => estimate - item(truth, j));
        // All six together: one pooled standard deviation counts once, with its 6 degrees of freedom.
        errors.push(errors.reduce((sum, error) => sum + error, 0));
        errors.forEach((error, j) => {
          if (Math.abs(error) <= k * s * item([...factors, factorOfSum], j)) hits[j] = item(hits, j) + 1;
        });
      }
      for (const count of hits) expect(Math.abs(count / trials - 0.95)).toBeLessThan(0.01);
    },
  );
});

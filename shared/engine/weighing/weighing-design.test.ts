import { describe, expect, it } from 'vitest';
import { entry, item } from '../linear/entries.ts';
import { quadraticForm } from '../linear/matrix.ts';
import type { WeighingDesignInput } from './design-input.ts';
import { designFactors, solveWeighingDesign } from './weighing-design.ts';
import { type PublishedDesign, weighingDesigns } from './weighing-designs.ts';

function preset(name: string): PublishedDesign {
  const found = weighingDesigns[name];
  if (!found) throw new Error(`no preset ${name}`);
  return found;
}

describe('solveWeighingDesign: worked by hand', () => {
  const three = preset('1-1-1');

  it('HB-111: takes the standard deviation from the closure error, root of a third of its square', () => {
    // Note of the design 1-1-1: closure c = a - b + c, s = |c| / sqrt(3), 1 degree of freedom.
    const result = solveWeighingDesign({
      design: three.design,
      differences: [0.3, 0.5, 0.5],
      restraint: { weights: [1, 0, 0], value: 2 },
    });
    expect(result.residualStandardDeviation).toBeCloseTo(0.3 / Math.sqrt(3), 12);
    expect(result.degreesOfFreedom).toBe(1);
    result.residuals.forEach((residual, i) => expect(residual).toBeCloseTo(item([0.1, -0.1, 0.1], i), 12));
    [2, 1.8, 1.4].forEach((expected, j) => expect(item(result.estimates, j)).toBeCloseTo(expected, 12));
  });

  it('weights observations by their covariance', () => {
    // Twice B against A, variances 1 and 4: weights 4/5 and 1/5, variance 4/5.
    const result = solveWeighingDesign({
      design: [[-1, 1], [-1, 1]], // prettier-ignore
      differences: [1, 2],
      restraint: { weights: [1, 0], value: 10, standardUncertainty: 0.5 },
      observationCovariance: [[1, 0], [0, 4]], // prettier-ignore
    });
    expect(result.estimates[1]).toBeCloseTo(11.2, 12);
    expect(entry(result.designCovariance, 1, 1)).toBeCloseTo(0.8, 12);
    expect(entry(result.covariance, 1, 1)).toBeCloseTo(1.05, 12);
    expect(entry(result.covariance, 0, 1)).toBeCloseTo(0.25, 12);
    // Weighted squares 0.04 + 0.64 / 4 = 0.2, typical variance 1.6, 1 degree of freedom.
    expect(result.residualStandardDeviation).toBeCloseTo(Math.sqrt(0.32), 12);
    expect(result.factors[1]).toBeCloseTo(Math.sqrt(0.5), 12);
  });

  it('gives with a covariance s2 I what it gives with a standard deviation s', () => {
    const { design, restraint } = preset('5-3-2-1-1-1');
    const differences = design.map((_, i) => Math.sin(i));
    const common = { design, differences, restraint: { weights: restraint, value: 1 } };
    const pooled = solveWeighingDesign({ ...common, withinStandardDeviation: 0.3 });
    const given = solveWeighingDesign({
      ...common,
      observationCovariance: design.map((_, i) => design.map((__, j) => (i === j ? 0.09 : 0))),
    });
    expect(given.residualStandardDeviation).toBeCloseTo(pooled.residualStandardDeviation, 12);
    pooled.estimates.forEach((estimate, j) => {
      expect(item(given.estimates, j)).toBeCloseTo(estimate, 12);
      expect(item(given.factors, j)).toBeCloseTo(item(pooled.factors, j), 12);
      expect(entry(given.covariance, j, j)).toBeCloseTo(entry(pooled.covariance, j, j), 12);
    });
  });

  it('uses a correlation between observations', () => {
    // Two differences that share all their error tell nothing more than one: variance 1, not 1/2.
    const result = solveWeighingDesign({
      design: [[-1, 1], [-1, 1]], // prettier-ignore
      differences: [1, 1],
      restraint: { weights: [1, 0], value: 0 },
      observationCovariance: [[1, 0.999999], [0.999999, 1]], // prettier-ignore
    });
    expect(entry(result.designCovariance, 1, 1)).toBeCloseTo(1, 5);
  });

  it('carries several restraints with their covariance', () => {
    // C hangs between A and B: its estimate is the mean of the two ways.
    const result = solveWeighingDesign({
      design: [[-1, 0, 1], [0, -1, 1]], // prettier-ignore
      differences: [1, 3],
      restraints: [
        { weights: [1, 0, 0], value: 10 },
        { weights: [0, 1, 0], value: 20 },
      ],
      restraintCovariance: [[4, 1], [1, 2]], // prettier-ignore
      withinStandardDeviation: 0,
    });
    expect(result.estimates).toEqual([
      expect.closeTo(10, 12),
      expect.closeTo(20, 12),
      expect.closeTo(17, 12),
    ]);
    expect(result.degreesOfFreedom).toBe(1);
    expect(item(result.sensitivityToRestraints, 2)).toEqual([
      expect.closeTo(0.5, 12),
      expect.closeTo(0.5, 12),
    ]);
    expect(entry(result.covariance, 2, 2)).toBeCloseTo((4 + 2 + 2 * 1) / 4, 12);
    expect(entry(result.covariance, 0, 1)).toBeCloseTo(1, 12);
    expect(quadraticForm(result.designCovariance, [1, 1, 0])).toBeCloseTo(0, 12);
  });

  it('takes standard uncertainties of several restraints as uncorrelated without a covariance', () => {
    const result = solveWeighingDesign({
      design: [[-1, 0, 1], [0, -1, 1]], // prettier-ignore
      differences: [0, 0],
      restraints: [
        { weights: [1, 0, 0], value: 0, standardUncertainty: 3 },
        { weights: [0, 1, 0], value: 0, standardUncertainty: 4 },
      ],
      withinStandardDeviation: 0,
    });
    expect(entry(result.covariance, 2, 2)).toBeCloseTo(25 / 4, 12);
    expect(entry(result.covariance, 0, 1)).toBeCloseTo(0, 12);
  });

  it('serves the simplest calibration: one difference and a pooled standard deviation', () => {
    const result = solveWeighingDesign({
      design: [[-1, 1]],
      differences: [0.4],
      restraint: { weights: [1, 0], value: 0.1, standardUncertainty: 0.03 },
      withinStandardDeviation: 0.04,
    });
    expect(result).toMatchObject({ degreesOfFreedom: 0, residualStandardDeviation: 0 });
    expect(result.estimates[1]).toBeCloseTo(0.5, 12);
    expect(Math.sqrt(entry(result.covariance, 1, 1))).toBeCloseTo(0.05, 12);
    expect(Math.sqrt(entry(result.designCovariance, 1, 1))).toBeCloseTo(0.04, 12);
  });
});

describe('solveWeighingDesign: refusals', () => {
  const plain: WeighingDesignInput = {
    design: [[1, -1, 0], [1, 0, -1], [0, 1, -1]], // prettier-ignore
    differences: [1, 2, 3],
    restraint: { weights: [1, 0, 0], value: 0 },
  };
  const twoRestraints = [
    { weights: [1, 0, 0], value: 0 },
    { weights: [0, 1, 0], value: 0 },
  ];

  it('names the weights that nothing connects', () => {
    const design = [[1, -1, 0, 0], [-1, 1, 0, 0], [0, 0, 1, -1]]; // prettier-ignore
    const restraint = { weights: [1, 0, 0, 0], value: 0 };
    const run = (labels?: string[]) => () =>
      solveWeighingDesign({ design, differences: [1, 2, 3], restraint, names: labels });
    expect(run()).toThrow(
      expect.objectContaining({
        code: 'not-determined',
        field: 'design',
        message: expect.stringContaining('weight 3, weight 4'),
      }),
    );
    expect(run(['A', 'B', '20 g', '20 g dot'])).toThrow(/leave 20 g, 20 g dot open/);
    expect(() => solveWeighingDesign({ ...plain, restraint: { weights: [1, -1, 0], value: 0 } })).toThrow(
      /weight 1, weight 2, weight 3/,
    );
  });

  it.each<[string, Partial<WeighingDesignInput>, string, string]>([
    ['no restraint', { restraint: undefined }, 'no-restraint', 'restraint'],
    ['an empty list of restraints', { restraint: undefined, restraints: [] }, 'no-restraint', 'restraint'],
    ['both kinds of restraint', { restraints: twoRestraints }, 'two-restraints', 'restraint'],
    [
      'a restraint said twice',
      { restraint: undefined, restraints: [item(twoRestraints, 0), { weights: [2, 0, 0], value: 1 }] },
      'dependent-restraints',
      'restraints',
    ],
    [
      'a restraint of zeros',
      { restraint: { weights: [0, 0, 0], value: 1 } },
      'dependent-restraints',
      'restraints',
    ],
    [
      'a restraint too short',
      { restraint: { weights: [1, 0], value: 0 } },
      'size-mismatch',
      'restraint.weights',
    ],
    [
      'a later restraint too short',
      { restraint: undefined, restraints: [item(twoRestraints, 0), { weights: [1], value: 0 }] },
      'size-mismatch',
      'restraints[1].weights',
    ],
    [
      'a restraint without value',
      { restraint: { weights: [1, 0, 0], value: Number.NaN } },
      'not-finite',
      'restraint.value',
    ],
    [
      'a negative uncertainty',
      { restraint: { weights: [1, 0, 0], value: 0, standardUncertainty: -1 } },
      'out-of-range',
      'restraint.standardUncertainty',
    ],
    ['differences too few', { differences: [1, 2] }, 'size-mismatch', 'differences'],
    ['a difference that is none', { differences: [1, 2, Number.NaN] }, 'not-finite', 'differences[2]'],
    ['a ragged design', { design: [[1, -1, 0], [1, 0], [0, 1, -1]] }, 'not-rectangular', 'design[1]'], // prettier-ignore
    ['an empty design', { design: [] }, 'not-rectangular', 'design'],
    ['names too few', { names: ['A'] }, 'size-mismatch', 'names'],
    [
      'a negative day-to-day part',
      { betweenStandardDeviation: -1 },
      'out-of-range',
      'betweenStandardDeviation',
    ],
    ['a negative within part', { withinStandardDeviation: -1 }, 'out-of-range', 'withinStandardDeviation'],
    ['two variances of a weighing', { withinStandardDeviation: 1, observationCovariance: [[1, 0, 0], [0, 1, 0], [0, 0, 1]] }, 'two-variances', 'withinStandardDeviation'], // prettier-ignore
    [
      'a covariance of another size',
      { observationCovariance: [[1]] },
      'size-mismatch',
      'observationCovariance',
    ],
    ['a singular covariance', { observationCovariance: [[1, 1, 0], [1, 1, 0], [0, 0, 1]] }, 'not-positive-definite', 'observationCovariance[1]'], // prettier-ignore
    ['an impossible restraint covariance', { restraint: undefined, restraints: twoRestraints, restraintCovariance: [[1, 2], [2, 1]] }, 'not-positive-semidefinite', 'restraintCovariance[0][1]'], // prettier-ignore
    ['a restraint covariance of another size', { restraintCovariance: [[1, 0], [0, 1]] }, 'size-mismatch', 'restraintCovariance'], // prettier-ignore
    ['no residuals and no pooled standard deviation', { design: [[1, -1, 0], [0, 1, -1]], differences: [1, 2] }, 'no-within-standard-deviation', 'withinStandardDeviation'], // prettier-ignore
  ])('refuses %s', (_, change, code, field) => {
    expect(() => solveWeighingDesign({ ...plain, ...change })).toThrow(
      expect.objectContaining({ code, field }),
    );
  });

  it('refuses a combination of another size', () => {
    expect(() => designFactors(plain.design, [1, 0, 0], [1])).toThrow(
      expect.objectContaining({ code: 'size-mismatch', field: 'combination' }),
    );
  });
});

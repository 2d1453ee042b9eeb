import { describe, expect, it } from 'vitest';
import { item } from '../linear/entries.ts';
import { designFactors, solveWeighingDesign } from './weighing-design.ts';
import { weighingDesigns } from './weighing-designs.ts';

/** What is printed beside each design: rows of the solution times the divisor, factors of combinations. */
type Printed = {
  id: string;
  design: string;
  degreesOfFreedom: number;
  divisor: number;
  solution: number[][];
  restraintRow: number[];
  factors: [combination: number[], within: number, between: number][];
};

// NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.1; the page of each design is in its `source`. Some of
// the between-day factors are recomputed, not printed: those of the sums and the check of 1-1-1-1-1 and all of
// 5-3-2-2-1-1-1. The handbook prints 1.4141 for the check of 1-1-1-1, where the root of 2 is 1.4142.
const printed: Printed[] = [
  {
    id: 'HB-111',
    design: '1-1-1',
    degreesOfFreedom: 1,
    divisor: 3,
    solution: [
      [0, -2, -1],
      [0, -1, -2],
      [0, 1, -1],
    ],
    restraintRow: [3, 3, 3],
    factors: [
      [[1, 0, 0], 0, 0],
      [[0, 1, 0], 0.8165, 1.4142],
      [[0, 0, 1], 0.8165, 1.4142],
      [[0, 1, 1], 1.4142, 2.4495],
    ],
  },
  {
    id: 'HB-111inc',
    design: '1-1-1 each pair twice',
    degreesOfFreedom: 4,
    divisor: 6,
    solution: [
      [1, -1, 0],
      [2, 1, 0],
      [1, 2, 0],
      [-1, -2, 0],
      [-2, -1, 0],
      [-1, 1, 0],
    ],
    restraintRow: [6, 6, 6],
    factors: [
      [[1, 0, 0], 0.5774, 1.4142],
      [[0, 1, 0], 0.5774, 1.4142],
      [[0, 0, 1], 0, 0],
    ],
  },
  {
    id: 'HB-1111',
    design: '1-1-1-1',
    degreesOfFreedom: 3,
    divisor: 8,
    solution: [
      [2, -2, 0, 0],
      [1, -1, -3, -1],
      [1, -1, -1, -3],
      [-1, 1, -3, -1],
      [-1, 1, -1, -3],
      [0, 0, 2, -2],
    ],
    restraintRow: [4, 4, 4, 4],
    factors: [
      [[1, 0, 0, 0], 0.3536, 0.7071],
      [[0, 1, 0, 0], 0.3536, 0.7071],
      [[0, 0, 1, 0], 0.6124, 1.2247],
      [[0, 0, 0, 1], 0.6124, 1.2247],
      [[1, -1, 0, 0], 0.7071, 1.4142],
    ],
  },
  {
    id: 'HB-11111',
    design: '1-1-1-1-1',
    degreesOfFreedom: 6,
    divisor: 10,
    solution: [
      [2, -2, 0, 0, 0],
      [1, -1, -3, -1, -1],
      [1, -1, -1, -3, -1],
      [1, -1, -1, -1, -3],
      [-1, 1, -3, -1, -1],
      [-1, 1, -1, -3, -1],
      [-1, 1, -1, -1, -3],
      [0, 0, 2, -2, 0],
      [0, 0, 2, 0, -2],
      [0, 0, 0, 2, -2],
    ],
    restraintRow: [5, 5, 5, 5, 5],
    factors: [
      [[1, 0, 0, 0, 0], 0.3162, 0.7071],
      [[0, 0, 1, 0, 0], 0.5477, 1.2247],
      [[0, 0, 1, 1, 0], 0.8944, 2.0],
      [[0, 0, 1, 1, 1], 1.2247, 2.7386],
      [[1, -1, 0, 0, 0], 0.6325, 1.4142],
    ],
  },
  {
    id: 'HB-22211',
    design: '2-2-2-1-1',
    degreesOfFreedom: 3,
    divisor: 16,
    solution: [
      [4, -4, 0, 0, 0],
      [2, -2, -6, -1, -1],
      [-2, 2, -6, -1, -1],
      [2, -2, -2, -3, -3],
      [-2, 2, -2, -3, -3],
      [0, 0, 4, -2, -2],
      [0, 0, 0, 8, -8],
    ],
    restraintRow: [8, 8, 8, 4, 4],
    factors: [
      [[1, 0, 0, 0, 0], 0.3536, 0.7071],
      [[0, 0, 1, 0, 0], 0.6124, 1.2247],
      [[0, 0, 0, 1, 0], 0.5863, 1.0607],
      [[0, 0, 0, 1, 1], 0.6124, 1.5811],
      [[0, 0, 1, 1, 1], 1.0, 2.2361],
    ],
  },
  {
    id: 'HB-532111',
    design: '5-3-2-1-1-1',
    degreesOfFreedom: 6,
    divisor: 920,
    solution: [
      [100, -68, -32, 119, -111, 4],
      [100, -68, -32, 4, 119, -111],
      [100, -68, -32, -111, 4, 119],
      [100, -68, -32, 4, 4, 4],
      [60, -4, -56, -108, -108, -108],
      [-20, 124, -104, 128, -102, -102],
      [-20, 124, -104, -102, 128, -102],
      [-20, 124, -104, -102, -102, 128],
      [-20, -60, 80, -125, -125, -10],
      [-20, -60, 80, -125, -10, -125],
      [-20, -60, 80, -10, -125, -125],
    ],
    restraintRow: [460, 276, 184, 92, 92, 92],
    factors: [
      [[1, 0, 0, 0, 0, 0], 0.2331, 0.866],
      [[0, 1, 0, 0, 0, 0], 0.2985, 0.8185],
      [[0, 0, 1, 0, 0, 0], 0.2638, 0.8485],
      [[0, 0, 0, 1, 0, 0], 0.3551, 1.0149],
      [[0, 0, 0, 1, 1, 0], 0.5043, 1.456],
      [[0, 0, 0, 1, 1, 1], 0.6203, 1.8083],
    ],
  },
  {
    id: 'HB-5322111',
    design: '5-3-2-2-1-1-1',
    degreesOfFreedom: 6,
    divisor: 10,
    solution: [
      [2, 0, -2, 2, 0, 0, 0],
      [0, -6, 6, -4, -2, -2, -2],
      [1, 1, -2, 0, -1, 1, 1],
      [1, 1, -2, 0, 1, -1, 1],
      [1, 1, -2, 0, 1, 1, -1],
      [-1, 1, 0, -2, -1, 1, 1],
      [-1, 1, 0, -2, 1, -1, 1],
      [-1, 1, 0, -2, 1, 1, -1],
      [0, -2, 2, 2, -4, -4, -4],
      [0, 0, 0, 0, 2, -2, 0],
      [0, 0, 0, 0, 0, 2, -2],
      [0, 0, 0, 0, -2, 0, 2],
    ],
    restraintRow: [5, 3, 2, 2, 1, 1, 1],
    factors: [
      [[1, 0, 0, 0, 0, 0, 0], 0.3162, 0.866],
      [[0, 1, 0, 0, 0, 0, 0], 0.6782, 0.8185],
      [[0, 0, 1, 0, 0, 0, 0], 0.7483, 0.8485],
    ],
  },
];

describe('published weighing designs', () => {
  it('come with their source and a restraint the printed solution needs', () => {
    expect(Object.keys(weighingDesigns).sort()).toEqual(printed.map(({ design }) => design).sort());
    for (const { source, nominals, design, restraint, check } of Object.values(weighingDesigns)) {
      expect(source).toMatch(/2\.3\.4\.1 \(mpc/);
      for (const row of [...design, restraint, check]) expect(row).toHaveLength(nominals.length);
    }
  });

  it('weigh equal nominals on both sides', () => {
    for (const { nominals, design } of Object.values(weighingDesigns)) {
      for (const row of design)
        expect(row.reduce((sum, sign, j) => sum + sign * item(nominals, j), 0)).toBe(0);
    }
  });

  describe.each(printed)(
    '$id',
    ({ design: name, degreesOfFreedom, divisor, solution, restraintRow, factors }) => {
      const preset = weighingDesigns[name];
      if (!preset) throw new Error(`no preset ${name}`);
      const { design, restraint } = preset;
      const result = solveWeighingDesign({
        design,
        differences: design.map(() => 0),
        restraint: { weights: restraint, value: 1 },
        withinStandardDeviation: 1,
      });

      it('gives every printed entry of the solution and the degrees of freedom', () => {
        expect(result.degreesOfFreedom).toBe(degreesOfFreedom);
        result.sensitivityToObservations.forEach((row, weight) =>
          row.forEach((value, i) => expect(value * divisor).toBeCloseTo(item(item(solution, i), weight), 9)),
        );
        result.sensitivityToRestraints.forEach((row, weight) =>
          expect(item(row, 0) * divisor).toBeCloseTo(item(restraintRow, weight), 9),
        );
      });

      it('gives the printed factors within 6e-5', () => {
        for (const [combination, within, between] of factors) {
          const found = designFactors(design, restraint, combination);
          expect(Math.abs(found.within - within)).toBeLessThan(6e-5);
          expect(Math.abs(found.between - between)).toBeLessThan(6e-5);
        }
      });

      it('lists the same factors for single weights', () => {
        result.factors.forEach((factor, j) => {
          const single = result.factors.map((_, k) => (k === j ? 1 : 0));
          expect(factor).toBeCloseTo(designFactors(design, restraint, single).within, 12);
        });
      });
    },
  );
});

describe('check standards of the presets', () => {
  // The pages named in `source`: the one weight that serves, or the difference of the two references.
  it.each([
    ['1-1-1', [0, 1, 0]],
    ['1-1-1 each pair twice', [1, 0, 0]],
    ['1-1-1-1', [1, -1, 0, 0]],
    ['1-1-1-1-1', [1, -1, 0, 0, 0]],
    ['2-2-2-1-1', [0, 0, 1, 0, 0]],
    ['5-3-2-1-1-1', [0, 0, 0, 1, 0, 0]],
    ['5-3-2-2-1-1-1', [0, 0, 0, 0, 1, 0, 0]],
  ])('of %s', (name, check) => {
    expect(weighingDesigns[name]?.check).toEqual(check);
  });
});

describe('HB-unify: between-day standard deviation out of the check standard', () => {
  // e-Handbook 2.3.3.3.4, design 1-1-1-1: the within-run part cancels and the test weight has sqrt(3/4) of the
  // day-to-day standard deviation of the check.
  it('makes the uncertainty of a test weight sqrt(3/4) of that of the check', () => {
    const preset = weighingDesigns['1-1-1-1'];
    if (!preset) throw new Error('no preset');
    const check = designFactors(preset.design, preset.restraint, preset.check ?? []);
    const [within, days] = [0.011, 0.02];
    const daily = Math.sqrt((days ** 2 - (check.within * within) ** 2) / check.between ** 2);
    const { designCovariance } = solveWeighingDesign({
      design: preset.design,
      differences: preset.design.map(() => 0),
      restraint: { weights: preset.restraint, value: 0 },
      withinStandardDeviation: within,
      betweenStandardDeviation: daily,
    });
    expect(Math.sqrt(item(item(designCovariance, 2), 2))).toBeCloseTo(Math.sqrt(3 / 4) * days, 12);
  });
});

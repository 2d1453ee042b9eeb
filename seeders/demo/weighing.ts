import type { RandomSource } from '#shared/engine/uncertainty/random.ts';
import { solveWeighingDesign } from '#shared/engine/weighing/weighing-design.ts';
import { cutNormal } from './draws.ts';
import { covarianceOf, type Effects } from './effects.ts';
import { classLimitOf, type Weight } from './weight.ts';

/** A weighing design for a set: which weights stand on either side, how good each comparison is. */
export interface Design {
  /** Restraints first, then the weights to be determined, then a check weight that is not reported. */
  columns: string[];
  restraints: number;
  /** One comparison a row: columns on the left and on the right. */
  rows: { left: string[]; right: string[]; sd: number }[];
}

/** What a design gives: how each weight leans on each restraint, and on each comparison. */
export interface SolvedDesign {
  columns: string[];
  toRestraints: number[][];
  /** Own part of each weight by comparison, g per standard deviation. */
  toComparisons: number[][];
  degreesOfFreedom: number;
}

const REPEATABILITY = 0.025;

/** Standard deviation of one comparison: a share of the E1 limit of what stands on the pan, g. */
export function comparisonSd(nominal: string): number {
  return REPEATABILITY * classLimitOf('E1', nominal);
}

const DECADES = ['100', '10', '1', '0.1', '0.01', '0.001'];
const times = (factor: number, decade: string) => String(Number((Number(decade) * factor).toPrecision(6)));

/**
 * From 1 kg down to 1 mg in 5-2-2-1 steps: in each decade the sum of the decade below stands in for a second 1.
 * Columns are named by nominal, the second 2 with a star; `R` is the reference kilogram, `K` the set's own.
 */
export function subdivision(): Design {
  const columns = ['R', '1000', ...DECADES.flatMap((decade) => decadeOf(decade)), 'check'];
  const top = decadeOf('100');
  const rows: Design['rows'] = [
    { left: ['R'], right: ['1000'], sd: comparisonSd('1000') },
    { left: ['R'], right: top, sd: comparisonSd('1000') },
    { left: ['1000'], right: top, sd: comparisonSd('1000') },
  ];
  for (const [at, decade] of DECADES.entries()) {
    const [five, two, twoStar, one] = decadeOf(decade) as [string, string, string, string];
    const below = DECADES[at + 1] ? decadeOf(DECADES[at + 1]!) : ['check'];
    const [sdFive, sdTwo, sdOne] = [five, two, one].map(comparisonSd) as [number, number, number];
    rows.push(
      { left: [five], right: [two, twoStar, one], sd: sdFive },
      { left: [five], right: [two, twoStar, ...below], sd: sdFive },
      { left: [two], right: [twoStar], sd: sdTwo },
      { left: [two], right: [one, ...below], sd: sdTwo },
      { left: [twoStar], right: [one, ...below], sd: sdTwo },
      { left: [one], right: below, sd: sdOne },
    );
  }
  return { columns, restraints: 1, rows };
}

function decadeOf(decade: string): string[] {
  return [times(5, decade), times(2, decade), `${times(2, decade)}*`, decade];
}

/** From two reference kilograms `A` and `B` up to 20 kg. */
export function buildUp(): Design {
  const kilogram = (nominal: string) => comparisonSd(nominal);
  return {
    columns: ['A', 'B', '2000', '2000*', '5000', '10000', '10000*', '20000'],
    restraints: 2,
    rows: [
      { left: ['2000'], right: ['A', 'B'], sd: kilogram('2000') },
      { left: ['2000*'], right: ['A', 'B'], sd: kilogram('2000') },
      { left: ['2000'], right: ['2000*'], sd: kilogram('2000') },
      { left: ['5000'], right: ['2000', '2000*', 'A'], sd: kilogram('5000') },
      { left: ['5000'], right: ['2000', '2000*', 'B'], sd: kilogram('5000') },
      { left: ['10000'], right: ['5000', '2000', '2000*', 'A'], sd: kilogram('10000') },
      { left: ['10000*'], right: ['5000', '2000', '2000*', 'B'], sd: kilogram('10000') },
      { left: ['10000'], right: ['10000*'], sd: kilogram('10000') },
      { left: ['20000'], right: ['10000', '10000*'], sd: kilogram('20000') },
    ],
  };
}

/** Solves a design once; its sensitivities do not depend on what is observed. */
export function solved(design: Design): SolvedDesign {
  const matrix = design.rows.map(({ left, right }) =>
    design.columns.map((column) => Number(left.includes(column)) - Number(right.includes(column))),
  );
  const unit = Math.max(...design.rows.map((row) => row.sd));
  const solution = solveWeighingDesign({
    design: matrix,
    differences: design.rows.map(() => 0),
    restraints: design.columns
      .slice(0, design.restraints)
      .map((_, at) => ({ weights: design.columns.map((_, column) => Number(column === at)), value: 0 })),
    // In multiples of the largest, so that no variance is lost as too small.
    observationCovariance: design.rows.map((row, i) =>
      design.rows.map((_, j) => (i === j ? (row.sd / unit) ** 2 : 0)),
    ),
    names: design.columns,
  });
  return {
    columns: design.columns,
    toRestraints: solution.sensitivityToRestraints,
    toComparisons: solution.sensitivityToObservations.map((row) =>
      row.map((cell, at) => cell * design.rows[at]!.sd),
    ),
    degreesOfFreedom: solution.degreesOfFreedom,
  };
}

/** One performance of a design: its comparisons drawn, and with them the own error of each weight. */
export function drawErrors(design: SolvedDesign, draws: RandomSource): Map<string, number> {
  const drawn = design.toComparisons[0]!.map(() => cutNormal(draws, 2.2));
  return new Map(
    design.columns.map((column, i) => [
      column,
      design.toComparisons[i]!.reduce((sum, grams, j) => sum + grams * drawn[j]!, 0),
    ]),
  );
}

/** The own effects of a weight in one performance of a design. */
export function designEffects(design: SolvedDesign, column: string, performance: string): Effects {
  const row = design.toComparisons[design.columns.indexOf(column)]!;
  return new Map(row.map((grams, at): [string, number] => [`${performance}/comparison${at}`, grams]));
}

/** Covariance of own parts, g2: symmetric to the last digit. */
export function covarianceMatrix(effects: readonly Effects[]): number[][] {
  const matrix = effects.map(() => effects.map(() => 0));
  for (const [i, one] of effects.entries()) {
    for (let j = i; j < effects.length; j += 1) {
      const covariance = covarianceOf(one, effects[j]!);
      matrix[i]![j] = covariance;
      matrix[j]![i] = covariance;
    }
  }
  return matrix;
}

/** The column of a weight in a design: its nominal, with a star where it is marked with one. */
export function columnOf(weight: Weight): string {
  return weight.marking.endsWith('*') ? `${weight.nominal}*` : weight.nominal;
}

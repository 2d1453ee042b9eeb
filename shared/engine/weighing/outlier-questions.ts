import { item } from '../linear/entries.ts';
import { requireNumbers } from '../linear/requirements.ts';
import { requireLevel, requireNumber, requireWhole } from '../quantity/domain.ts';
import { coverageFactor } from '../uncertainty/coverage-factor.ts';
import { studentTwoSidedTail } from '../uncertainty/student-t.ts';
import type { PrecisionEstimate } from './pooled-standard-deviation.ts';

/** One value that lies far from its fellows, put as a question; the value stays where it is. */
export type OutlierQuestion = {
  index: number;
  value: number;
  deviation: number;
  statistic: number;
  pValue: number;
  question: string;
};

/**
 * Values of one series that are too far from their mean to pass in silence. Nothing is removed and nothing
 * weighted down: whoever weighed answers, and the answer is recorded. Without `precision` the series judges
 * itself (Grubbs' test of the farthest value, ISO 5725-2, from memory; fewer than three values raise no
 * question); with a pooled `precision` every value is judged by it. `level` is the probability of a false
 * question over the whole series, 0.01 unless given. Any unit, the same throughout.
 * @throws EngineError `too-few-values` under two values, `not-finite`, `out-of-range`
 */
export function outlierQuestions(a: {
  values: number[];
  level?: number;
  precision?: PrecisionEstimate;
}): OutlierQuestion[] {
  requireNumbers(a.values, 'values', 2);
  const level = requireLevel(a.level ?? 0.01);
  if (a.precision) {
    requireNumber(a.precision.standardDeviation, 'precision.standardDeviation', { above: 0 });
    requireNumber(a.precision.degreesOfFreedom, 'precision.degreesOfFreedom', { above: 0 });
  }
  const count = a.values.length;
  const mean = a.values.reduce((sum, value) => sum + value, 0) / count;
  const deviations = a.values.map((value) => value - mean);
  const judged = a.precision ? deviations.map((_, i) => i) : farthest(deviations);
  return judged
    .map((index) => judge(a.values, deviations, index, a.precision))
    .filter((found) => found !== undefined)
    .filter(({ pValue }) => pValue <= level);
}

/** The index of the farthest value, where a series of its own can be judged at all. */
function farthest(deviations: number[]): number[] {
  if (deviations.length < 3) return [];
  const sizes = deviations.map(Math.abs);
  return [sizes.indexOf(Math.max(...sizes))];
}

function judge(
  values: number[],
  deviations: number[],
  index: number,
  precision?: PrecisionEstimate,
): OutlierQuestion | undefined {
  const count = values.length;
  const deviation = item(deviations, index);
  const { statistic, degreesOfFreedom } = precision
    ? {
        statistic: deviation / (precision.standardDeviation * Math.sqrt(1 - 1 / count)),
        degreesOfFreedom: precision.degreesOfFreedom,
      }
    : { statistic: leftOutStudent(deviations, index), degreesOfFreedom: count - 2 };
  if (!Number.isFinite(statistic)) return undefined;
  const value = item(values, index);
  return {
    index,
    value,
    deviation,
    statistic,
    pValue: Math.min(1, count * studentTwoSidedTail(statistic, degreesOfFreedom)),
    question: `Value ${index + 1} (${value}) is ${Math.abs(statistic).toFixed(1)} standard deviations from its fellows. Is there a reason?`,
  };
}

/** Student's t of one value against the others; NaN for equal values, which raise no question. */
function leftOutStudent(deviations: number[], index: number): number {
  const count = deviations.length;
  const own = item(deviations, index);
  const squares = deviations.reduce((sum, value) => sum + value * value, 0);
  const others = (squares - (own * own * count) / (count - 1)) / (count - 2);
  // Rounding may leave a residue below zero when all the others agree; a double-sized floor keeps the sign.
  const floor = squares * 1e-15;
  return own / Math.sqrt(Math.max(others, floor) * (1 - 1 / count));
}

/**
 * Grubbs' critical value for the farthest of `count` values: the largest distance from the mean, in standard
 * deviations of the series, that passes at `level` (two-sided).
 *
 * Source: ISO 5725-2, Grubbs' test (from memory); solved from Student's distribution, not read from a table.
 * @throws EngineError `not-whole`, `not-finite`, `out-of-range` (fewer than three values have no outlier test)
 */
export function grubbsCriticalValue(count: number, level: number): number {
  requireWhole(count, 'count', { min: 3 });
  const t = coverageFactor(1 - requireLevel(level) / count, count - 2);
  return ((count - 1) / Math.sqrt(count)) * Math.sqrt((t * t) / (count - 2 + t * t));
}

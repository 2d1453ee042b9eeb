import { requireLevel, requireNumber, requireWhole } from '../quantity/domain.ts';
import { coverageFactor } from '../uncertainty/coverage-factor.ts';
import { studentTwoSidedTail } from '../uncertainty/student-t.ts';
import { fCriticalValue, fUpperTail } from './f-distribution.ts';
import type { PrecisionEstimate } from './pooled-standard-deviation.ts';

/** What a test against history says; a question to the person, never a deletion. */
export type HistoryTest = {
  /** t (difference over its standard deviation, with sign) or F (ratio of variances). */
  statistic: number;
  criticalValue: number;
  /** Probability of a result at least this far off if nothing has changed. */
  pValue: number;
  withinHistory: boolean;
  /** Largest value, or standard deviation, that the history would accept. */
  limit: number;
};

/**
 * Holds today's value of the check standard against its history by a two-sided t test. The mean of a short
 * history is itself uncertain, hence the factor 1 + 1/count under the root; with a long one it is the test of
 * NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.5.2 (from memory). Any unit, the same throughout.
 * @param a.level probability of a false alarm, 0.05 unless given
 * @throws EngineError `not-whole`, `out-of-range` (a history of one value has no standard deviation), `not-finite`
 */
export function checkStandardTest(a: {
  value: number;
  history: { mean: number; standardDeviation: number; count: number };
  level?: number;
}): HistoryTest {
  requireNumber(a.value, 'value');
  requireNumber(a.history.mean, 'history.mean');
  requireNumber(a.history.standardDeviation, 'history.standardDeviation', { above: 0 });
  const count = requireWhole(a.history.count, 'history.count', { min: 2 });
  const scale = a.history.standardDeviation * Math.sqrt(1 + 1 / count);
  const statistic = (a.value - a.history.mean) / scale;
  const criticalValue = coverageFactor(1 - requireLevel(a.level ?? 0.05), count - 1);
  return {
    statistic,
    criticalValue,
    pValue: studentTwoSidedTail(statistic, count - 1),
    withinHistory: Math.abs(statistic) <= criticalValue,
    limit: criticalValue * scale,
  };
}

/**
 * Holds the standard deviation of today's run against the pooled one of past runs by a one-sided F test: only a
 * balance that has become worse raises a question.
 * Source: NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.5.1.1.
 * @param a.level probability of a false alarm, 0.01 unless given
 * @throws EngineError `out-of-range`, `not-finite`
 */
export function precisionTest(a: {
  run: PrecisionEstimate;
  history: PrecisionEstimate;
  level?: number;
}): HistoryTest {
  const { run, history } = a;
  requireNumber(history.standardDeviation, 'history.standardDeviation', { above: 0 });
  requireNumber(run.standardDeviation, 'run.standardDeviation', { min: 0 });
  requireNumber(run.degreesOfFreedom, 'run.degreesOfFreedom', { min: 1 });
  requireNumber(history.degreesOfFreedom, 'history.degreesOfFreedom', { min: 1 });
  const statistic = (run.standardDeviation / history.standardDeviation) ** 2;
  const criticalValue = fCriticalValue(a.level ?? 0.01, run.degreesOfFreedom, history.degreesOfFreedom);
  return {
    statistic,
    criticalValue,
    pValue: fUpperTail(statistic, run.degreesOfFreedom, history.degreesOfFreedom),
    withinHistory: statistic <= criticalValue,
    limit: history.standardDeviation * Math.sqrt(criticalValue),
  };
}

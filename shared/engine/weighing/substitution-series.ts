import { EngineError } from '../errors.ts';
import { item } from '../linear/entries.ts';
import { requireNumbers } from '../linear/requirements.ts';
import { requireChoice, requireNumber, requireWhole } from '../quantity/domain.ts';
import { pooledStandardDeviation } from './pooled-standard-deviation.ts';

/** A reference (A) and one or several test weights (B), weighed in turn; one word per cycle. */
export const SUBSTITUTION_CYCLES = ['ABBA', 'ABA', 'AB1..BnA'] as const;

/** How the weights of a series take turns. */
export type SubstitutionCycle = (typeof SUBSTITUTION_CYCLES)[number];

/** A substitution series as weighed. */
export type SubstitutionSeries = {
  /** Comparator readings in the order taken, cycle after cycle, equally spaced in time within a cycle. */
  readings: number[];
  cycle: SubstitutionCycle;
  /** Number of test weights of a cycle AB1..BnA; 1 in the other cycles. */
  testCount?: number;
  /** AB1..BnA only: every second cycle takes the test weights in falling order (A Bn..B1 A). */
  alternating?: boolean;
  /** Mass for one unit of reading, from a sensitivity weight; 1 when readings already are masses. */
  sensitivity?: number;
};

/** What one test weight got: its difference to the reference, cycle by cycle and on average. */
export type TestDifference = { difference: number; differences: number[]; standardDeviation: number };

/** The first test weight's difference, and that of each. */
export type SubstitutionResult = TestDifference & {
  /** Degrees of freedom of `standardDeviation`: cycles - 1, times the test weights pooled. */
  degreesOfFreedom: number;
  /** Mean change of the reading from one weighing to the next. */
  drift: number;
  /** The same for each test weight; the first is the result itself. */
  tests: TestDifference[];
};

type CycleResult = { differences: number[]; drift: number };

/**
 * Differences test minus reference from a substitution series, linear drift eliminated within each cycle.
 * All results are in the unit of `readings` times `sensitivity`. With AB1..BnA each test weight is held against
 * the line through the two readings of the reference; `difference` and `differences` are those of B1, and
 * `standardDeviation` is pooled over the test weights. It is the standard deviation of the difference of one
 * cycle (the mean of n cycles has it divided by the root of n); 0 with 0 degrees of freedom says that one cycle
 * tells nothing about repeatability, and a pooled standard deviation has to serve.
 * Source: OIML R 111-1:2004, C.4 (cycles; from memory), least squares for a line plus a step.
 * @throws EngineError `incomplete-cycle`, `unknown-choice`, `not-whole`, `not-finite`, `too-few-values`,
 * `out-of-range`, `no-response` for a sensitivity of 0
 */
export function substitutionSeries(a: SubstitutionSeries): SubstitutionResult {
  const testCount = requireTestCount(a);
  const sensitivity = requireSensitivity(a.sensitivity ?? 1);
  const cycles = splitCycles(a, testCount).map((readings, i) => {
    const falling = a.alternating === true && i % 2 === 1;
    return evaluateCycle(a.cycle, readings, falling);
  });
  const count = cycles.length;
  const tests = Array.from({ length: testCount }, (_, j) =>
    summarize(cycles.map((cycle) => item(cycle.differences, j) * sensitivity)),
  );
  const first = item(tests, 0);
  return {
    difference: first.difference,
    differences: first.differences,
    standardDeviation: pooled(tests, count),
    degreesOfFreedom: (count - 1) * testCount,
    drift: (cycles.reduce((sum, cycle) => sum + cycle.drift, 0) / count) * sensitivity,
    tests,
  };
}

function requireTestCount(a: SubstitutionSeries): number {
  const cycle = requireChoice(a.cycle, 'cycle', SUBSTITUTION_CYCLES);
  const most = cycle === 'AB1..BnA' ? undefined : 1;
  return requireWhole(a.testCount ?? 1, 'testCount', { min: 1, max: most });
}

function requireSensitivity(sensitivity: number): number {
  requireNumber(sensitivity, 'sensitivity');
  if (sensitivity === 0) {
    throw new EngineError(
      'no-response',
      'sensitivity',
      0,
      'A comparator that does not answer weighs nothing; another number is expected.',
    );
  }
  return sensitivity;
}

/** Readings cut into whole cycles. */
function splitCycles(a: SubstitutionSeries, testCount: number): number[][] {
  const lengths: Record<SubstitutionCycle, number> = { ABBA: 4, ABA: 3, 'AB1..BnA': testCount + 2 };
  const length = lengths[a.cycle];
  requireNumbers(a.readings, 'readings', length);
  if (a.readings.length % length !== 0) {
    throw new EngineError(
      'incomplete-cycle',
      'readings',
      `${a.readings.length} readings`,
      `Whole cycles ${a.cycle} of ${length} are expected; complete or remove the last one.`,
    );
  }
  return Array.from({ length: a.readings.length / length }, (_, i) =>
    a.readings.slice(i * length, (i + 1) * length),
  );
}

function evaluateCycle(cycle: SubstitutionCycle, readings: number[], falling: boolean): CycleResult {
  const first = item(readings, 0);
  const last = item(readings, readings.length - 1);
  if (cycle === 'ABBA') {
    const [second, third] = [item(readings, 1), item(readings, 2)];
    return {
      differences: [(second - first + (third - last)) / 2],
      drift: (3 * (last - first) + (third - second)) / 10,
    };
  }
  const drift = (last - first) / (readings.length - 1);
  const differences = readings.slice(1, -1).map((reading, j) => reading - first - drift * (j + 1));
  return { differences: falling ? differences.reverse() : differences, drift };
}

function summarize(differences: number[]): TestDifference {
  const count = differences.length;
  const difference = differences.reduce((sum, value) => sum + value, 0) / count;
  const squares = differences.reduce((sum, value) => sum + (value - difference) ** 2, 0);
  return { difference, differences, standardDeviation: count > 1 ? Math.sqrt(squares / (count - 1)) : 0 };
}

function pooled(tests: TestDifference[], cycles: number): number {
  if (cycles < 2) return 0;
  const estimates = tests.map(({ standardDeviation }) => ({
    standardDeviation,
    degreesOfFreedom: cycles - 1,
  }));
  return pooledStandardDeviation(estimates).standardDeviation;
}

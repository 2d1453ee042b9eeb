import { requireLevel } from '../quantity/domain.ts';
import { chiSquaredUpperPoint } from './chi-squared.ts';
import { type CheckedResults, checkedResults, type Results, statedCovariance } from './results.ts';
import { subsetsOfSize } from './subsets.ts';
import { weightedMean } from './weighted-mean.ts';

/** The subset kept, and how far another would have served as well. */
export type ConsistentSubset = {
  /** Places of the results kept. */
  members: number[];
  value: number;
  standardUncertainty: number;
  chiSquared: number;
  /** Other subsets of this size with the same chi-squared: the choice among them is for people. */
  ties: number[][];
  /** The consistent subset of this size with the next chi-squared, ties among them, if there is one. */
  runnerUp: { members: number[]; chiSquared: number } | null;
  /** How many subsets of this size are consistent. */
  consistentOfThisSize: number;
  /** False where there were too many subsets to try: results were then taken out one at a time. */
  exhaustive: boolean;
};

/** Most subsets tried one by one; correlated results cost far more each. */
const MOST_SUBSETS = { independent: 200_000, correlated: 20_000 };

/** Chi-squared values closer than this, relative to 1 + themselves, are a tie. */
const TIE = 1e-9;

type Subset = { members: number[]; chiSquared: number };

/**
 * The largest subset of the results that count whose own weighted mean passes the chi-squared test, and among those of
 * that size the one with the smallest chi-squared (Cox 2007 Metrologia 44 187). It need not be unique.
 * The degrees of equivalence of all results follow from the general formula with the subset as those that count.
 * @param level of the test, 0.05 by custom
 * @throws EngineError `missing-uncertainties`, `out-of-range`, those of `checkedResults`
 */
export function largestConsistentSubset(r: Results, level = 0.05): ConsistentSubset {
  requireLevel(level);
  const checked = checkedResults(r);
  const covariance = statedCovariance(checked);
  const critical = (size: number) => (size === 1 ? 0 : chiSquaredUpperPoint(level, size - 1));
  const tried = (members: number[]): Subset => ({
    members,
    chiSquared: chiSquaredOf(checked, covariance, members),
  });
  let left = checked.independent ? MOST_SUBSETS.independent : MOST_SUBSETS.correlated;
  let size = checked.members.length;
  for (;;) {
    left -= binomial(checked.members.length, size);
    if (left < 0) return described(checked, [oneAtATime(checked.members, tried, critical)], false);
    const limit = critical(size);
    const subsets = subsetsOfSize(checked.members, size).map(tried);
    const consistent = subsets.filter(({ chiSquared }) => chiSquared <= limit);
    // A single result is always consistent with itself, so the search ends at size 1.
    if (consistent.length > 0) return described(checked, consistent, true);
    size -= 1;
  }
}

/** Chi-squared of members about their weighted mean; of uncorrelated ones by sums alone, for the many subsets. */
function chiSquaredOf(
  checked: CheckedResults,
  covariance: readonly (readonly number[])[],
  members: readonly number[],
): number {
  if (!checked.independent) return weightedMean(checked, covariance, members).chiSquared;
  const origin = checked.values[members[0]!]!;
  let total = 0;
  let pulled = 0;
  for (const i of members) {
    total += 1 / covariance[i]![i]!;
    pulled += (checked.values[i]! - origin) / covariance[i]![i]!;
  }
  const mean = pulled / total;
  let chiSquared = 0;
  for (const i of members) chiSquared += (checked.values[i]! - origin - mean) ** 2 / covariance[i]![i]!;
  return chiSquared;
}

/** Takes out, again and again, the result without which chi-squared is smallest. */
function oneAtATime(
  all: readonly number[],
  tried: (members: number[]) => Subset,
  critical: (size: number) => number,
): Subset {
  let kept = tried([...all]);
  while (kept.chiSquared > critical(kept.members.length)) {
    const without = kept.members.map((out) => tried(kept.members.filter((place) => place !== out)));
    kept = without.reduce((best, each) => (each.chiSquared < best.chiSquared ? each : best));
  }
  return kept;
}

function described(checked: CheckedResults, consistent: Subset[], exhaustive: boolean): ConsistentSubset {
  const isTie = (a: Subset, b: Subset) => Math.abs(a.chiSquared - b.chiSquared) <= TIE * (1 + b.chiSquared);
  const smallest = consistent.reduce((best, each) => (each.chiSquared < best.chiSquared ? each : best));
  const tied = consistent.filter((each) => isTie(each, smallest));
  // Of a tie the first in the order of the results is reported, so that the answer does not hang on rounding.
  const chosen = tied[0]!;
  const others = consistent.filter((each) => each !== chosen);
  const runnerUp = others.reduce<Subset | null>(
    (best, each) => (best && best.chiSquared <= each.chiSquared ? best : each),
    null,
  );
  const mean = weightedMean(checked, statedCovariance(checked), chosen.members);
  return {
    members: chosen.members,
    value: mean.value,
    standardUncertainty: Math.sqrt(mean.variance),
    chiSquared: chosen.chiSquared,
    ties: tied.slice(1).map((each) => each.members),
    runnerUp,
    consistentOfThisSize: consistent.length,
    exhaustive,
  };
}

function binomial(n: number, k: number): number {
  let count = 1;
  for (let i = 1; i <= Math.min(k, n - k); i += 1) count = (count * (n + 1 - i)) / i;
  return count;
}

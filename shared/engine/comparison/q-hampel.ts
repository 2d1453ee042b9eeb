import { normalQuantile } from '../uncertainty/normal-distribution.ts';
import type { RobustValue } from './algorithm-a.ts';
import { median, sorted } from './order-statistics.ts';

/**
 * The Q method of ISO 13528:2015 annex C.5.2 for one result per laboratory (formula as confirmed by the worked
 * example): a robust standard deviation from the distribution of all pairwise differences, with no mean in it.
 * @param values at least two
 */
export function qSpread(values: readonly number[]): number {
  const differences: number[] = [];
  values.forEach((a, i) => values.slice(0, i).forEach((b) => differences.push(Math.abs(a - b))));
  const ordered = withTiesMade(sorted(differences));
  const shareEqual = ordered.filter((difference) => difference === 0).length / ordered.length;
  const level = 0.25 + 0.75 * shareEqual;
  const scale = Math.SQRT2 * normalQuantile(Math.min(1 - 1e-16, 0.625 + 0.375 * shareEqual));
  return shareEqual === 1 ? 0 : inverseOfMidpoints(ordered, level) / scale;
}

/** Differences that are equal on paper differ by the rounding of doubles: 3.4 - 3.37 and 3.43 - 3.4. */
function withTiesMade(ordered: readonly number[]): number[] {
  const rounding = 1e-10 * ordered[ordered.length - 1]!;
  let first = 0;
  return ordered.map((difference) => {
    if (difference - first > rounding) first = difference;
    return first;
  });
}

/** Where the polygon through 0 and the mid-points of the jumps of the distribution reaches `level`. */
function inverseOfMidpoints(ordered: readonly number[], level: number): number {
  let previousAt = 0;
  let previousHeight = 0;
  let shareBelow = 0;
  let from = 0;
  // The last mid-point, (1 + a share) / 2, is never below the level: the polygon reaches it.
  for (;;) {
    const at = ordered[from]!;
    let to = from;
    while (ordered[to] === at) to += 1;
    const share = to / ordered.length;
    const height = at === 0 ? 0 : (shareBelow + share) / 2;
    if (height >= level) {
      return previousAt + ((level - previousHeight) / (height - previousHeight)) * (at - previousAt);
    }
    [previousAt, previousHeight, shareBelow, from] = [at, height, share, to];
  }
}

/** Hampel's psi: q to 1.5, then 1.5, falling to 0 from 3 to 4.5. */
function psi(q: number): number {
  const size = Math.abs(q);
  if (size <= 1.5) return q;
  return Math.sign(q) * Math.max(0, Math.min(1.5, 4.5 - size));
}

/**
 * Q method with Hampel's estimator (ISO 13528:2015 annex C.5.3): the root of `sum psi((x - x*)/s*) = 0` nearest the
 * median. The sum is straight between its corners, so every root is found exactly. Where the spread is 0 the value
 * is the median.
 * @param values at least two
 */
export function qHampel(values: readonly number[]): RobustValue {
  const spread = qSpread(values);
  const centre = median(values);
  if (spread === 0) return { value: centre, spread, coefficients: values.map(() => 1 / values.length) };
  const roots = hampelRoots(values, spread, centre);
  const value = roots.reduce((best, root) =>
    Math.abs(root - centre) < Math.abs(best - centre) ? root : best,
  );
  const slopes = values.map((x) => psiSlope((x - value) / spread));
  const total = slopes.reduce((sum, slope) => sum + slope, 0);
  const isFlat = total <= 0;
  return { value, spread, coefficients: slopes.map((slope) => (isFlat ? 1 / values.length : slope / total)) };
}

function psiSlope(q: number): number {
  const size = Math.abs(q);
  if (size <= 1.5) return 1;
  return size > 3 && size < 4.5 ? -1 : 0;
}

/** All points where the sum of psi falls through 0; of a stretch at 0 between results, the point nearest `centre`. */
function hampelRoots(values: readonly number[], spread: number, centre: number): number[] {
  const sumAt = (t: number) => values.reduce((sum, x) => sum + psi((x - t) / spread), 0);
  const isAmongResults = (t: number) => values.some((x) => Math.abs(x - t) < 4.5 * spread);
  const bends = [-4.5, -3, -1.5, 1.5, 3, 4.5];
  const corners = sorted(values.flatMap((x) => bends.map((bend) => x + bend * spread)));
  const roots: number[] = [];
  for (let i = 1; i < corners.length; i += 1) {
    const [from, to] = [corners[i - 1]!, corners[i]!];
    const [before, after] = [sumAt(from), sumAt(to)];
    if (before > 0 && after <= 0) roots.push(from + (before / (before - after)) * (to - from));
    else if (before === 0 && after === 0 && isAmongResults((from + to) / 2)) {
      roots.push(Math.min(Math.max(centre, from), to));
    }
  }
  return roots;
}

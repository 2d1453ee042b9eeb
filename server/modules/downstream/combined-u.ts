/** What is known of the covariance of two values, g2. */
export interface KnownPair {
  i: number;
  j: number;
  /** Null where undeclared. */
  covariance: number | null;
  /** The part that is known, and the largest size of what is not. */
  known: number;
  unknown: number;
  because: string | null;
}

/** Standard uncertainty of a signed sum, g: with covariances, at most, and with every correlation at its largest. */
export interface Combined {
  u: number | null;
  bound: number | null;
  linear: number | null;
}

/**
 * The uncertainty of sum s_i x_i. Undeclared covariances take the sign that makes it largest; each pair's covariance
 * is at most the product of its uncertainties (JCGM 100:2008, 5.2.2).
 * @param us standard uncertainties; null where not known
 * @param pairs each pair once
 * @param signs +1 or -1 for each
 */
export function combinedU(
  us: readonly (number | null)[],
  pairs: readonly KnownPair[],
  signs: readonly number[],
): Combined {
  const known = us.filter((u) => u !== null);
  if (known.length < us.length) return { u: null, bound: null, linear: null };
  let variance = known.reduce((sum, u) => sum + u * u, 0);
  for (const { i, j, known: shared, unknown } of pairs) {
    const most = signs[i]! * signs[j]! * shared + unknown;
    variance += 2 * Math.min(most, known[i]! * known[j]!);
  }
  const bound = Math.sqrt(Math.max(0, variance));
  const isDeclared = pairs.every((pair) => pair.covariance !== null);
  return { u: isDeclared ? bound : null, bound, linear: known.reduce((sum, u) => sum + u, 0) };
}

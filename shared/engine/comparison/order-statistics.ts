/** A sorted copy, ascending. */
export function sorted(values: readonly number[]): number[] {
  return [...values].sort((a, b) => a - b);
}

/** The middle value, or the mean of the two middle ones. At least one value. */
export function median(values: readonly number[]): number {
  const ordered = sorted(values);
  const middle = (ordered.length - 1) / 2;
  return (ordered[Math.floor(middle)]! + ordered[Math.ceil(middle)]!) / 2;
}

/** The median of the absolute deviations from the median. */
export function medianAbsoluteDeviation(values: readonly number[]): number {
  const centre = median(values);
  return median(values.map((value) => Math.abs(value - centre)));
}

/** Quantile by linear interpolation between order statistics, `1 + (n - 1) p` (type 7 of Hyndman and Fan 1996). */
export function quantile(values: readonly number[], probability: number): number {
  const ordered = sorted(values);
  const at = (ordered.length - 1) * probability;
  const below = ordered[Math.floor(at)]!;
  return below + (at - Math.floor(at)) * (ordered[Math.ceil(at)]! - below);
}

/** Normalised interquartile range, `0.7413 (Q3 - Q1)` (ISO 13528:2015 C.2.3, from memory). */
export function normalizedInterquartileRange(values: readonly number[]): number {
  return 0.7413 * (quantile(values, 0.75) - quantile(values, 0.25));
}

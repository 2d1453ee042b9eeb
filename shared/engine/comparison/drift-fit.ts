import { observed } from './consistency.ts';

/** The straight line through the pilot's visits of one travelling standard. */
export type DriftFit = {
  standard: string;
  /** Value at time 0. */
  intercept: number;
  /** Per time unit. */
  slope: number;
  slopeUncertainty: number;
  /** `|slope| / u(slope) > 2`: the drift is told from none. */
  significant: boolean;
  /** Of the visits about the line, with visits less two degrees of freedom. */
  chiSquared: number;
  degreesOfFreedom: number;
  pValue: number;
};

/**
 * Fits the line with the pilot's repeatability alone: its systematic part is common to all visits and says nothing
 * about the drift. Null where fewer than two days were visited.
 */
export function driftFit(
  standard: string,
  visits: readonly { time: number; value: number }[],
  repeatability: number,
): DriftFit | null {
  const count = visits.length;
  const meanTime = visits.reduce((sum, { time }) => sum + time, 0) / count;
  const meanValue = visits.reduce((sum, { value }) => sum + value, 0) / count;
  const spread = visits.reduce((sum, { time }) => sum + (time - meanTime) ** 2, 0);
  if (spread === 0) return null;
  const slope =
    visits.reduce((sum, { time, value }) => sum + (time - meanTime) * (value - meanValue), 0) / spread;
  const slopeUncertainty = repeatability / Math.sqrt(spread);
  const squares = visits.reduce(
    (sum, { time, value }) => sum + (value - meanValue - slope * (time - meanTime)) ** 2,
    0,
  );
  const { chiSquared, degreesOfFreedom, pValue } = observed(squares / repeatability ** 2, count - 2);
  return {
    standard,
    intercept: meanValue - slope * meanTime,
    slope,
    slopeUncertainty,
    significant: Math.abs(slope) > 2 * slopeUncertainty,
    chiSquared: degreesOfFreedom === 0 ? 0 : chiSquared,
    degreesOfFreedom,
    pValue: degreesOfFreedom === 0 ? 1 : pValue,
  };
}

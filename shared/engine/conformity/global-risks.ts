import { item } from '../linear/entries.ts';
import { requireNumber } from '../quantity/domain.ts';
import { normalBetween, normalDensity } from '../uncertainty/normal-distribution.ts';
import { requireLimits } from './conformance-probability.ts';

/** What is known before and after a measurement of items of one kind. */
export interface GlobalRiskInput {
  /** Mean of the items' true values. */
  mean: number;
  /** Standard deviation of the items' true values, more than zero. */
  standardDeviation: number;
  /** Standard uncertainty of a measured value, more than zero. */
  standardUncertainty: number;
  /** Lower tolerance limit. */
  lower?: number;
  /** Upper tolerance limit. */
  upper?: number;
  /** Lower acceptance limit. */
  acceptanceLower?: number;
  /** Upper acceptance limit. */
  acceptanceUpper?: number;
}

/** Global risks and the share of conforming items. */
export interface GlobalRisks {
  /** Probability that an item conforms and is rejected. */
  producer: number;
  /** Probability that an item does not conform and is accepted. */
  consumer: number;
  /** Probability that an item conforms. */
  conforming: number;
}

/** Standard deviations beyond which nothing is left of a normal distribution in doubles. */
const REACH = 9;

/** Panels between two neighbouring break points: with those a standard deviation apart, good to 1e-9. */
const PANELS = 64;

/** Simpson's rule. */
function integrate(f: (x: number) => number, from: number, to: number): number {
  const step = (to - from) / PANELS;
  let sum = f(from) + f(to);
  for (let i = 1; i < PANELS; i += 1) sum += (i % 2 === 1 ? 4 : 2) * f(from + i * step);
  return (sum * step) / 3;
}

/** Points a standard deviation apart around a centre, where the integrand may bend. */
function around(centre: number, spread: number): number[] {
  if (!Number.isFinite(centre)) return [];
  return Array.from({ length: 2 * REACH + 1 }, (_, i) => centre + (i - REACH) * spread);
}

/**
 * The global risks of the producer and the consumer, for normal distributions of the items and of the measurement.
 *
 * Source: JCGM 106:2012, 9.5.2, equations for both risks as double integrals; the inner one is closed.
 *
 * @throws EngineError `missing-limit`, `not-finite` or `out-of-range`, naming the argument
 */
export function globalRisks(a: GlobalRiskInput): GlobalRisks {
  const mean = requireNumber(a.mean, 'mean');
  const deviation = requireNumber(a.standardDeviation, 'standardDeviation', { above: 0 });
  const u = requireNumber(a.standardUncertainty, 'standardUncertainty', { above: 0 });
  const tolerance = requireLimits(a.lower, a.upper);
  const acceptance = requireLimits(a.acceptanceLower, a.acceptanceUpper, [
    'acceptanceLower',
    'acceptanceUpper',
  ]);

  const accepted = (x: number): number =>
    normalBetween((acceptance.lower - x) / u, (acceptance.upper - x) / u);
  const density = (x: number): number => normalDensity((x - mean) / deviation) / deviation;
  const first = mean - REACH * deviation;
  const last = mean + REACH * deviation;
  const limits = [tolerance.lower, tolerance.upper].filter(Number.isFinite);
  const bends = [...around(mean, deviation), ...around(acceptance.lower, u), ...around(acceptance.upper, u)];
  const points = [...limits, ...bends].filter((x) => x >= first && x <= last).sort((x, y) => x - y);

  let producer = 0;
  let consumer = 0;
  points.slice(1).forEach((to, i) => {
    const from = item(points, i);
    const middle = from / 2 + to / 2;
    const isConforming = middle >= tolerance.lower && middle <= tolerance.upper;
    if (isConforming) producer += integrate((x) => density(x) * (1 - accepted(x)), from, to);
    else consumer += integrate((x) => density(x) * accepted(x), from, to);
  });
  const conforming = normalBetween(
    (tolerance.lower - mean) / deviation,
    (tolerance.upper - mean) / deviation,
  );
  return { producer: clamp(producer), consumer: clamp(consumer), conforming };
}

/** Keeps the rounding of the integration inside the range of a probability. */
function clamp(probability: number): number {
  return Math.min(1, Math.max(0, probability));
}

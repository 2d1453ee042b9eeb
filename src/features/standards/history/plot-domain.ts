import { Decimal } from '#shared/decimal.ts';
import type { PlotValue } from './plot-geometry.ts';

/** A stretch of an axis, in its own unit. */
export interface Domain {
  low: number;
  high: number;
}

/** A band about zero, with what it stands for. */
export interface Band {
  /** In the unit of the axis. */
  halfWidth: number;
  label: string;
}

/** A limit further out than this many times the data would press the data flat. */
const FARTHEST = 3;

/**
 * What the value axis has to show: the values in force with their U. A withdrawn value may be off by a unit, so
 * it does not stretch the axis; zero is shown unless it lies far from all values.
 */
export function valueDomain(values: readonly PlotValue[], inUnit: (grams: string) => number): Domain {
  const standing = values.filter((value) => value.state === 'in force');
  const ends = (standing.length > 0 ? standing : values).flatMap((value) => {
    const deviation = inUnit(value.deviation);
    const u = value.expandedU === null ? 0 : inUnit(value.expandedU);
    return [deviation - u, deviation + u];
  });
  const [low, high] = [Math.min(...ends), Math.max(...ends)];
  const isZeroFar =
    Math.min(Math.abs(low), Math.abs(high)) > 2 * (high - low) && low * high > 0 && high > low;
  const [from, to] = isZeroFar ? [low, high] : [Math.min(low, 0), Math.max(high, 0)];
  const room = (to - from || Math.abs(to) || 1) * 0.1;
  return { low: from - room, high: to + room };
}

/**
 * The limit that still lets the values be seen: the class's maximum permissible error, or a third of it as the
 * limit for U (OIML R 111-1:2004, 5.1 and 5.2); null where both lie far beyond the values.
 */
export function chooseBand(
  errorLimit: string | null,
  weightClass: string | null,
  domain: Domain,
  inUnit: (grams: string) => number,
): Band | null {
  if (errorLimit === null || weightClass === null) return null;
  const reach = Math.max(Math.abs(domain.low), Math.abs(domain.high));
  const whole = inUnit(errorLimit);
  if (whole <= FARTHEST * reach) return { halfWidth: whole, label: `error limit of class ${weightClass}` };
  const third = new Decimal(whole).div(3).toNumber();
  if (third > FARTHEST * reach) return null;
  return { halfWidth: third, label: `limit for U, a third of the ${weightClass} error limit` };
}

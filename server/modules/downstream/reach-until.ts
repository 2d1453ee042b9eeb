import { DAYS_PER_YEAR } from '#shared/engine/time/calendar.ts';

/** A value and how it grows old: standard uncertainty (g), rate of drift and its standard uncertainty (g per year). */
export interface Ageing {
  u: number;
  rate: number;
  rateU: number;
}

/** The coverage factor that OIML R 111-1, 5.2 speaks of. */
const K = 2;
/** Further than this no drift is foretold. */
const LONGEST_DAYS = Math.floor(50 * DAYS_PER_YEAR);

/**
 * U (k = 2) of a value used, so many days after its calibration, at what its certificate states: the uncertainty of
 * the drift is added in quadrature, the drift itself, which is not corrected for, in full (JCGM 100:2008, F.2.4.5,
 * from memory).
 */
export function expandedUAfter({ u, rate, rateU }: Ageing, days: number): number {
  const years = days / DAYS_PER_YEAR;
  return K * Math.hypot(u, rateU * years) + Math.abs(rate) * years;
}

/**
 * How many whole days after its calibration a value still holds a U of at most `limit`, g. 0 where it does so only on
 * the day itself, or not even then; null for more than 50 years.
 */
export function lastDayWithin(ageing: Ageing, limit: number): number | null {
  if (expandedUAfter(ageing, LONGEST_DAYS) <= limit) return null;
  let within = 0;
  let beyond = LONGEST_DAYS;
  // U only grows with time: the place where it passes the limit is halved in.
  while (beyond - within > 1) {
    const middle = Math.floor((within + beyond) / 2);
    if (expandedUAfter(ageing, middle) <= limit) within = middle;
    else beyond = middle;
  }
  return within;
}

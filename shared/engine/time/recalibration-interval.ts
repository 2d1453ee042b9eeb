import { EngineError } from '../errors.ts';
import { item } from '../linear/entries.ts';
import { requireChoice, requireNumber } from '../quantity/domain.ts';
import { DAYS_PER_YEAR, dayNumber } from './calendar.ts';
import { checkHistory, type HistoryEntry } from './history.ts';
import { type PredictionOptions, predictValue } from './predict-value.ts';

/** A proposal in whole months with the method and the reason for it; the user of the standard decides. */
export type IntervalProposal = { months: number; method: string; reason: string };

/** Method 1: the interval grows or shrinks after each calibration. */
export type Staircase = {
  method: 'staircase';
  currentMonths: number;
  /** Deviation found, and the permissible one, in one unit. */
  deviation: number;
  maximumPermissibleError: number;
  /** Lengthen where |deviation| is at most this share of the permissible error; 0.8 unless given. */
  lengthenWithin?: number;
  /** Factors on the interval; 1.5 and 0.5 unless given. Common practice, no source. */
  lengthenBy?: number;
  shortenBy?: number;
};

/** Method 2: the drift line with its uncertainty is carried on until it may leave the limits. */
export type ControlChart = {
  method: 'control-chart';
  history: HistoryEntry[];
  /** The value may lie between -limit and +limit about `target` (0 unless given), in the unit of the history. */
  limit: number;
  target?: number;
  /** Multiple of the predicted standard uncertainty that has to stay inside; 2 unless given. */
  coverageFactor?: number;
  prediction?: Pick<PredictionOptions, 'covariance' | 'interventions' | 'scatter'>;
};

/** Method 3: the interval counts uses (weighings, hours) and is turned into months by the observed rate. */
export type InUseTime = {
  method: 'in-use-time';
  /** Uses allowed between calibrations, and those counted in the months since the last one. */
  allowedUses: number;
  countedUses: number;
  countedMonths: number;
};

/** Bounds that the user's programme sets; 1 and 60 months unless given. Common practice, no source. */
export type IntervalBounds = { minimumMonths?: number; maximumMonths?: number };

/**
 * Proposes the time from the last calibration to the next by one of the methods of OIML D 10 / ILAC-G24:2022, 6.2 to 6.4
 * (titles read in a reproduction). The document gives no step sizes: factors, shares and bounds are the user's
 * programme. A control chart that may be beyond its limit from the start proposes 0 months: calibrate before use.
 * @throws EngineError `unknown-choice`, `out-of-range`, `not-finite`, `backwards` for bounds the wrong way
 * round, those of `predictValue`
 */
export function recalibrationInterval(
  a: (Staircase | ControlChart | InUseTime) & IntervalBounds,
): IntervalProposal {
  const minimum = requireNumber(a.minimumMonths ?? 1, 'minimumMonths', { min: 1, max: 1200 });
  const maximum = requireNumber(a.maximumMonths ?? 60, 'maximumMonths', { min: 1, max: 1200 });
  if (minimum > maximum) {
    throw new EngineError(
      'backwards',
      'minimumMonths',
      minimum,
      `At most the longest interval of ${maximum} months is expected.`,
    );
  }
  requireChoice(a.method, 'method', ['staircase', 'control-chart', 'in-use-time']);
  if (a.method === 'staircase') return staircase(a, minimum, maximum);
  if (a.method === 'control-chart') return controlChart(a, maximum);
  return inUseTime(a, maximum);
}

/** Whole months, rounded down; a product such as 100 x 0.29 that misses its integer by rounding still counts. */
function wholeMonths(months: number): number {
  return Math.floor(months + 1e-9);
}

function staircase(a: Staircase, minimum: number, maximum: number): IntervalProposal {
  requireNumber(a.currentMonths, 'currentMonths', { above: 0 });
  requireNumber(a.deviation, 'deviation');
  requireNumber(a.maximumPermissibleError, 'maximumPermissibleError', { above: 0 });
  const within = requireNumber(a.lengthenWithin ?? 0.8, 'lengthenWithin', { min: 0, max: 1 });
  const longer = requireNumber(a.lengthenBy ?? 1.5, 'lengthenBy', { min: 1 });
  const shorter = requireNumber(a.shortenBy ?? 0.5, 'shortenBy', { above: 0, max: 1 });
  const share = Math.abs(a.deviation) / a.maximumPermissibleError;
  const percent = `${(100 * share).toPrecision(3)} % of the maximum permissible error`;
  const bounded = (months: number) => wholeMonths(Math.min(maximum, Math.max(minimum, months)));
  const method = 'staircase (OIML D 10, 6.2)';
  if (share > 1) {
    return {
      months: bounded(a.currentMonths * shorter),
      method,
      reason: `Found at ${percent}: outside, so the interval shrinks.`,
    };
  }
  if (share <= within) {
    const limit = `within ${(100 * within).toPrecision(3)} %`;
    return {
      months: bounded(a.currentMonths * longer),
      method,
      reason: `Found at ${percent}: ${limit}, so the interval grows.`,
    };
  }
  return {
    months: bounded(a.currentMonths),
    method,
    reason: `Found at ${percent}: inside but near it, so the interval stays.`,
  };
}

function controlChart(a: ControlChart, maximum: number): IntervalProposal {
  requireNumber(a.limit, 'limit', { above: 0 });
  const target = requireNumber(a.target ?? 0, 'target');
  const k = requireNumber(a.coverageFactor ?? 2, 'coverageFactor', { min: 0 });
  const days = checkHistory(a.history, 2);
  const last = item(a.history, days.indexOf(Math.max(...days))).date;
  const method = 'control chart (OIML D 10, 6.3)';
  const reach = (months: number) => {
    const { value, standardUncertainty } = predictValue(a.history, monthsLater(last, months), a.prediction);
    return Math.abs(value - target) + k * standardUncertainty;
  };
  const drift = `${predictValue(a.history, last, a.prediction).slope.toPrecision(2)} per year`;
  if (reach(0) > a.limit) {
    return {
      months: 0,
      method,
      reason: `Drifting ${drift}, the value may be beyond the limit already; calibrate before use.`,
    };
  }
  let months = 0;
  while (months < maximum && reach(months + 1) <= a.limit) months += 1;
  const reason =
    months >= wholeMonths(maximum)
      ? `Drifting ${drift}, the value stays inside the limit for the longest interval allowed.`
      : `Drifting ${drift}, the value may leave the limit after ${months} months.`;
  return { months: Math.min(months, wholeMonths(maximum)), method, reason };
}

/** The date so many twelfths of a year later. */
function monthsLater(date: string, months: number): string {
  const day = dayNumber(date, 'date') + Math.round((months * DAYS_PER_YEAR) / 12);
  return new Date(day * 86_400_000).toISOString().slice(0, 10);
}

function inUseTime(a: InUseTime, maximum: number): IntervalProposal {
  requireNumber(a.allowedUses, 'allowedUses', { above: 0 });
  requireNumber(a.countedUses, 'countedUses', { min: 0 });
  requireNumber(a.countedMonths, 'countedMonths', { above: 0 });
  const method = 'in-use time (OIML D 10, 6.4)';
  const rate = a.countedUses / a.countedMonths;
  const exact = rate > 0 ? (a.allowedUses * a.countedMonths) / a.countedUses : maximum;
  const months = wholeMonths(Math.min(maximum, exact));
  const pace = `At ${rate.toPrecision(3)} uses a month`;
  if (a.countedUses >= a.allowedUses) {
    return {
      months,
      method,
      reason: `${pace} the ${a.allowedUses} allowed lasted ${months} months and are used up; calibrate before use.`,
    };
  }
  const reason =
    exact >= maximum
      ? `${pace} the ${a.allowedUses} allowed outlast the longest interval allowed.`
      : `${pace} the ${a.allowedUses} allowed last ${months} months.`;
  return { months, method, reason };
}

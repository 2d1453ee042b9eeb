import { EngineError } from '../errors.ts';
import { entry, item } from '../linear/entries.ts';
import { quadraticForm } from '../linear/matrix.ts';
import { requireNumber } from '../quantity/domain.ts';
import { coverageFactor } from '../uncertainty/coverage-factor.ts';
import { dayNumber, yearsBetween } from './calendar.ts';
import { crossedIntervention, type Intervention } from './epochs.ts';
import { diagonalCovariance, fitLine, type LinearFit } from './fit-line.ts';
import { checkHistory, type HistoryEntry } from './history.ts';

/** How a history is to be read. */
export type PredictionOptions = {
  /**
   * Covariance of the calibrations in the order of the history, variances included: calibrations that share a
   * reference move together. It replaces the standard uncertainties of the history.
   */
  covariance?: number[][];
  /** Interventions in the life of the standard; a history or a date beyond one is refused. */
  interventions?: Intervention[];
  /** `observed` widens the uncertainties where the values scatter more than they state; `stated` is the default. */
  scatter?: 'stated' | 'observed';
  /** Standard uncertainty of a calibration still to come; the interval then is for its result. */
  nextStandardUncertainty?: number;
  /** Probability of the interval, 0.95 unless given. */
  probability?: number;
};

/** What the line says at the date asked for, in the unit of the history. */
export type Prediction = {
  value: number;
  standardUncertainty: number;
  /** Change in a year of 365.25 days, and its standard uncertainty. */
  slope: number;
  slopeUncertainty: number;
  /** Calibrations - 2. */
  degreesOfFreedom: number;
  chiSquared: number;
  /** Root of chi squared over degrees of freedom; 1 with none. Well above 1 a line does not describe the history. */
  birgeRatio: number;
  /** Where the value, or the next result, lies with the probability asked for. */
  interval: [number, number];
};

/**
 * Value and uncertainty of a standard at a date, by a line through its calibrations weighted by their
 * uncertainties (covariance where calibrations share upstream). One unit throughout; rates per year.
 * With two calibrations the line cannot contradict them; its uncertainty away from them says so.
 * Source: JCGM 100:2008, H.3 and 5.2; covariance between calibrations by generalised least squares.
 * @throws EngineError `too-few-values` under two calibrations, `one-date`, `not-a-date`, `crosses-epoch`,
 * `no-scatter` for observed scatter of two calibrations, `size-mismatch`, `not-positive-definite`,
 * `not-symmetric`, `not-finite`, `out-of-range`
 */
export function predictValue(
  history: HistoryEntry[],
  at: string,
  options: PredictionOptions = {},
): Prediction {
  const days = checkHistory(history, 2);
  const when = dayNumber(at, 'at');
  if (days.every((day) => day === days[0])) {
    throw new EngineError('one-date', 'history', 'calibrations of one date', 'A drift needs two dates.');
  }
  requireOneEpoch(history, at, options.interventions ?? []);
  // The line is fitted about the middle of the history, where intercept and slope hardly depend on each other, and
  // read off at the date asked for: fitted about a far date they would lose digits to each other.
  const middle = days.reduce((sum, day) => sum + day, 0) / days.length;
  const fit = fitLine(
    days.map((day) => yearsBetween(middle, day)),
    history.map(({ value }) => value),
    options.covariance ?? diagonalCovariance(history.map(({ standardUncertainty }) => standardUncertainty)),
  );
  return summarize(fit, yearsBetween(middle, when), options);
}

/** @param years from the origin of the fit to the date asked for */
function summarize(fit: LinearFit, years: number, options: PredictionOptions): Prediction {
  const { chiSquared, degreesOfFreedom } = fit;
  const observed = options.scatter === 'observed';
  if (observed && degreesOfFreedom === 0) {
    throw new EngineError(
      'no-scatter',
      'options.scatter',
      'observed, with two calibrations',
      'Two calibrations show no scatter about their line; use stated.',
    );
  }
  const birgeRatio = degreesOfFreedom > 0 ? Math.sqrt(chiSquared / degreesOfFreedom) : 1;
  const widening = observed ? Math.max(1, birgeRatio) : 1;
  const standardUncertainty = widening * Math.sqrt(quadraticForm(fit.covariance, [1, years]));
  const next = requireNumber(options.nextStandardUncertainty ?? 0, 'options.nextStandardUncertainty', {
    min: 0,
  });
  const probability = requireNumber(options.probability ?? 0.95, 'options.probability', {
    above: 0,
    below: 1,
  });
  const k = coverageFactor(probability, observed ? degreesOfFreedom : Infinity);
  const halfWidth = k * Math.hypot(standardUncertainty, next);
  const slope = item(fit.parameters, 1);
  const value = item(fit.parameters, 0) + slope * years;
  return {
    value,
    standardUncertainty,
    slope,
    slopeUncertainty: widening * Math.sqrt(entry(fit.covariance, 1, 1)),
    degreesOfFreedom,
    chiSquared,
    birgeRatio,
    interval: [value - halfWidth, value + halfWidth],
  };
}

/** No drift is fitted across an adjustment or a damage, and none is carried beyond it. */
function requireOneEpoch(history: HistoryEntry[], at: string, interventions: Intervention[]): void {
  const crossed = crossedIntervention([...history, { date: at }], interventions);
  if (!crossed) return;
  throw new EngineError(
    'crosses-epoch',
    'history',
    `dates on both sides of the intervention of ${crossed.firstBad}`,
    'Use the calibrations of one epoch, and a date in it.',
  );
}

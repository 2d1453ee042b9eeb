import { item } from '../linear/entries.ts';
import { normalUpperTail } from '../uncertainty/normal-distribution.ts';
import { requireLevel } from '../quantity/domain.ts';
import { yearsBetween } from './calendar.ts';
import { diagonalCovariance, fitLinear } from './fit-line.ts';
import { checkHistory, type HistoryEntry } from './history.ts';

/** A possible step between two calibrations, put as a question. */
export type StepQuestion = {
  /** Dates of the calibrations it lies between. */
  between: [string, string];
  step: number;
  standardUncertainty: number;
  /** Probability of a step at least as clear somewhere in a history without one. */
  pValue: number;
  question: string;
};

/** A question, none, or why the history cannot tell. */
export type StepAnswer =
  | { outcome: 'question'; question: StepQuestion }
  | { outcome: 'no question' }
  | { outcome: 'cannot be judged'; reason: string };

/**
 * Looks for a step in the drift line of one epoch. A step found is a question whether something happened to the
 * standard (a new epoch), never an answer: nothing is split or removed. Each place between two calibrations is
 * tried with a line plus a step, by stated uncertainties; the probability is multiplied by the number of places.
 * Fewer than four calibrations cannot tell a step from a drift.
 * Source: generalised least squares with a step as third column (own); Bonferroni's bound over the places.
 * @param options.level probability of a false question, 0.01 unless given
 * @throws EngineError `too-few-values` without calibrations, `not-a-date`, `not-finite`, `out-of-range`,
 * `size-mismatch`, `not-positive-definite`, `out-of-range`
 */
export function stepQuestion(
  history: HistoryEntry[],
  options: { covariance?: number[][]; level?: number } = {},
): StepAnswer {
  const days = checkHistory(history, 1);
  const level = requireLevel(options.level ?? 0.01);
  const places = placesOf(days);
  if (history.length < 4 || places.length < 3) {
    return {
      outcome: 'cannot be judged',
      reason: 'A step can be told from a drift only with four calibrations on four dates or more.',
    };
  }
  const covariance =
    options.covariance ?? diagonalCovariance(history.map(({ standardUncertainty }) => standardUncertainty));
  const candidates = places.map((place) => stepAt(history, days, place, covariance, places.length));
  const clearest = candidates.reduce((best, next) => (next.pValue < best.pValue ? next : best));
  if (clearest.pValue > level) return { outcome: 'no question' };
  return { outcome: 'question', question: clearest };
}

/** Neighbouring dates; each pair is a place where a step may lie. */
function placesOf(days: number[]): [number, number][] {
  const dates = [...new Set(days)].sort((a, b) => a - b);
  return dates.slice(1).map((day, i) => [item(dates, i), day]);
}

function stepAt(
  history: HistoryEntry[],
  days: number[],
  [before, after]: [number, number],
  covariance: number[][],
  places: number,
): StepQuestion {
  const basis = days.map((day) => [1, yearsBetween(before, day), day >= after ? 1 : 0]);
  const fit = fitLinear(basis, history.map(({ value }) => value), covariance); // prettier-ignore
  const step = item(fit.parameters, 2);
  const standardUncertainty = Math.sqrt(item(item(fit.covariance, 2), 2));
  const dateOf = (day: number) => item(history, days.indexOf(day)).date;
  const between: [string, string] = [dateOf(before), dateOf(after)];
  return {
    between,
    step,
    standardUncertainty,
    pValue: Math.min(1, 2 * places * normalUpperTail(Math.abs(step) / standardUncertainty)),
    question: `Between ${between[0]} and ${between[1]} the value seems to step. Did something happen to the standard?`,
  };
}

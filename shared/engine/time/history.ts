import { EngineError } from '../errors.ts';
import { requireNumber } from '../quantity/domain.ts';
import { dayNumber } from './calendar.ts';

/** One calibration in the history of a standard: value and standard uncertainty in one unit throughout. */
export type HistoryEntry = { date: string; value: number; standardUncertainty: number };

/**
 * Checks a history and gives the day number of each entry, in the order received.
 * @throws EngineError `too-few-values`, `not-a-date`, `not-finite`, `out-of-range`
 */
export function checkHistory(history: readonly HistoryEntry[], atLeast: number): number[] {
  if (history.length < atLeast) {
    throw new EngineError(
      'too-few-values',
      'history',
      `${history.length} calibrations`,
      `At least ${atLeast} are needed.`,
    );
  }
  return history.map((entry, i) => {
    requireNumber(entry.value, `history[${i}].value`);
    requireNumber(entry.standardUncertainty, `history[${i}].standardUncertainty`, { above: 0 });
    return dayNumber(entry.date, `history[${i}].date`);
  });
}

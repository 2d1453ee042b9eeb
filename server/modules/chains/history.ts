import type { StandardDossier, StoredHistoryValue, StoredValue } from './stored.ts';

/**
 * The value of the same standard, kind, medium and epoch that was determined just before this one; null: none.
 * @param horizon what was recorded later than this instant was not known yet: it changes no answer about the past
 */
export function historyBefore(
  dossier: StandardDossier,
  value: StoredValue,
  horizon: string,
): StoredHistoryValue | null {
  let before: StoredHistoryValue | null = null;
  for (const row of dossier.history) {
    const isComparable =
      row.calibrationId !== value.calibrationId &&
      row.quantity === value.quantity &&
      row.medium === value.medium &&
      row.epochN === value.epochN;
    const isEarlier =
      row.performedEnd < value.performedEnd || (row.performedEnd === value.performedEnd && row.id < value.id);
    if (isComparable && isEarlier && row.recordedAt <= horizon) before = row;
  }
  return before;
}

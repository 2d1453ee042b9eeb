interface Epoch {
  id: string;
  n: number;
  beginsOn: string;
}

/**
 * The epoch a result belongs to: the latest that begins on or before the last day of the calibration. A result
 * "as found" precedes the adjustment made meanwhile, so it belongs to the epoch that was running when the
 * calibration began. What lies before the first epoch belongs to the first.
 * @throws Error for a standard without epochs, which registration never leaves
 */
export function epochOn<E extends Epoch>(
  epochs: readonly E[],
  stage: 'as found' | 'as left' | null,
  performedBegin: string,
  performedEnd: string,
): E {
  const inOrder = epochs.toSorted((a, b) => a.n - b.n);
  const running = inOrder.filter((epoch) =>
    stage === 'as found' ? epoch.beginsOn < performedBegin : epoch.beginsOn <= performedEnd,
  );
  const chosen = running.at(-1) ?? inOrder[0];
  if (!chosen) throw new Error('A standard has at least its first epoch');
  return chosen;
}

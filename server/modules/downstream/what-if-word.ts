import type { ClassVerdict, WhatIfWord } from '#shared/contracts/downstream.ts';

/** What a word is decided from. */
export interface Consequence {
  /** Grams; NaN where not computable. */
  shift: number;
  /** U as stated, and with what the changes add; NaN where none is stated. */
  expandedU: number;
  expandedUAfter: number;
  /** Whether the changes add to its uncertainty. */
  isRaised: boolean;
  isLost: boolean;
  isBeyondLimit: boolean;
  before: ClassVerdict;
  after: ClassVerdict;
}

/** From weak to strong. */
export const WORDS = ['none', 'material', 'verdict changes'] as const satisfies readonly WhatIfWord[];

/**
 * The place in `WORDS` of the one word for a value. A verdict that changes is never suppressed; what cannot be
 * computed any more, since something above it is withdrawn, counts as one. Beyond that a shift or a growth of U
 * above `threshold` times U is material; without U, and below a class limit that no longer covers, any change is.
 */
export function wordOf(row: Consequence, threshold: number): number {
  if (row.isLost) return 2;
  const isBothJudged = row.before !== 'not judged' && row.after !== 'not judged';
  if (isBothJudged && row.before !== row.after) return 2;
  if (row.isBeyondLimit) return 1;
  if (Number.isNaN(row.expandedU)) return row.shift !== 0 || row.isRaised ? 1 : 0;
  const growth = row.expandedUAfter - row.expandedU;
  return Math.max(Math.abs(row.shift), growth) > threshold * row.expandedU ? 1 : 0;
}

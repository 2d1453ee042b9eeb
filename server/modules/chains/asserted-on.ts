import type { Asserted } from './stored.ts';

/** The assertion that holds on a day, as known by an instant: the latest recorded one that covers the day. */
export function assertedOn<A extends Asserted>(
  assertions: readonly A[],
  day: string,
  knownAt: string,
): A | null {
  let latest: A | null = null;
  for (const assertion of assertions) {
    const covers = assertion.validFrom <= day && (assertion.validTo === null || assertion.validTo >= day);
    if (!covers || assertion.recordedAt > knownAt) continue;
    if (!latest || assertion.actSeq > latest.actSeq) latest = assertion;
  }
  return latest;
}

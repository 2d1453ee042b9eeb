import type { Closure } from './chain-store.ts';
import type { StoredValue } from './stored.ts';

/** Tier of each value and source by uid: 0 for the focus, else the longest way down to it. */
export function tiersOf(closure: Closure, focus: StoredValue): Map<string, number> {
  const byId = new Map(closure.values.map((value) => [value.id, value]));
  const tiers = new Map<string, number>([[focus.uid, 0]]);
  // Children come after their references in a closure: from its end, every child is met before its references.
  for (const value of closure.values.toReversed()) {
    const below = tiers.get(value.uid);
    if (below === undefined) continue;
    const raise = (uid: string) => tiers.set(uid, Math.max(tiers.get(uid) ?? 0, below + 1));
    for (const { parentId } of value.parents) raise(byId.get(parentId)!.uid);
    for (const { sourceId } of value.sources) raise(closure.sources.get(sourceId)!.uid);
  }
  return tiers;
}

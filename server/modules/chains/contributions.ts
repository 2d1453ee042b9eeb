import type { z } from 'zod';
import type { Contribution } from '#shared/contracts/chains.ts';
import { groupKey } from '#shared/engine/network/network.ts';
import type { Propagation } from '#shared/engine/network/propagate.ts';
import { groupMembers } from './chain-network.ts';
import type { Closure } from './chain-store.ts';
import type { StoredValue } from './stored.ts';

type ContributionRow = z.infer<typeof Contribution>;

/**
 * Where the focus's uncertainty comes from: shares of its variance by origin, largest first. Null where the
 * uncertainty is not computable.
 */
export function contributionsOf(
  closure: Closure,
  propagation: Propagation,
  origins: Origins = originsByKey(closure),
): ContributionRow[] | null {
  if (propagation.standardUncertainty === null) return null;
  const total = propagation.standardUncertainty ** 2;
  return Object.entries(propagation.contributions)
    .filter(([, variance]) => variance !== 0)
    .map(([key, variance]) => ({ ...origins.get(key)!, share: total === 0 ? 0 : variance / total }))
    .sort((a, b) => Math.abs(b.share) - Math.abs(a.share));
}

type Origin = Omit<ContributionRow, 'share'>;
export type Origins = ReadonlyMap<string, Origin>;

/** What each key of a propagation stands for: once for every chain worked out over one closure. */
export function originsByKey(closure: Closure): Origins {
  const usedByLimit = new Set(
    closure.values.flatMap((value) =>
      value.parents.filter((l) => l.usedAs === 'class limit').map((l) => l.parentId),
    ),
  );
  const origins = new Map<string, Origin>();
  for (const value of closure.values) {
    origins.set(value.uid, { uids: [value.uid], label: value.registryNo, kind: kindOf(value, usedByLimit) });
  }
  for (const source of closure.sources.values()) {
    origins.set(source.uid, { uids: [source.uid], label: source.name, kind: 'source' });
  }
  const byUid = new Map(closure.values.map((value) => [value.uid, value]));
  groupMembers(closure).forEach((uids, index) => {
    const certificate = byUid.get(uids[0] ?? '')?.certificateNo ?? '';
    origins.set(groupKey(index), { uids, label: `Weighing design, ${certificate}`, kind: 'weighing design' });
  });
  return origins;
}

function kindOf(value: StoredValue, usedByLimit: Set<number>): Origin['kind'] {
  if (usedByLimit.has(value.id)) return 'class limit';
  return value.rootKind ? 'root' : 'local part';
}

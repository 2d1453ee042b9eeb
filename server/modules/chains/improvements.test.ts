import { describe, expect, it } from 'vitest';
import { chainNumbers } from './chain-numbers.ts';
import type { Closure } from './chain-store.ts';
import { contributionsOf } from './contributions.ts';
import { improvementsOf } from './improvements.ts';
import type { StoredSource, StoredValue } from './stored.ts';

const VOLUME = 7;

/** Two values: a reference R whose volume is badly known, and a weight W of equal density weighed against it. */
function sharedVolume(): { closure: Closure; focus: StoredValue } {
  const value = (id: number, uid: string, localU: number, parents: number[], volume: number) =>
    ({
      id,
      uid,
      registryNo: uid,
      certificateNo: `C-${uid}`,
      localU,
      localDegreesOfFreedom: null,
      localEstimate: null,
      groupId: null,
      rootKind: parents.length === 0 ? 'recognized certificate' : null,
      k: '2',
      parents: parents.map((parentId) => ({
        parentId,
        role: 'reference',
        sensitivity: 1,
        usedAs: 'certificate',
      })),
      sources: [{ sourceId: VOLUME, sensitivity: volume }],
    }) as unknown as StoredValue;
  const reference = value(1, 'R', 3e-5, [], 1);
  const focus = value(2, 'W', 4e-5, [1], -1);
  const source = {
    id: VOLUME,
    uid: 'volume of R',
    kind: 'volume',
    name: 'Volume of R',
    u: 5e-4,
    degreesOfFreedom: null,
    estimate: null,
    standardId: null,
    registryNo: 'R',
  } as unknown as StoredSource;
  return {
    closure: { values: [reference, focus], sources: new Map([[VOLUME, source]]), groups: new Map() },
    focus,
  };
}

describe('what would help most', () => {
  it('takes no credit for a volume that cancels between the reference and its use', () => {
    const { closure, focus } = sharedVolume();
    const { propagation } = chainNumbers(closure, focus.uid);
    expect(propagation.standardUncertainty).toBeCloseTo(5e-5, 12);
    const rows = improvementsOf(
      closure,
      focus,
      propagation,
      contributionsOf(closure, propagation),
      new Map(),
      '2026-12-01',
    );
    const reference = rows.find((row) => row.action.includes('half the uncertainty'))!;
    expect(reference.expandedUThen).toBeCloseTo(2 * Math.sqrt(1.5e-5 ** 2 + 4e-5 ** 2), 12);
  });
});

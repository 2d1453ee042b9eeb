import { SECOND_LEVEL } from './laboratories.ts';
import { addSet, FULL_SET, GRAM_SET, HEAVY_SET } from './pieces.ts';
import { CONVENTIONAL, SUBSTITUTION, type Pools } from './pools.ts';
import { fromPool, roundsFrom, type Series } from './series.ts';
import type { World } from './world.ts';

/** A laboratory with F1 weights from the second level, and F2 weights that it calibrates working weights with. */
export function addThirdLevel(world: World, pools: Pools, code: string, at: number): Series[] {
  const provider = SECOND_LEVEL[at % SECOND_LEVEL.length]!;
  const start = `2017-0${4 + at}`;
  const set = { owner: code, inServiceFrom: `${start}-05`, intervalMonths: 24 };
  const heavy = provider === 'KW' ? HEAVY_SET.slice(0, -1) : HEAVY_SET;
  const f1 = addSet(world, {
    ...set,
    registryNo: `${code} 0100`,
    name: 'Reference set',
    class: 'F1',
    nominals: [...heavy.toReversed(), ...FULL_SET],
  });
  const f2 = addSet(world, {
    ...set,
    registryNo: `${code} 0200`,
    name: 'Working set',
    class: 'F2',
    nominals: [...heavy.toReversed(), ...GRAM_SET],
  });
  pools.f1.set(code, f1);
  pools.f2.set(code, f2);
  return [
    {
      id: `${code} reference set`,
      issuer: provider,
      weights: f1,
      quantities: CONVENTIONAL,
      method: SUBSTITUTION,
      how: 'comparison',
      ownShare: 0.1,
      isAccredited: true,
      hasBudget: false,
      wishesFor: fromPool(pools.e2.get(provider)!),
      begins: roundsFrom(`${code} reference set`, `${start}-18`, 24),
      workDays: 4,
      issueDays: 7,
      isLeaf: (weight) => weight.grams < 0.5,
    },
    {
      id: `${code} working set`,
      issuer: code,
      weights: f2,
      quantities: CONVENTIONAL,
      method: SUBSTITUTION,
      how: 'comparison',
      ownShare: 0.08,
      isAccredited: false,
      hasBudget: true,
      wishesFor: fromPool(f1),
      begins: roundsFrom(`${code} working set`, `2017-${String(6 + at).padStart(2, '0')}-12`, 24),
      workDays: 3,
      issueDays: 2,
    },
  ];
}

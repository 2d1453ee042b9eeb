import { THIRD_LEVEL } from './laboratories.ts';
import { addSet, addWeight, GRAM_SET, HEAVY_SET } from './pieces.ts';
import { CONVENTIONAL, SUBSTITUTION, type Pools } from './pools.ts';
import { fromPool, roundsFrom, type Series } from './series.ts';
import type { World } from './world.ts';

/** A works laboratory: M1 weights from the third level, and its own M2 and M3 weights. */
export function addWorks(world: World, pools: Pools, code: string, at: number): Series[] {
  const provider = THIRD_LEVEL[at]!;
  const set = { owner: code, inServiceFrom: `2018-0${1 + at}-08` };
  const m1 = addSet(world, {
    ...set,
    registryNo: `${code} 0100`,
    name: 'Reference weights',
    class: 'M1',
    nominals: [...HEAVY_SET.toReversed(), ...GRAM_SET],
    intervalMonths: 24,
  });
  const small = addSet(world, {
    ...set,
    registryNo: `${code} 0200`,
    name: 'Working weights',
    class: 'M2',
    nominals: ['1000', '500', '200', '200', '100', '50'],
    intervalMonths: 24,
  });
  const blocks = Array.from({ length: 8 }, (_, n) =>
    addWeight(world, {
      ...set,
      registryNo: `${code} ${String(301 + n).padStart(4, '0')}`,
      nominal: '20000',
      class: n < 4 ? 'M2' : 'M3',
      shape: 'block',
      material: 'cast iron',
      density: { value: '7100', expandedU: '600', origin: 'assumed' },
      serial: `${code}${301 + n}`,
      intervalMonths: 24,
    }),
  );
  const work = {
    issuer: code,
    quantities: CONVENTIONAL,
    method: SUBSTITUTION,
    how: 'comparison',
    isAccredited: false,
    hasBudget: true,
    workDays: 1,
    issueDays: 1,
    isLeaf: () => true,
  } as const;
  return [
    {
      ...work,
      id: `${code} reference weights`,
      issuer: provider,
      weights: m1,
      ownShare: 0.06,
      isAccredited: true,
      hasBudget: false,
      wishesFor: fromPool(pools.f2.get(provider)!),
      begins: roundsFrom(`${code} reference weights`, `2018-0${2 + at}-05`, 24),
      issueDays: 4,
      isLeaf: (weight) => weight.grams < 50,
    },
    {
      ...work,
      id: `${code} working weights`,
      weights: small,
      ownShare: 0.05,
      wishesFor: fromPool(m1),
      begins: roundsFrom(`${code} working weights`, `2018-0${4 + at}-05`, 24),
    },
    {
      ...work,
      id: `${code} blocks M2`,
      weights: blocks.slice(0, 4),
      ownShare: 0.05,
      wishesFor: fromPool(m1),
      begins: roundsFrom(`${code} blocks M2`, `2018-0${4 + at}-16`, 24),
    },
    {
      ...work,
      id: `${code} blocks M3`,
      weights: blocks.slice(4),
      ownShare: 0.05,
      wishesFor: fromPool(m1, 'class limit'),
      begins: roundsFrom(`${code} blocks M3`, `2018-0${4 + at}-23`, 24),
    },
  ];
}

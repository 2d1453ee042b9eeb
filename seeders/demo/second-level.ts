import { INSTITUTE } from './laboratories.ts';
import { addSet, FULL_SET, HEAVY_SET } from './pieces.ts';
import { BOTH, CONVENTIONAL, SUBSTITUTION, type Pools } from './pools.ts';
import { fromPool, roundsFrom, type Series } from './series.ts';
import type { World } from './world.ts';

/** Institutes abroad that calibrate the E1 sets of some laboratories. */
const ABROAD: Record<string, string> = { KW: 'VI', UM: 'LH' };

/** A laboratory with an E1 set from an institute, and E2 weights that it calibrates for others with. */
export function addSecondLevel(world: World, pools: Pools, code: string, at: number): Series[] {
  const start = `2017-0${1 + at}`;
  const set = { owner: code, inServiceFrom: `${start}-03` };
  const e1 = addSet(world, {
    ...set,
    registryNo: `${code} 0100`,
    name: 'Reference set',
    class: 'E1',
    nominals: FULL_SET,
    intervalMonths: 36,
  });
  const e2 = addSet(world, {
    ...set,
    registryNo: `${code} 0200`,
    name: 'Working set',
    class: 'E2',
    nominals: FULL_SET,
    intervalMonths: 24,
  });
  const heavy = addSet(world, {
    ...set,
    registryNo: `${code} 0300`,
    name: 'Heavy weights',
    class: 'E2',
    nominals: HEAVY_SET,
    intervalMonths: 36,
  });
  pools.e1.set(code, e1);
  pools.e2.set(code, [...e2, ...heavy]);
  const abroad = ABROAD[code];
  const received = {
    isAccredited: true,
    hasBudget: false,
    ownShare: 0.04,
    workDays: 6,
    issueDays: 8,
  } as const;
  return [
    {
      ...received,
      id: `${code} reference set`,
      issuer: abroad ?? INSTITUTE,
      weights: e1,
      quantities: abroad ? CONVENTIONAL : BOTH,
      method: SUBSTITUTION,
      how: abroad ? 'recognized certificate' : 'comparison',
      isAccredited: !abroad,
      ownShare: abroad ? 0.065 : 0.04,
      wishesFor: fromPool(pools.institute),
      begins: roundsFrom(`${code} reference set`, `${start}-13`, 36),
    },
    {
      ...received,
      id: `${code} heavy weights`,
      issuer: INSTITUTE,
      weights: heavy,
      quantities: CONVENTIONAL,
      method: SUBSTITUTION,
      how: 'comparison',
      ownShare: 0.05,
      wishesFor: fromPool(pools.heavy),
      begins: roundsFrom(`${code} heavy weights`, `${start}-16`, 36),
    },
    {
      id: `${code} working set`,
      issuer: code,
      weights: e2,
      quantities: CONVENTIONAL,
      method: SUBSTITUTION,
      how: 'comparison',
      ownShare: 0.05,
      isAccredited: false,
      hasBudget: true,
      wishesFor: fromPool(e1),
      begins: roundsFrom(`${code} working set`, `2017-0${2 + at}-13`, 24),
      workDays: 4,
      issueDays: 3,
    },
  ];
}

import { INSTITUTE, SECOND_LEVEL, THIRD_LEVEL, WORKS_LABORATORIES } from './laboratories.ts';
import { addSet, addWeight, FULL_SET, GRAM_SET, HEAVY_SET } from './pieces.ts';
import { addRoots } from './roots.ts';
import { fromPool, roundsFrom, type Series } from './series.ts';
import type { Weight } from './weight.ts';
import type { World } from './world.ts';

const SUBSTITUTION = 'Substitution weighing';
const CONVENTIONAL = ['conventional mass'] as const;
const BOTH = ['conventional mass', 'mass'] as const;

/** The working standards of a laboratory, by level. */
export interface Pools {
  institute: Weight[];
  heavy: Weight[];
  e1: Map<string, Weight[]>;
  e2: Map<string, Weight[]>;
  f1: Map<string, Weight[]>;
  f2: Map<string, Weight[]>;
}

/** Registers the weights of the network and says who calibrates what, against what, when. */
export function addNetwork(world: World): { series: Series[]; pools: Pools } {
  const pools: Pools = {
    institute: [],
    heavy: [],
    e1: new Map(),
    e2: new Map(),
    f1: new Map(),
    f2: new Map(),
  };
  const series = [
    ...addInstitute(world, pools),
    ...SECOND_LEVEL.flatMap((code, at) => addSecondLevel(world, pools, code, at)),
    ...THIRD_LEVEL.flatMap((code, at) => addThirdLevel(world, pools, code, at)),
    ...WORKS_LABORATORIES.flatMap((code, at) => addWorks(world, pools, code, at)),
  ];
  return { series, pools };
}

function addInstitute(world: World, pools: Pools): Series[] {
  const { rootOn } = addRoots(world);
  const own = { owner: INSTITUTE, nominal: '1000', inServiceFrom: '2016-08-15' };
  const prototypes = ['OI 0010', 'OI 0011'].map((registryNo, at) =>
    addWeight(world, {
      ...own,
      registryNo,
      kind: 'prototype',
      marking: `Prototype ${at + 1}`,
      shape: 'cylinder',
      material: 'platinum-iridium',
      density: { value: at === 0 ? '21531.4' : '21532.8', expandedU: '0.8', origin: 'measured' },
      limit: 0.0002,
      intervalMonths: 30,
    }),
  );
  const steels = ['OI 0020', 'OI 0021', 'OI 0022', 'OI 0023'].map((registryNo, at) =>
    addWeight(world, {
      ...own,
      registryNo,
      class: 'E1',
      marking: `Transfer kilogram ${'ABCD'[at]}`,
      shape: 'cylinder',
      density: { value: (7996.2 + 0.7 * at).toFixed(1), expandedU: '0.5', origin: 'measured' },
      intervalMonths: 26,
    }),
  );
  const sets = [1, 2].map((n) =>
    addSet(world, {
      owner: INSTITUTE,
      registryNo: `OI 0${n}00`,
      name: `Working set ${n}`,
      class: 'E1',
      nominals: FULL_SET,
      inServiceFrom: '2016-09-01',
      intervalMonths: 26,
    }),
  );
  pools.institute = sets[0]!;
  pools.heavy = addSet(world, {
    owner: INSTITUTE,
    registryNo: 'OI 0300',
    name: 'Heavy working set',
    class: 'E1',
    nominals: ['2000', '2000', '5000', '10000', '10000', '20000'],
    inServiceFrom: '2016-09-01',
    intervalMonths: 36,
  });
  const work = { issuer: INSTITUTE, isAccredited: false, hasBudget: true, ownShare: 0 };
  const steel = (at: number, sensitivity = 1) => ({ weight: steels[at]!, sensitivity });
  return [
    {
      ...work,
      id: 'OI prototypes',
      weights: prototypes,
      quantities: ['mass'],
      method: 'Vacuum mass comparator and transfer to air',
      how: 'comparison',
      ownU: 4e-6,
      wishesFor: (_, day) => [{ weight: rootOn(day), sensitivity: 1 }],
      begins: roundsFrom('OI prototypes', '2016-10-10', 26),
      workDays: 9,
      issueDays: 4,
    },
    {
      ...work,
      id: 'OI transfer kilograms',
      weights: steels,
      quantities: BOTH,
      method: SUBSTITUTION,
      how: 'comparison',
      ownU: 6e-6,
      wishesFor: () => [{ weight: prototypes[0]!, sensitivity: 1, quantity: 'mass' }],
      begins: roundsFrom('OI transfer kilograms', '2016-10-31', 26),
      workDays: 9,
      issueDays: 4,
    },
    ...sets.map((weights, at): Series => ({
      ...work,
      id: `OI working set ${at + 1}`,
      weights,
      quantities: BOTH,
      method: 'Subdivision by a weighing design',
      how: 'subdivision',
      wishesFor: () => [steel(at)],
      begins: roundsFrom(`OI working set ${at + 1}`, '2016-11-21', 26),
      workDays: 18,
      issueDays: 7,
    })),
    {
      ...work,
      id: 'OI heavy working set',
      weights: pools.heavy,
      quantities: CONVENTIONAL,
      method: 'Build-up by a weighing design',
      how: 'build-up',
      wishesFor: () => [steel(0), steel(1)],
      begins: roundsFrom('OI heavy working set', '2016-11-28', 36),
      workDays: 11,
      issueDays: 7,
    },
  ];
}

/** Institutes abroad that calibrate the E1 sets of some laboratories. */
const ABROAD: Record<string, string> = { KW: 'VI', UM: 'LH' };

function addSecondLevel(world: World, pools: Pools, code: string, at: number): Series[] {
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

function addThirdLevel(world: World, pools: Pools, code: string, at: number): Series[] {
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

function addWorks(world: World, pools: Pools, code: string, at: number): Series[] {
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

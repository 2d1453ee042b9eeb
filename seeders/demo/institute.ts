import { INSTITUTE } from './laboratories.ts';
import { addSet, addWeight, FULL_SET } from './pieces.ts';
import type { StatedProperty } from './plan.ts';
import { BOTH, CONVENTIONAL, SUBSTITUTION, type Pools } from './pools.ts';
import { addRoots } from './roots.ts';
import { roundsFrom, type Series } from './series.ts';
import type { World } from './world.ts';

/** Prototypes, transfer kilograms, two working sets by subdivision, a heavy set by build-up. */
export function addInstitute(world: World, pools: Pools): Series[] {
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
  for (const { registryNo } of steels) {
    const measured = { k: '2', origin: 'measured' } as const;
    const state = (property: StatedProperty) =>
      world.steps.push({ day: own.inServiceFrom, does: 'state property', registryNo, property });
    state({ kind: 'susceptibility', value: '0.0038', expandedU: '0.0006', ...measured });
    state({ kind: 'polarisation', value: '0.12', expandedU: '0.3', ...measured });
  }
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

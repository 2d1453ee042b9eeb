import { placeOf } from './catalogue.ts';
import { daysAfter } from './days.ts';
import { between, drawsFor } from './draws.ts';
import { INSTITUTE } from './laboratories.ts';
import { oldStock } from './old-stock.ts';
import { BOTH, CONVENTIONAL, SUBSTITUTION, type Pools } from './pools.ts';
import { addSet, addWeight, densityOf } from './pieces.ts';
import { fromPool, roundsFrom, type Series } from './series.ts';
import { SUSPENSION } from './capabilities.ts';
import { classLimitOf, type Weight } from './weight.ts';
import type { World } from './world.ts';

const COMPARISON = { method: SUBSTITUTION, how: 'comparison', workDays: 1, issueDays: 2 } as const;
const RECEIVED = { ...COMPARISON, isAccredited: true, hasBudget: false } as const;
const IN_HOUSE = { ...COMPARISON, isAccredited: false, hasBudget: true, quantities: CONVENTIONAL } as const;

/** Work beside the main stream: sums and means of references, an assumed density, work outside a scope. */
export function addSpecials(world: World, pools: Pools): Series[] {
  return [
    ...sumOfReferences(world, pools),
    ...meanOfTwo(world, pools),
    ...assumedDensity(world, pools),
    ...whileScopeRested(world, pools),
    ...beyondScope(world, pools),
    ...belowScope(world, pools),
    ...oldStock(world, pools),
  ];
}

/** 10 kg against 5 kg + 2 kg + 2 kg * + 1 kg: references that share most of what they are made of. */
function sumOfReferences(world: World, pools: Pools): Series[] {
  const heavy = addSet(world, {
    owner: 'TV',
    registryNo: 'TV 0400',
    name: 'Heavy reference weights',
    class: 'E1',
    nominals: ['2000', '2000', '5000'],
    inServiceFrom: '2017-02-06',
    intervalMonths: 36,
  });
  const ten = addWeight(world, {
    owner: 'TV',
    registryNo: 'TV 0410',
    nominal: '10000',
    class: 'E1',
    density: densityOf('E1', '10000', 'TV 0410'),
    inServiceFrom: '2017-02-06',
    intervalMonths: 36,
  });
  const kilogram = pools.e1.get('TV')!.find((weight) => weight.nominal === '1000')!;
  return [
    {
      ...RECEIVED,
      id: 'TV heavy reference weights',
      issuer: INSTITUTE,
      weights: heavy,
      quantities: CONVENTIONAL,
      ownShare: 0.02,
      wishesFor: fromPool(pools.heavy),
      begins: roundsFrom('TV heavy reference weights', '2017-03-06', 36),
    },
    {
      ...IN_HOUSE,
      id: 'TV ten kilograms',
      issuer: 'TV',
      weights: [ten],
      ownShare: 0.01,
      wishesFor: () => [...heavy, kilogram].map((weight) => ({ weight, sensitivity: 1 })),
      begins: roundsFrom('TV ten kilograms', '2017-05-08', 30),
    },
  ];
}

/** The mean of two kilograms from different institutes is better than either. */
function meanOfTwo(world: World, pools: Pools): Series[] {
  const kilogram = (registryNo: string, weightClass: 'E1' | 'E2', intervalMonths: number) =>
    addWeight(world, {
      owner: 'KW',
      registryNo,
      nominal: '1000',
      class: weightClass,
      density: densityOf('E1', '1000', registryNo),
      inServiceFrom: '2017-04-10',
      intervalMonths,
    });
  const second = kilogram('KW 0400', 'E1', 36);
  const checks = ['KW 0411', 'KW 0412', 'KW 0413'].map((registryNo) => kilogram(registryNo, 'E2', 24));
  const first = pools.e1.get('KW')!.find((weight) => weight.nominal === '1000')!;
  return [
    {
      ...RECEIVED,
      id: 'KW second kilogram',
      issuer: INSTITUTE,
      weights: [second],
      quantities: CONVENTIONAL,
      ownShare: 0.04,
      wishesFor: fromPool(pools.institute),
      begins: roundsFrom('KW second kilogram', '2017-05-15', 36),
    },
    {
      ...IN_HOUSE,
      id: 'KW check kilograms',
      omits: (round) => (round >= 1 && round <= 3 ? 'buoyancy' : null),
      issuer: 'KW',
      weights: checks,
      ownShare: 0.004,
      wishesFor: () => [first, second].map((weight) => ({ weight, sensitivity: 0.5 })),
      begins: roundsFrom('KW check kilograms', '2017-09-11', 20),
    },
  ];
}

/**
 * A kilogram of assumed density, its mass far worse known than its conventional mass; used by its mass, the volume
 * falls out of the result again.
 */
function assumedDensity(world: World, pools: Pools): Series[] {
  const kilogram = (registryNo: string, weightClass: 'E1' | 'E2', isAssumed: boolean) =>
    addWeight(world, {
      owner: 'PA',
      registryNo,
      nominal: '1000',
      class: weightClass,
      density: isAssumed
        ? { value: '7950', expandedU: '50', origin: 'assumed' }
        : densityOf('E1', '1000', registryNo),
      inServiceFrom: '2017-05-08',
      intervalMonths: weightClass === 'E1' ? 36 : 24,
    });
  const old = kilogram('PA 0400', 'E1', true);
  const checks = ['PA 0411', 'PA 0412', 'PA 0413'].map((registryNo) => kilogram(registryNo, 'E2', false));
  return [
    {
      ...RECEIVED,
      id: 'PA old kilogram',
      // Its U is rounded more coarsely than what is left of it below; the budget keeps what rounding would lose.
      hasBudget: true,
      issuer: INSTITUTE,
      weights: [old],
      quantities: BOTH,
      ownShare: 0.04,
      wishesFor: fromPool(pools.institute),
      begins: roundsFrom('PA old kilogram', '2017-06-12', 36),
    },
    {
      ...IN_HOUSE,
      id: 'PA check kilograms',
      issuer: 'PA',
      weights: checks,
      ownShare: 0.03,
      wishesFor: () => [{ weight: old, sensitivity: 1, quantity: 'mass' }],
      begins: roundsFrom('PA check kilograms', '2017-09-18', 20),
    },
  ];
}

/** Notes the lines of some rounds as results outside the scope. */
function outsideScope(world: World, kind: string, isFault: (round: number) => boolean): Series['after'] {
  return (round, values) => {
    if (!isFault(round)) return;
    for (const value of values) {
      world.catalogue.push({
        is: 'fault',
        kind,
        rule: 'B-27',
        verdict: 'conduct',
        ...placeOf(value),
        reference: null,
        alsoFoundBy: [],
      });
    }
  };
}

function single(
  world: World,
  owner: string,
  registryNo: string,
  nominal: string,
  weightClass: 'F1' | 'M1',
): Weight {
  return addWeight(world, {
    owner,
    registryNo,
    nominal,
    class: weightClass,
    density: densityOf(weightClass, nominal, registryNo),
    inServiceFrom: '2018-06-04',
    intervalMonths: 24,
  });
}

/** Certificates under accreditation while the scope rested, before and after it. */
function whileScopeRested(world: World, pools: Pools): Series[] {
  const { laboratory } = SUSPENSION;
  return ['WF 0701', 'WF 0702'].map((registryNo, at): Series => {
    const weight = single(world, 'WF', registryNo, at === 0 ? '1000' : '500', 'F1');
    return {
      ...RECEIVED,
      id: `${registryNo} received`,
      issuer: laboratory,
      weights: [weight],
      quantities: CONVENTIONAL,
      ownShare: 0.1,
      ignoresScope: true,
      wishesFor: fromPool(pools.e2.get(laboratory)!),
      begins: ['2019-05-14', at === 0 ? '2021-03-16' : '2021-06-08', '2022-10-11', '2024-08-13'],
      after: outsideScope(world, 'scope exceeded while it rested', (round) => round === 1),
    };
  });
}

/** 20 kg from a laboratory whose scope ends at 10 kg. */
function beyondScope(world: World, pools: Pools): Series[] {
  return [
    {
      ...RECEIVED,
      id: 'AB 0701 received',
      issuer: 'KW',
      weights: [single(world, 'AB', 'AB 0701', '20000', 'F1')],
      quantities: CONVENTIONAL,
      ownShare: 0.1,
      wishesFor: fromPool(pools.e2.get('KW')!),
      begins: ['2018-09-18', '2020-08-11', '2022-07-12'],
      after: outsideScope(world, 'scope exceeded at its upper end', () => true),
    },
  ];
}

/** 500 mg from a laboratory whose scope begins at 1 g. */
function belowScope(world: World, pools: Pools): Series[] {
  return [
    {
      ...RECEIVED,
      id: 'SH 0701 received',
      issuer: 'FC',
      weights: [single(world, 'SH', 'SH 0701', '0.5', 'M1')],
      quantities: CONVENTIONAL,
      ownShare: 0.06,
      wishesFor: fromPool(pools.f1.get('FC')!),
      begins: ['2018-10-16', '2020-09-15'],
      after: outsideScope(world, 'scope exceeded at its lower end', () => true),
    },
  ];
}

/** Wear and knocks that are found at the next calibration and end in an adjustment: small weights nobody leans on. */
export function addDamage(series: readonly Series[]): void {
  for (const { weights, begins, isLeaf } of series) {
    const worn = weights.filter((weight) => isLeaf?.(weight) && weight.class?.startsWith('M'));
    for (const [at, weight] of worn.entries()) {
      const draws = drawsFor(`${weight.registryNo} damage`);
      const round = 1 + (at % 3);
      if (draws.uniform() > 0.3 || begins.length <= round) continue;
      const by = -classLimitOf(weight.class, weight.nominal) * between(draws, 0.95, 1.5);
      weight.truth.steps.push({ from: daysAfter(begins[round]!, -30), by });
    }
  }
}

import { placeOf, type CatalogueEntry } from './catalogue.ts';
import { addWeight } from './pieces.ts';
import { CONVENTIONAL, SUBSTITUTION, type Pools } from './pools.ts';
import { fromPool, type Series } from './series.ts';
import type { DemoValue } from './value.ts';
import { valuesOf, type World } from './world.ts';

const OWNERS = ['TV', 'HM', 'UM'] as const;
const IN_SERVICE = '2018-03-05';

/**
 * A brass block that passes for a weight of class E2 and is relied on for eleven years, and a weight of no known
 * density that was calibrated with it: what is wrong with a weight, and not with a weighing.
 */
export function oldStock(world: World, pools: Pools): Series[] {
  return OWNERS.flatMap((owner) => {
    const brass = addWeight(world, {
      owner,
      registryNo: `${owner} 0801`,
      nominal: '1000',
      class: 'E2',
      shape: 'block',
      material: 'brass',
      density: { value: '8400', expandedU: '50', origin: 'manufacturer' },
      inServiceFrom: IN_SERVICE,
      intervalMonths: 132,
    });
    world.steps.push({
      day: IN_SERVICE,
      does: 'state property',
      registryNo: brass.registryNo,
      property: { kind: 'susceptibility', value: '0.5', expandedU: '0.1', k: '2', origin: 'measured' },
    });
    const unknown = addWeight(world, {
      owner,
      registryNo: `${owner} 0802`,
      nominal: '1000',
      class: 'F1',
      density: null,
      inServiceFrom: IN_SERVICE,
    });
    const work = {
      issuer: owner,
      quantities: CONVENTIONAL,
      method: SUBSTITUTION,
      how: 'comparison',
      isAccredited: false,
      hasBudget: true,
      workDays: 1,
      issueDays: 2,
    } as const;
    const [first, second] = [`${owner} brass block`, `${owner} weight of no known density`];
    return [
      {
        ...work,
        id: first,
        weights: [brass],
        ownShare: 0.03,
        wishesFor: fromPool(pools.e1.get(owner)!),
        begins: ['2018-04-10'],
        after: (_, [value]) => {
          note(world, value!, 'B-04', 'density outside the limits of the class');
          note(world, value!, 'B-06', 'magnetic beyond the limits of the class');
          note(world, value!, 'B-09', 'shape that the class has not');
        },
      },
      {
        ...work,
        id: second,
        weights: [unknown],
        ownShare: 0.1,
        wishesFor: () => [{ weight: brass, sensitivity: 1 }],
        begins: ['2018-06-12'],
        after: (_, [value]) => {
          note(world, value!, 'B-03', 'no density on record');
          const reference = valuesOf(world, first, 0)[0]!;
          note(world, value!, 'B-54', 'relied on for eleven years without a reason', reference);
        },
      },
    ];
  });
}

function note(world: World, value: DemoValue, rule: string, kind: string, reference?: DemoValue): void {
  const entry: CatalogueEntry = {
    is: 'fault',
    kind,
    rule,
    verdict: reference ? 'conduct' : 'today',
    ...placeOf(value),
    reference: reference ? placeOf(reference) : null,
    alsoFoundBy: [],
  };
  world.catalogue.push(entry);
}

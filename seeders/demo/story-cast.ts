import type { WeightClass } from '#shared/contracts/common.ts';
import { placeOf, type CatalogueEntry } from './catalogue.ts';
import { daysAfter } from './days.ts';
import { SECOND_LEVEL, THIRD_LEVEL } from './laboratories.ts';
import type { Omission } from './omissions.ts';
import { addWeight, densityOf } from './pieces.ts';
import { CONVENTIONAL, SUBSTITUTION, type Pools } from './pools.ts';
import { fromPool, type Series } from './series.ts';
import type { DemoValue } from './value.ts';
import type { Weight } from './weight.ts';
import { valuesOf, type World } from './world.ts';

/** Months for which a laboratory of a story relies on its reference. */
export const INTERVAL = 12;

/** Something that happens on a day beside the calibrations. */
export interface Happening {
  day: string;
  happen(): void;
}

/** Where and when a story is told. */
export interface Telling {
  /** Number of the telling, for registry numbers. */
  n: number;
  /** Day of the first calibration of the reference. */
  at: string;
  owner: string;
  nominal: string;
}

/** What the stories of the network add to. */
export interface Cast {
  world: World;
  pools: Pools;
  series: Series[];
  happenings: Happening[];
}

/** A reference weight and a weight of the same nominal that its owner calibrates against it. */
export interface Pair {
  reference: Series;
  working: Series;
}

/** What happens to a pair. */
export interface PairPlan {
  /** Days on which the reference is calibrated. */
  references: string[];
  /** Work with it: which of its values is used, by round or whatever stands then, and what there is to say of it. */
  work: {
    begin: string;
    days?: number;
    uses: number | 'what stands';
    is?: Pick<CatalogueEntry, 'is' | 'kind' | 'rule' | 'verdict'>;
    omits?: Omission;
  }[];
}

/** Registers a pair and plans its calibrations; each piece of work is its own series, so that it keeps its days. */
export function addPair(cast: Cast, { n, at, owner, nominal }: Telling, plan: PairPlan): Pair {
  const { world, pools, series } = cast;
  const provider = SECOND_LEVEL[THIRD_LEVEL.findIndex((code) => code === owner) % SECOND_LEVEL.length]!;
  const single = (number: number, weightClass: WeightClass, intervalMonths: number) => {
    const registryNo = `${owner} ${String(number + n).padStart(4, '0')}`;
    const density = densityOf(weightClass, nominal, registryNo);
    const inServiceFrom = daysAfter(at, -21);
    return addWeight(world, {
      owner,
      registryNo,
      nominal,
      class: weightClass,
      density,
      inServiceFrom,
      intervalMonths,
    });
  };
  const [held, worked] = [single(401, 'F1', INTERVAL), single(501, 'F2', 24)];
  const common = {
    quantities: CONVENTIONAL,
    method: SUBSTITUTION,
    how: 'comparison',
    keepsDays: true,
  } as const;
  const reference: Series = {
    ...common,
    id: `${held.registryNo} in the story`,
    issuer: provider,
    weights: [held],
    ownShare: 0.1,
    isAccredited: true,
    hasBudget: false,
    wishesFor: fromPool(pools.e2.get(provider)!),
    begins: plan.references,
    workDays: 0,
    issueDays: 2,
  };
  const work = plan.work.map(({ begin, days = 0, uses, is, omits }, at) => {
    const pick = () =>
      uses === 'what stands' ? standing(cast, reference) : referenceValue(cast, reference, uses);
    return workOf(cast, {
      id: `${worked.registryNo} in the story, ${at + 1}`,
      owner,
      worked,
      held,
      begin,
      days,
      pick,
      is,
      omits,
    });
  });
  series.push(reference, ...work);
  return { reference, working: work[0]! };
}

interface Work {
  id: string;
  owner: string;
  worked: Weight;
  held: Weight;
  begin: string;
  days: number;
  pick(): DemoValue;
  is: PairPlan['work'][number]['is'];
  omits: Omission | undefined;
}

function workOf({ world }: Cast, { id, owner, worked, held, begin, days, pick, is, omits }: Work): Series {
  return {
    id,
    issuer: owner,
    weights: [worked],
    quantities: CONVENTIONAL,
    method: SUBSTITUTION,
    how: 'comparison',
    keepsDays: true,
    ownShare: 0.08,
    isAccredited: false,
    hasBudget: true,
    wishesFor: () => [{ weight: held, sensitivity: 1 }],
    picks: pick,
    begins: [begin],
    workDays: days,
    issueDays: 0,
    omits: () => omits ?? null,
    after: (_, [value]) => {
      if (!is || !value) return;
      const used = world.sheets.get(value.certificateNo)!.sheet.entries[0]!.result.task.leaning.uses[0]!
        .value;
      world.catalogue.push({ ...is, ...placeOf(value), reference: placeOf(used), alsoFoundBy: [] });
    },
  };
}

/** The value of a reference as first issued, by round. */
export function referenceValue({ world }: Cast, reference: Series, round: number): DemoValue {
  return valuesOf(world, reference.id, round)[0]!;
}

/** The first certificate of a reference as it stands now, whatever its revision. */
function standing(cast: Cast, reference: Series): DemoValue {
  const { certificateNo } = referenceValue(cast, reference, 0);
  return cast.world.sheets.get(certificateNo)!.values[0]!;
}

import { daysAfter } from './days.ts';
import { drawsFor } from './draws.ts';
import { issue } from './certificate.ts';
import { INSTITUTE } from './laboratories.ts';
import { addWeight } from './pieces.ts';
import { measure, type Task } from './result.ts';
import { ADOPTION, CONSENSUS, onConsensusScale, REALIZED } from './scales.ts';
import type { DemoValue } from './value.ts';
import type { Weight } from './weight.ts';
import type { World } from './world.ts';

/** Standard uncertainties of the two realization runs, g. */
const RUNS = [
  {
    registryNo: 'OI 0001',
    marking: 'Moving-coil balance, run 1',
    begin: '2016-09-05',
    end: '2016-09-23',
    u: 0.000014,
  },
  {
    registryNo: 'OI 0002',
    marking: 'Crystal sphere, run 2',
    begin: '2019-05-27',
    end: '2019-06-14',
    u: 0.000011,
  },
] as const;

/** What stands at the top of the institute's chains. */
export interface Roots {
  /** The standard that the prototypes are traced to on a day. */
  rootOn(day: string): Weight;
}

/** Registers the two realizations and the consensus value, and issues their values. */
export function addRoots(world: World): Roots {
  const runs = RUNS.map((run) => ({
    run,
    weight: addRealization(world, run.registryNo, run.marking, run.begin),
  }));
  const values = runs.flatMap(({ run, weight }) => {
    const task = rootTask(weight, run.end, run.u);
    const result = measure(task, drawsFor(run.registryNo));
    return issue(world, {
      issuer: INSTITUTE,
      registeredBy: INSTITUTE,
      begin: run.begin,
      end: run.end,
      issued: daysAfter(run.end, 11),
      method: 'Realization of the kilogram',
      entries: [
        { result, hasBudget: true, budget: 'realization', rootKind: 'realization run', scale: REALIZED },
      ],
    });
  });
  const consensus = addRealization(world, 'OI 0003', 'Consensus value 2021', ADOPTION, 'consensus value');
  adoptConsensus(world, consensus, values);
  return {
    rootOn: (day) =>
      day >= ADOPTION ? consensus : runs.filter(({ run }) => daysAfter(run.end, 11) <= day).at(-1)!.weight,
  };
}

function addRealization(
  world: World,
  registryNo: string,
  marking: string,
  inServiceFrom: string,
  kind: Weight['kind'] = 'realization',
): Weight {
  const made = { registryNo, owner: INSTITUTE, nominal: '1000', marking, inServiceFrom, kind } as const;
  return addWeight(world, { ...made, limit: 0.0004, startShare: 0.2, shape: 'other', material: 'none' });
}

function rootTask(weight: Weight, day: string, ownU: number): Task {
  return {
    issuer: INSTITUTE,
    weight,
    quantity: 'mass',
    stage: null,
    day,
    leaning: { uses: [], sources: [] },
    ownU,
    isAccredited: false,
  };
}

/** The runs inform the consensus value; nothing flows from them through it. */
function adoptConsensus(world: World, weight: Weight, runs: readonly DemoValue[]): void {
  const leaning = { uses: [], sources: [onConsensusScale(1000)] };
  const result = measure({ ...rootTask(weight, ADOPTION, 0), leaning }, drawsFor(weight.registryNo));
  issue(world, {
    issuer: INSTITUTE,
    registeredBy: INSTITUTE,
    begin: ADOPTION,
    end: ADOPTION,
    issued: ADOPTION,
    method: 'Adoption of an agreed value',
    entries: [{ result, hasBudget: false, rootKind: 'consensus value', scale: CONSENSUS, informedBy: runs }],
  });
}

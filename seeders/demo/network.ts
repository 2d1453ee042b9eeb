import { addInstitute } from './institute.ts';
import { SECOND_LEVEL, THIRD_LEVEL, WORKS_LABORATORIES } from './laboratories.ts';
import type { Pools } from './pools.ts';
import { addSecondLevel } from './second-level.ts';
import type { Series } from './series.ts';
import { addThirdLevel } from './third-level.ts';
import { addWorks } from './works.ts';
import type { World } from './world.ts';

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

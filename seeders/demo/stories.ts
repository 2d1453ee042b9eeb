import { monthsAfter } from './days.ts';
import { THIRD_LEVEL } from './laboratories.ts';
import type { Pools } from './pools.ts';
import type { Series } from './series.ts';
import { lateUse, nearMisses, olderValue, ranOver } from './stories-of-dates.ts';
import {
  correctedAfterUse,
  supersededReference,
  withdrawnAfterUse,
  withdrawnReference,
} from './stories-of-ends.ts';
import type { Cast, Happening, Telling } from './story-cast.ts';
import type { World } from './world.ts';

/** A story and how often it happened: from a day on, so many months apart, in one laboratory after the other. */
interface Story {
  tell(cast: Cast, telling: Telling): void;
  times: number;
  from: string;
  monthsApart: number;
  owner: number;
}

const STORIES: Story[] = [
  { tell: lateUse, times: 3, from: '2018-03-06', monthsApart: 19, owner: 0 },
  { tell: ranOver, times: 1, from: '2022-02-08', monthsApart: 1, owner: 4 },
  { tell: supersededReference, times: 3, from: '2018-05-15', monthsApart: 22, owner: 1 },
  { tell: correctedAfterUse, times: 3, from: '2019-09-10', monthsApart: 25, owner: 3 },
  { tell: withdrawnReference, times: 3, from: '2018-08-14', monthsApart: 21, owner: 2 },
  { tell: withdrawnAfterUse, times: 3, from: '2018-10-09', monthsApart: 20, owner: 0 },
  { tell: olderValue, times: 4, from: '2018-04-10', monthsApart: 16, owner: 3 },
  { tell: nearMisses, times: 6, from: '2018-09-11', monthsApart: 14, owner: 0 },
];

/** The third level without the laboratory whose provider's scope rested for months. */
const TELLERS = THIRD_LEVEL.filter((code) => code !== 'WF');
const NOMINALS = ['1000', '500', '200', '100', '2000', '50', '5000'];

/** Tells every story: its weights, its calibrations and what happens in between. */
export function addStories(world: World, pools: Pools): { series: Series[]; happenings: Happening[] } {
  const cast: Cast = { world, pools, series: [], happenings: [] };
  let n = 0;
  for (const { tell, times, from, monthsApart, owner } of STORIES) {
    for (let time = 0; time < times; time += 1) {
      tell(cast, {
        n,
        at: monthsAfter(from, time * monthsApart),
        owner: TELLERS[(owner + time) % TELLERS.length]!,
        nominal: NOMINALS[(owner + 3 * time) % NOMINALS.length]!,
      });
      n += 1;
    }
  }
  return { series: cast.series, happenings: cast.happenings };
}

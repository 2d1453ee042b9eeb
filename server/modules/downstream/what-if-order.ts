import type { WhatIfSort } from '#shared/contracts/downstream.ts';
import type { Standing } from './keyset.ts';
import { SIGHT } from './sight.ts';
import type { DryRun } from './dry-run.ts';

/** Below every number that is told. */
const UNTOLD = -1;

/**
 * Where each row stands in the order asked for, largest first. What a row does not tell does not order it either:
 * its place would give it away.
 */
export function standingsOf(
  { graph, found, effects, sight, word }: DryRun,
  places: readonly number[],
  sort: WhatIfSort,
): (Standing & { place: number })[] {
  // What cannot be computed stands first: it is what needs somebody.
  const size = (place: number) => {
    const shift = Math.abs(effects.shift[place]!);
    return Number.isNaN(shift) ? Infinity : shift;
  };
  const ratio = (place: number) => {
    const part = Math.abs(effects.shift[place]!) / graph.expandedU[found.nodes[place]!]!;
    return sight[place] === SIGHT.full && !Number.isNaN(part) ? part : UNTOLD;
  };
  const growth = (place: number) => {
    const part = effects.addedVariance[place]! / graph.u[found.nodes[place]!]! ** 2;
    return sight[place] === SIGHT.full && !Number.isNaN(part) ? part : UNTOLD;
  };
  const keysOf: Record<WhatIfSort, (place: number) => number[]> = {
    word: (place) => [word[place]!, size(place)],
    shift: (place) => [size(place)],
    ratio: (place) => [ratio(place)],
    u: (place) => [growth(place)],
  };
  const keys = keysOf[sort];
  return places.map((place) => ({ place, keys: keys(place), id: graph.id[found.nodes[place]!]! }));
}

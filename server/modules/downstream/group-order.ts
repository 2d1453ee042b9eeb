import type { DownstreamBy } from '#shared/contracts/downstream.ts';
import { WEIGHT_CLASSES } from '#shared/engine/conformity/r111-2004.ts';
import { NO_CLASS, WITHHELD } from './groups.ts';

interface Counted {
  key: string;
  count: number;
}

/**
 * The order groups are listed in: laboratories by how many rows they have, classes finest first, nominals largest
 * first, years newest first; what has no key of that kind last.
 */
export function groupOrder(by: DownstreamBy): (a: Counted, b: Counted) => number {
  if (by === 'laboratory') return (a, b) => b.count - a.count || (a.key < b.key ? -1 : 1);
  const rank = by === 'class' ? classRank : numberRank;
  return (a, b) => rank(a.key) - rank(b.key) || (a.key < b.key ? -1 : 1);
}

function classRank(key: string): number {
  return key === NO_CLASS ? WEIGHT_CLASSES.length : (WEIGHT_CLASSES as readonly string[]).indexOf(key);
}

function numberRank(key: string): number {
  return key === WITHHELD ? Infinity : -Number(key);
}

import type { GraphArrays } from './graph-arrays.ts';

/**
 * `stateAt(...).state === 'in force'` (`shared/state-at.ts`) on the graph's day numbers. What is known at the end of
 * a day is what was recorded on a day not after it.
 */
export function inForceOn(graph: GraphArrays, node: number, day: number, known: number): boolean {
  if (graph.recordedDay[node]! > known || graph.effectiveDay[node]! > day) return false;
  const ends = graph.ends.get(node);
  return !ends?.some((end) => end.recordedDay <= known && end.effectiveDay <= day);
}

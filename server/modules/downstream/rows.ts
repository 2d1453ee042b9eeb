import type { Below } from './below.ts';
import type { GraphArrays } from './graph-arrays.ts';
import { SIGHT } from './sight.ts';

/** What decides which rows there are. Places are those of `Below`. */
export interface RowChoice {
  sight: Uint8Array;
  isRow(place: number): boolean;
  /** Values seen this little or less are told as weights: one row a weight, however often it was calibrated. */
  weightsUpTo: number;
  /** Which of two values of one weight stands for it. */
  isBefore(a: number, b: number): boolean;
}

/**
 * The places a person gets to see, each one row. What they may not see is left out here, before anything is
 * counted.
 */
export function visibleRows(graph: GraphArrays, { nodes }: Below, choice: RowChoice): number[] {
  const rows: number[] = [];
  const ofWeight = new Map<number, number>();
  for (let place = 0; place < nodes.length; place += 1) {
    const seen = choice.sight[place]!;
    if (seen === SIGHT.none || !choice.isRow(place)) continue;
    if (seen > choice.weightsUpTo) {
      rows.push(place);
      continue;
    }
    const weight = graph.standard[nodes[place]!]!;
    const before = ofWeight.get(weight);
    if (before === undefined || choice.isBefore(place, before)) ofWeight.set(weight, place);
  }
  for (const place of ofWeight.values()) rows.push(place);
  return rows;
}

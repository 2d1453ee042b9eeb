import type { Below } from './below.ts';
import type { Effects } from './effects.ts';
import type { GraphArrays } from './graph-arrays.ts';

/** A dry run worked out on arrays, by place. */
export interface DryRun {
  graph: GraphArrays;
  found: Below;
  sight: Uint8Array;
  effects: Effects;
  /** Places in `WORDS`. */
  word: Uint8Array;
}

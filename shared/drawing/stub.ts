import type { DrawnNode } from './drawn-chain.ts';
import { PLATE, SCALE, STUB } from './geometry.ts';
import { boxHatching } from './hatching.ts';

/** What a value adds of its own, entering from the left at the same scale; `STUB.length` px long. */
export interface Stub {
  height: number;
  /** Share of the weight's variance; null: the own part is not known, and the stub says "?". */
  share: number | null;
  /** solid: true to scale; hairline: too thin for it; negative: outlined and dashed; unknown: hatched, with "?". */
  look: 'solid' | 'hairline' | 'negative' | 'unknown';
  /** Oblique lines over it, from its left upper corner; null where it is not hatched. */
  hatching: string | null;
}

/** The stub of a plate; null where there is nothing of its own, or nothing flows in the drawing. */
export function stubOf(node: DrawnNode, isPlain: boolean): Stub | null {
  if (isPlain || node.type === 'source' || node.share === null) return null;
  const share = node.localShare;
  if (share === null) {
    const height = STUB.unknownHeight;
    return { height, share, look: 'unknown', hatching: boxHatching(STUB.length, height) };
  }
  if (share === 0) return null;
  const height = Math.min(PLATE.height, Math.abs(share) * SCALE);
  if (height < 1) return { height: 1, share, look: 'hairline', hatching: null };
  return { height, share, look: share < 0 ? 'negative' : 'solid', hatching: null };
}

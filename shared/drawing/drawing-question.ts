import type { Verdict } from '#shared/contracts/common.ts';
import type { z } from 'zod';

/** How a chain is to be drawn: part of the question that its address holds. */
export interface DrawingQuestion {
  draw: 'flow' | 'plain';
  verdict: z.infer<typeof Verdict>;
  /** Shared effects below 1 % are counted, and shown when asked for. */
  effects: 'main' | 'all';
  only?: 'fails' | undefined;
  /** Plates of one laboratory drawn as one. */
  fold?: 'laboratory' | undefined;
  /** Keys of the folded groups that are opened in place, joined by commas. */
  open?: string | undefined;
}

/** Name of a link in the drawing and in the address. */
export function linkKey(link: { childUid: string; parentUid: string }): string {
  return `${link.childUid}.${link.parentUid}`;
}

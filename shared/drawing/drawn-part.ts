import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { DrawingQuestion } from './drawing-question.ts';

/** Below this share a shared effect is shown only when asked for. */
const WORTH_DRAWING = 0.01;

/**
 * The part of a chain that is shown. Effort is commensurate with contribution (JCGM 200:2012, 2.41 note 4): shared
 * effects below 1 % are counted, and shown when asked for.
 * @returns the chain itself, or with fewer sources and links; and how many effects were left out
 */
export function drawnPart(
  chain: ChainResponse,
  effects: DrawingQuestion['effects'],
): { chain: ChainResponse; leftOut: number } {
  if (effects === 'all') return { chain, leftOut: 0 };
  const small = new Set(
    chain.nodes.filter((node) => node.type === 'source' && isSmall(chain, node.uid)).map((node) => node.uid),
  );
  if (small.size === 0) return { chain, leftOut: 0 };
  return {
    chain: {
      ...chain,
      nodes: chain.nodes.filter((node) => !small.has(node.uid)),
      links: chain.links.filter((link) => !small.has(link.parentUid)),
    },
    leftOut: small.size,
  };
}

/** Flows of one effect may cancel: each is looked at, not their sum. */
function isSmall(chain: ChainResponse, uid: string): boolean {
  return chain.links.every((link) => link.parentUid !== uid || Math.abs(link.flow ?? 0) < WORTH_DRAWING);
}

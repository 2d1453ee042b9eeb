import type { ChainResponse } from '#shared/contracts/chains.ts';

/**
 * Why a reference may have a larger U than the weight it gives its value to: what both share flows back with the
 * opposite sign. One sentence for each such reference of the weight itself.
 */
export function cancellations(chain: ChainResponse): string[] {
  const u = chain.uncertainty.standard;
  const taking = chain.links.filter((link) => (link.flow ?? 0) < 0).map((link) => link.parentUid);
  if (u === null || taking.length === 0) return [];
  const isVolume = chain.nodes.some(
    (node) => node.type === 'source' && node.kind === 'volume' && taking.includes(node.uid),
  );
  return chain.links
    .filter((link) => link.role === 'reference' && link.childUid === chain.focusUid)
    .flatMap((link) => {
      const parent = chain.nodes.find((node) => node.uid === link.parentUid);
      if (parent?.type !== 'value' || parent.uStated === null) return [];
      if (Math.abs(link.sensitivity) * parent.uStated <= u) return [];
      const shared = isVolume ? 'its volume is shared and cancels' : 'what both share cancels';
      return [`U of ${parent.registryNo} is larger than that of the weight: ${shared}.`];
    });
}

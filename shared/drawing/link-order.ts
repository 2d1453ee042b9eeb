import type { ChainResponse } from '#shared/contracts/chains.ts';

type Link = ChainResponse['links'][number];

/** References first, from the focus upwards and the widest flow first; then what is shared, by its weight. */
export function linksUpwards(chain: ChainResponse): Link[] {
  const tiers = new Map(chain.nodes.map((node) => [node.uid, node.tier]));
  const isShared = (link: Link) => Number(link.role === 'source');
  const tier = (link: Link) => (link.role === 'source' ? 0 : tiers.get(link.childUid)!);
  return chain.links.toSorted(
    (a, b) => isShared(a) - isShared(b) || tier(a) - tier(b) || Math.abs(b.flow ?? 0) - Math.abs(a.flow ?? 0),
  );
}

/** A value is named by its weight; where one weight stands with two values, the certificate's day tells them apart. */
export function namesOf(chain: ChainResponse): Map<string, string> {
  const count = new Map<string, number>();
  for (const node of chain.nodes) {
    if (node.type === 'value') count.set(node.registryNo, (count.get(node.registryNo) ?? 0) + 1);
  }
  return new Map(
    chain.nodes.map((node) => {
      if (node.type === 'source') return [node.uid, node.name];
      const isTwice = (count.get(node.registryNo) ?? 0) > 1;
      return [node.uid, isTwice ? `${node.registryNo} (${node.performedEnd.slice(0, 7)})` : node.registryNo];
    }),
  );
}

import { groupBy } from '#shared/group-by.ts';
import { tiersOf, type DrawnChain, type DrawnLink } from './drawn-chain.ts';
import type { DrawingQuestion } from './drawing-question.ts';

/**
 * What fails, and the way from there down to the weight: the links that are broken or call for caution, and below
 * each of them the widest links. All that is sound beside that is left out.
 */
export function failingPart(chain: DrawnChain, verdict: DrawingQuestion['verdict']): DrawnChain {
  const failing = chain.links.filter((link) => link[verdict] === 'broken' || link[verdict] === 'caution');
  const onTheWay = waysDown(chain, failing);
  const shown = new Set([
    chain.focusUid,
    ...(chain.second ? [chain.second.focusUid] : []),
    ...[...failing, ...onTheWay].flatMap((link) => [link.childUid, link.parentUid]),
  ]);
  const kept = new Set([...failing, ...onTheWay]);
  const links = chain.links.filter((link) => kept.has(link));
  const tiers = tiersOf([...shown], links);
  return {
    ...chain,
    // Tiers of which nothing is left close up.
    nodes: chain.nodes
      .filter((node) => shown.has(node.uid))
      .map((node) => ({ ...node, tier: tiers.get(node.uid)! })),
    links,
  };
}

/** The widest link below each failing one, the widest below that, and so on to the weight. */
function waysDown(chain: DrawnChain, failing: readonly DrawnLink[]): Set<DrawnLink> {
  const below = groupBy(
    chain.links.filter((link) => link.role !== 'informs'),
    (link) => link.parentUid,
  );
  const way = new Set<DrawnLink>();
  for (const { childUid } of failing) {
    for (
      let next = widest(below.get(childUid));
      next && !way.has(next);
      next = widest(below.get(next.childUid))
    )
      way.add(next);
  }
  return way;
}

function widest(links: readonly DrawnLink[] = []): DrawnLink | undefined {
  return links.toSorted((a, b) => Math.abs(b.flow ?? 0) - Math.abs(a.flow ?? 0))[0];
}

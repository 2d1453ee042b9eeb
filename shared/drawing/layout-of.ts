import type { DrawnChain } from './drawn-chain.ts';
import type { DrawingQuestion } from './drawing-question.ts';
import type { LayoutInput } from './layout-input.ts';
import { stubOf } from './stub.ts';

/** What the layout needs of a chain. In the plain drawing every link is a hairline. */
export function layoutInput(chain: DrawnChain, draw: DrawingQuestion['draw']): LayoutInput {
  const isPlain = draw === 'plain';
  // A consensus value that runs inform is a root with something above it: it stays below them.
  const informed = new Set(chain.links.map((link) => link.childUid));
  return {
    nodes: chain.nodes.map((node) => ({
      id: node.uid,
      tier: node.tier,
      isRoot: isRootKind(node) && !informed.has(node.uid),
      hasStub: stubOf(node, isPlain) !== null,
    })),
    links: chain.links.map((link) => ({
      child: link.childUid,
      parent: link.parentUid,
      flow: isPlain || link.role === 'informs' ? 0 : link.flow,
    })),
  };
}

function isRootKind(node: DrawnChain['nodes'][number]): boolean {
  if (node.type === 'group') return node.isRoot;
  return node.type === 'value' && node.rootKind !== null;
}

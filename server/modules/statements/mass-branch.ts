import type { ChainLink, ChainResponse, ChainValue } from '#shared/contracts/chains.ts';
import { focusOf } from './statement.ts';

/** A value on the way up, and the link by which it leans on the next; null at the last. */
export interface BranchStep {
  value: ChainValue;
  link: ChainLink | null;
  /** Further references of the value, which lie beside this way. */
  others: ChainLink[];
}

/**
 * The mass branch: from the weight upwards, at each step the reference through which most of the variance flows. A
 * chain is a network (JCGM 200:2012, 2.41 note 2); this is the one way through it that is followed first.
 */
export function massBranch(chain: ChainResponse): BranchStep[] {
  const values = new Map(
    chain.nodes.flatMap((node) => (node.type === 'value' ? [[node.uid, node] as const] : [])),
  );
  const steps: BranchStep[] = [];
  let value: ChainValue | undefined = focusOf(chain);
  while (value && steps.length <= values.size) {
    const current: ChainValue = value;
    const references = chain.links
      .filter((link) => link.childUid === current.uid && link.role === 'reference')
      .toSorted((a, b) => Math.abs(b.flow ?? 0) - Math.abs(a.flow ?? 0));
    const [link = null, ...others] = references;
    steps.push({ value: current, link, others });
    value = link ? values.get(link.parentUid) : undefined;
  }
  return steps;
}

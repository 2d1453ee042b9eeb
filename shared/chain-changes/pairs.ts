import type { ChainResponse } from '#shared/contracts/chains.ts';
import { linkKey } from '#shared/drawing/drawing-question.ts';

export type Node = ChainResponse['nodes'][number];
export type ValueNode = Extract<Node, { type: 'value' }>;
export type Link = ChainResponse['links'][number];

/** Two answers laid over each other: which of their values and links are the same, or took each other's place. */
export interface Pairs {
  before: ChainResponse;
  after: ChainResponse;
  nodes: { before: Node; after: Node }[];
  links: { before: Link; after: Link }[];
  added: Node[];
  gone: Node[];
  /** Uid in the later answer of what stands for a node of the earlier one; the same uid where it is the same. */
  laterUid(uid: string): string;
}

/**
 * Lays two answers over each other. A value that is in one only is paired with a value of the same weight and kind
 * that is in the other only: its certificate took the other's place.
 */
export function pairsOf(before: ChainResponse, after: ChainResponse): Pairs {
  const [earlier, later] = [byUid(before), byUid(after)];
  const gone = before.nodes.filter((node) => !later.has(node.uid));
  const added = after.nodes.filter((node) => !earlier.has(node.uid));
  const successors = new Map<string, string>();
  const taken = new Set<string>();
  for (const node of gone) {
    const next = added.find((other) => !taken.has(other.uid) && isSameWeight(node, other));
    if (!next) continue;
    taken.add(next.uid);
    successors.set(node.uid, next.uid);
  }
  const laterUid = (uid: string) => successors.get(uid) ?? uid;
  const laterLinks = new Map(after.links.map((link) => [linkKey(link), link]));
  return {
    before,
    after,
    nodes: before.nodes.flatMap((node) => {
      const other = later.get(laterUid(node.uid));
      return other ? [{ before: node, after: other }] : [];
    }),
    links: before.links.flatMap((link) => {
      const key = linkKey({ childUid: laterUid(link.childUid), parentUid: laterUid(link.parentUid) });
      const other = laterLinks.get(key);
      return other ? [{ before: link, after: other }] : [];
    }),
    added: added.filter((node) => !taken.has(node.uid)),
    gone: gone.filter((node) => !successors.has(node.uid)),
    laterUid,
  };
}

/** A certificate as statements name it. */
export function certificateOf({ certificateNo, revisionN }: ValueNode): string {
  return revisionN > 1 ? `${certificateNo}, revision ${revisionN}` : certificateNo;
}

function byUid(chain: ChainResponse): Map<string, Node> {
  return new Map(chain.nodes.map((node) => [node.uid, node]));
}

function isSameWeight(one: Node, other: Node): boolean {
  return (
    one.type === 'value' &&
    other.type === 'value' &&
    one.standardId === other.standardId &&
    one.quantity === other.quantity &&
    one.medium === other.medium
  );
}

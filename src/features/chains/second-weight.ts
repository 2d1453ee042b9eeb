import type { ChainResponse } from '#shared/contracts/chains.ts';
import { namesOf } from '#shared/drawing/link-order.ts';

type ValueNode = Extract<ChainResponse['nodes'][number], { type: 'value' }>;

/** How many of the things that two weights share are named. */
const NAMED = 3;
/** A correlation that is 0 to the three decimals it is shown with. */
const PRACTICALLY_NONE = 0.0005;

/** What a comparison with a second weight rests on. */
export interface SecondChosen {
  /** The value compared with. */
  chosen: ValueNode;
  /** Other values of the same weight that the first chain itself rests on. */
  inThisChain: ValueNode[];
  /** Names of what both lean on, values before effects and the nearest first, and how many more there are. */
  shared: string[];
  more: number;
}

/** Which value of the second weight was chosen, and what both chains hold; null where its chain holds no focus. */
export function secondChosen(first: ChainResponse, second: ChainResponse): SecondChosen | null {
  const isValue = (node: ChainResponse['nodes'][number]): node is ValueNode => node.type === 'value';
  const chosen = second.nodes.filter(isValue).find(({ uid }) => uid === second.focusUid);
  if (!chosen) return null;
  const below = new Set(second.nodes.map(({ uid }) => uid));
  const names = namesOf(first);
  const common = first.nodes
    .filter(({ uid }) => below.has(uid))
    .toSorted((a, b) => Number(isValue(b)) - Number(isValue(a)) || a.tier - b.tier);
  return {
    chosen,
    inThisChain: first.nodes
      .filter(isValue)
      .filter(
        ({ uid, standardId }) =>
          uid !== chosen.uid && uid !== first.focusUid && standardId === chosen.standardId,
      ),
    shared: common.slice(0, NAMED).map(({ uid }) => names.get(uid) ?? ''),
    more: Math.max(0, common.length - NAMED),
  };
}

/** Whether a correlation is too small for its digits and its sign to mean anything. */
export function isPracticallyNone(correlation: number | null): boolean {
  return correlation !== null && Math.abs(correlation) < PRACTICALLY_NONE;
}

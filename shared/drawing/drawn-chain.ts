import type { ChainResponse, ChainLink, ChainSource, ChainValue } from '#shared/contracts/chains.ts';
import type { State } from '#shared/states.ts';

/** Plates of one kind drawn as one: what flows between its members is inside, what crosses its edge is drawn. */
export interface PlateGroup {
  type: 'group';
  /** Key of the group: the same however the rest is folded, short enough for the address. */
  uid: string;
  tier: number;
  /** Who calibrated: the laboratory that the members' certificates name. */
  laboratory: ChainValue['issuer'];
  /** What the members have in common beside the laboratory: class, nominal or kind of root; null: nothing. */
  common: string | null;
  /** Uids of the values inside. */
  members: string[];
  /** Keys of the links inside. */
  innerLinks: string[];
  /** Days on which the members were determined, first and last. */
  from: string;
  to: string;
  /** Worst of the members and of the links inside. */
  state: State;
  /** Members and inner links by state; what is sound is not counted. */
  failing: { broken: number; caution: number; notJudged: number };
  isRoot: boolean;
  localShare: number | null;
  share: number | null;
}

export type DrawnNode = ChainValue | ChainSource | PlateGroup;

/** A link as it is drawn; several are one where their ends are folded. */
export interface DrawnLink extends Omit<ChainLink, 'sensitivity'> {
  /** Null where several links are drawn as one. */
  sensitivity: number | null;
  /** Keys of the links that are drawn as this one. */
  of: string[];
}

/** A chain as it is drawn: the answer itself, or what is left of it folded, filtered or joined with a second one. */
export interface DrawnChain extends Pick<ChainResponse, 'focusUid' | 'definition' | 'rules' | 'checks'> {
  nodes: DrawnNode[];
  links: DrawnLink[];
  /** Of two weights: the second focus, what only it leans on, and what both lean on. */
  second: { focusUid: string; beside: ReadonlySet<string>; shared: ReadonlySet<string> } | null;
}

/** A chain drawn plate by plate. */
export function drawnWhole(chain: ChainResponse): DrawnChain {
  const { focusUid, definition, rules, checks, nodes } = chain;
  const links = chain.links.map((link) => ({ ...link, of: [`${link.childUid}.${link.parentUid}`] }));
  return { focusUid, definition, rules, checks, nodes, links, second: null };
}

/** Longest way from each node down to one that nothing drawn leans on; links must be free of circles. */
export function tiersOf(
  uids: readonly string[],
  links: readonly { childUid: string; parentUid: string }[],
): Map<string, number> {
  const tiers = new Map<string, number>(uids.map((uid) => [uid, 0]));
  const waiting = new Map<string, number>();
  const parents = new Map<string, string[]>(uids.map((uid) => [uid, []]));
  for (const { childUid, parentUid } of links) {
    waiting.set(parentUid, (waiting.get(parentUid) ?? 0) + 1);
    parents.get(childUid)!.push(parentUid);
  }
  const ready = uids.filter((uid) => !waiting.has(uid));
  for (let uid = ready.pop(); uid !== undefined; uid = ready.pop()) {
    for (const parent of parents.get(uid)!) {
      tiers.set(parent, Math.max(tiers.get(parent)!, tiers.get(uid)! + 1));
      const left = waiting.get(parent)! - 1;
      waiting.set(parent, left);
      if (left === 0) ready.push(parent);
    }
  }
  return tiers;
}

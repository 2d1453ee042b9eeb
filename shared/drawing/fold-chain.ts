import type { ChainValue } from '#shared/contracts/chains.ts';
import { groupBy } from '#shared/group-by.ts';
import type { DrawingQuestion } from './drawing-question.ts';
import { tiersOf, type DrawnChain, type DrawnLink, type DrawnNode } from './drawn-chain.ts';
import { foldedLinks } from './folded-links.ts';
import { groupPlate } from './group-plate.ts';
import { keyOf, kindOf, type FoldBy } from './fold-kind.ts';
import { ownStates } from './own-states.ts';

interface Fold {
  by: FoldBy;
  /** Keys of the groups that are drawn open, plate by plate. */
  opened: ReadonlySet<string>;
  verdict: DrawingQuestion['verdict'];
}

/**
 * Merges plates into groups. A group is one run of neighbours along the chain: a way that leaves a laboratory and
 * comes back to it makes two groups of it, so that the folded chain has no circle. The weight itself is never
 * folded. An effect shared within one group only becomes part of what the group adds of its own; flow is conserved.
 */
export function foldChain(chain: DrawnChain, fold: Fold): DrawnChain {
  const groups = groupsOf(chain, fold);
  const homeOf = new Map<string, string>();
  for (const [key, members] of groups) for (const { uid } of members) homeOf.set(uid, key);
  absorbSources(chain, homeOf);
  const home = (uid: string) => homeOf.get(uid) ?? uid;
  const links = foldedLinks(chain.links, home, fold.verdict);
  const kept = chain.nodes.filter((node) => !homeOf.has(node.uid));
  const own = ownStates(chain, fold.verdict);
  const plates = [...groups].map(([key, members]) =>
    groupPlate(key, members, { chain, homeOf, links, fold, own }),
  );
  const nodes = atTheirTiers([...kept, ...plates], links);
  return { ...chain, nodes, links };
}

/** Keys of all groups that a chain has when nothing is opened, with how many plates each holds. */
export function groupsOf(chain: DrawnChain, fold: Pick<Fold, 'by' | 'opened'>): Map<string, ChainValue[]> {
  const runs = runsOf(chain, fold.by);
  const values = chain.nodes.filter(
    (node): node is ChainValue => node.type === 'value' && !isFocus(chain, node.uid),
  );
  const groups = groupBy(values, (node) => keyOf(node, fold.by, runs.get(node.uid)!));
  return new Map([...groups].filter(([key, members]) => members.length > 1 && !fold.opened.has(key)));
}

function isFocus(chain: DrawnChain, uid: string): boolean {
  return uid === chain.focusUid || uid === chain.second?.focusUid;
}

/**
 * How often the kind of plate changes on the way up to a node, at most. Along a circle of merged plates it could
 * never fall, and rises where kinds differ: hence there is none.
 */
function runsOf(chain: DrawnChain, by: FoldBy): Map<string, number> {
  const kinds = new Map(
    chain.nodes.map((node) => [
      node.uid,
      node.type === 'value' && !isFocus(chain, node.uid) ? kindOf(node, by) : node.uid,
    ]),
  );
  const parents = groupBy(chain.links, (link) => link.childUid);
  const runs = new Map<string, number>();
  for (const { uid } of fromBelow(chain)) {
    const run = runs.get(uid) ?? 0;
    for (const { parentUid } of parents.get(uid) ?? []) {
      const step = kinds.get(parentUid) === kinds.get(uid) ? 0 : 1;
      runs.set(parentUid, Math.max(runs.get(parentUid) ?? 0, run + step));
    }
    runs.set(uid, run);
  }
  return runs;
}

/** Every node before what it leans on. */
function fromBelow(chain: DrawnChain): DrawnNode[] {
  const tiers = tiersOf(
    chain.nodes.map((node) => node.uid),
    chain.links,
  );
  return chain.nodes.toSorted((a, b) => tiers.get(a.uid)! - tiers.get(b.uid)!);
}

/** An effect that only members of one group share goes into that group. */
function absorbSources(chain: DrawnChain, homeOf: Map<string, string>): void {
  const children = groupBy(chain.links, (link) => link.parentUid);
  for (const node of chain.nodes) {
    if (node.type !== 'source') continue;
    const homes = new Set((children.get(node.uid) ?? []).map((link) => homeOf.get(link.childUid)));
    const [only] = homes;
    if (homes.size === 1 && only !== undefined) homeOf.set(node.uid, only);
  }
}

function atTheirTiers(nodes: DrawnNode[], links: DrawnLink[]): DrawnNode[] {
  const tiers = tiersOf(
    nodes.map((node) => node.uid),
    links,
  );
  return nodes.map((node) => ({ ...node, tier: tiers.get(node.uid)! }));
}

import type { Change, Notice } from './changes.ts';
import { noticeEntries } from './notice-entries.ts';
import type { CompiledNetwork } from './compiled-network.ts';
import { networkFromArrays } from './network-from-arrays.ts';

/** What stands in a replaced value's place: its last successor, and how far that one differs from it. */
export type Successor = { node: number; delta: number };

/** Successors by replaced node, chains of replacements followed to their end. */
export function successorsOf(net: CompiledNetwork, changes: readonly Change[]): Map<number, Successor> {
  const direct = new Map<number, Successor>();
  for (const change of changes) {
    if (change.kind === 'replace') {
      direct.set(net.nodeOf(change.value)!, { node: net.nodeOf(change.by)!, delta: change.delta });
    }
  }
  const last = new Map<number, Successor>();
  for (const [replaced, successor] of direct) {
    let { node, delta } = successor;
    for (let next = direct.get(node); next; next = direct.get(node)) {
      node = next.node;
      delta += next.delta;
    }
    last.set(replaced, { node, delta });
  }
  return last;
}

/**
 * The network after the changes to its structure: links of replaced values lead to their successors, raised local
 * parts are raised, and each notice is a source on the oldest values it covers (`entryPoints`).
 * Nodes keep their numbers; notices stand behind the sources.
 * @throws EngineError `circle` when a successor leans on what it replaces through other values
 */
export function changedNetwork(
  net: CompiledNetwork,
  changes: readonly Change[],
  successors: Map<number, Successor>,
): CompiledNetwork {
  const notices = changes.filter((change) => change.kind === 'notice');
  const added = addedVariances(net, changes);
  const relinked = rebuilt(net, relinkedLinks(net, successors), [], added);
  if (notices.length === 0) return relinked;
  const links = relinkedLinks(net, successors);
  notices.forEach((notice, at) => {
    for (const term of entryPoints(relinked, notice)) {
      links.push([net.nodeOf(term.value)!, net.nodeCount + at, term.sensitivity, -1]);
    }
  });
  return rebuilt(net, links, notices, added);
}

/** The terms of a notice where it enters, each for the part of it that enters there (`noticeEntries`). */
export function entryPoints(net: CompiledNetwork, notice: Notice): Notice['terms'] {
  const terms = new Map(notice.terms.map((term) => [net.nodeOf(term.value)!, term]));
  const parentsOf = (node: number) => {
    const links = Array.from(
      { length: net.linkStart[node + 1]! - net.linkStart[node]! },
      (_, at) => net.linkStart[node]! + at,
    );
    return links.map((link) => ({ parent: net.linkParent[link]!, sensitivity: net.linkSensitivity[link]! }));
  };
  const own = new Map([...terms].map(([node, { sensitivity }]) => [node, sensitivity]));
  return [...noticeEntries(net.order, parentsOf, own)].map(([node, part]) => {
    const term = terms.get(node)!;
    return { ...term, shift: part * term.shift, sensitivity: part * term.sensitivity };
  });
}

/** Child, parent, sensitivity, and the class limit (negative = none). */
type LinkRow = [number, number, number, number];

function relinkedLinks(net: CompiledNetwork, successors: Map<number, Successor>): LinkRow[] {
  const rows: LinkRow[] = [];
  for (let child = 0; child < net.valueCount; child += 1) {
    for (let link = net.linkStart[child]!; link < net.linkStart[child + 1]!; link += 1) {
      const parent = net.linkParent[link]!;
      const spread = net.linkSpread[link]!;
      if (spread !== 0) rows.push([child, parent, Math.sign(spread), Math.abs(spread)]);
      rows.push([child, leansOn(child, parent, successors), net.linkSensitivity[link]!, -1]);
    }
  }
  return rows;
}

/** The parent a child is read as leaning on; a successor keeps its own link to what it replaced. */
export function leansOn(child: number, parent: number, successors: Map<number, Successor>): number {
  const successor = successors.get(parent);
  return successor && successor.node !== child ? successor.node : parent;
}

function addedVariances(net: CompiledNetwork, changes: readonly Change[]): Map<number, number> {
  const added = new Map<number, number>();
  for (const change of changes) {
    if (change.kind !== 'raise') continue;
    const node = net.nodeOf(change.value)!;
    added.set(node, (added.get(node) ?? 0) + change.addedStandardUncertainty ** 2);
  }
  return added;
}

function rebuilt(
  net: CompiledNetwork,
  links: LinkRow[],
  notices: Notice[],
  added: Map<number, number>,
): CompiledNetwork {
  const own = (node: number) => Math.sqrt(net.ownVariance[node]! + (added.get(node) ?? 0));
  const sources = Array.from({ length: net.nodeCount - net.valueCount }, (_, at) => own(net.valueCount + at));
  const ids = Array.from({ length: net.nodeCount }, (_, node) => net.idOf(node));
  return networkFromArrays({
    local: Float64Array.from({ length: net.valueCount }, (_, node) => (net.unknown[node] ? -1 : own(node))),
    child: Int32Array.from(links, (row) => row[0]),
    parent: Int32Array.from(links, (row) => row[1]),
    sensitivity: Float64Array.from(links, (row) => row[2]),
    classLimit: Float64Array.from(links, (row) => row[3]),
    sourceUncertainty: Float64Array.from([
      ...sources,
      ...notices.map((notice) => notice.standardUncertainty),
    ]),
    groups: net.groups.map((group) => ({ ...group, covariance: raisedCovariance(group, added) })),
    ids: [...ids, ...notices.map((notice) => notice.id)],
  });
}

function raisedCovariance(group: CompiledNetwork['groups'][number], added: Map<number, number>): number[][] {
  return group.covariance.map((row, i) =>
    row.map((value, j) => (i === j ? value + (added.get(group.members[i]!) ?? 0) : value)),
  );
}

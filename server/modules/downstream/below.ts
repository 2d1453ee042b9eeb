import type { GraphArrays } from './graph-arrays.ts';

/** Values and all that leans on them, each after everything of it that it leans on. */
export interface Below {
  /** Nodes of the graph in that order; a node's index here is its place. */
  nodes: Int32Array;
  /** Place of a node; -1 where it is not among them. */
  placeOf(node: number): number;
}

/** The values at `starts` (nodes; -1 is passed over) and everything below them. */
export function below(graph: GraphArrays, starts: Iterable<number>): Below {
  const found: number[] = [];
  // Place + 1 by node; while the set is gathered any mark above 0 will do.
  const marks = new Int32Array(graph.valueCount);
  const meet = (node: number) => {
    if (node < 0 || marks[node] !== 0) return;
    marks[node] = 1;
    found.push(node);
  };
  for (const start of starts) meet(start);
  for (let at = 0; at < found.length; at += 1) {
    for (let link = graph.firstDown[found[at]!]!; link >= 0; link = graph.nextDown[link]!) {
      meet(graph.linkChild[link]!);
    }
  }
  const nodes = inOrder(graph, found, marks);
  nodes.forEach((node, place) => (marks[node] = place + 1));
  return { nodes, placeOf: (node) => marks[node]! - 1 };
}

/** Parents first. The register admits no circle, so every node becomes ready. */
function inOrder(graph: GraphArrays, found: readonly number[], marks: Int32Array): Int32Array {
  const nodes = new Int32Array(found.length);
  let filled = 0;
  // From here a mark counts the parents still waited for, plus one.
  for (const node of found) {
    for (let link = graph.firstUp[node]!; link >= 0; link = graph.nextUp[link]!) {
      if (marks[graph.linkParent[link]!] !== 0) marks[node]! += 1;
    }
  }
  for (const node of found) if (marks[node] === 1) nodes[filled++] = node;
  for (let done = 0; done < filled; done += 1) {
    for (let link = graph.firstDown[nodes[done]!]!; link >= 0; link = graph.nextDown[link]!) {
      const child = graph.linkChild[link]!;
      marks[child]! -= 1;
      if (marks[child] === 1) nodes[filled++] = child;
    }
  }
  return nodes;
}

import { EngineError } from '../errors.ts';

/**
 * Orders nodes so that each stands after all its parents, by the length of the longest path from a root.
 * @throws EngineError `circle` naming the members of one circle, child first, when the links run in a circle
 */
export function topologicalOrder(
  linkStart: Int32Array,
  linkParent: Int32Array,
  idOf: (node: number) => string,
): Int32Array {
  const nodeCount = linkStart.length - 1;
  const children = childrenByParent(linkStart, linkParent);
  const waiting = new Int32Array(nodeCount);
  const order = new Int32Array(nodeCount);
  let filled = 0;
  for (let node = 0; node < nodeCount; node += 1) {
    waiting[node] = linkStart[node + 1]! - linkStart[node]!;
    if (waiting[node] === 0) order[filled++] = node;
  }
  for (let done = 0; done < filled; done += 1) {
    const parent = order[done]!;
    for (let at = children.start[parent]!; at < children.start[parent + 1]!; at += 1) {
      const child = children.child[at]!;
      waiting[child]! -= 1;
      if (waiting[child] === 0) order[filled++] = child;
    }
  }
  if (filled < nodeCount) throw circleError(linkStart, linkParent, waiting, idOf);
  return order;
}

/** The links turned round: children of node n are `child[start[n]]` to `child[start[n + 1] - 1]`. */
export function childrenByParent(
  linkStart: Int32Array,
  linkParent: Int32Array,
): { start: Int32Array; child: Int32Array } {
  const nodeCount = linkStart.length - 1;
  const start = new Int32Array(nodeCount + 1);
  for (const parent of linkParent) start[parent + 1]! += 1;
  for (let node = 0; node < nodeCount; node += 1) start[node + 1]! += start[node]!;
  const next = start.slice(0, nodeCount);
  const child = new Int32Array(linkParent.length);
  for (let node = 0; node < nodeCount; node += 1) {
    for (let at = linkStart[node]!; at < linkStart[node + 1]!; at += 1) {
      const parent = linkParent[at]!;
      child[next[parent]!] = node;
      next[parent]! += 1;
    }
  }
  return { start, child };
}

/** Walks up among the nodes that never became ready until one comes again: those between are a circle. */
function circleError(
  linkStart: Int32Array,
  linkParent: Int32Array,
  waiting: Int32Array,
  idOf: (node: number) => string,
): EngineError {
  const seenAt = new Map<number, number>();
  const path: number[] = [];
  let node = waiting.findIndex((count) => count > 0);
  while (!seenAt.has(node)) {
    seenAt.set(node, path.length);
    path.push(node);
    const parents = linkParent.subarray(linkStart[node]!, linkStart[node + 1]!);
    node = parents.find((parent) => waiting[parent]! > 0)!;
  }
  const members = path.slice(seenAt.get(node)).map(idOf);
  return new EngineError(
    'circle',
    'links',
    `a circle: ${[...members, members[0]].join(' leans on ')}`,
    'A value can lean only on earlier ones; remove one of these links.',
  );
}

import { unknownNode } from './check-network.ts';
import type { CompiledGroup, CompiledNetwork } from './compiled-network.ts';

/** A node's ancestors with itself, children before parents, and its sensitivity to each. */
export type Walk = { nodes: number[]; gain: Map<number, number> };

/** The node of an id. @throws EngineError `unknown-node` */
export function requireNode(network: CompiledNetwork, id: string, field: string): number {
  const node = network.nodeOf(id);
  if (node === undefined) throw unknownNode(id, field);
  return node;
}

/**
 * Reverse accumulation from one node: `g_focus = 1, g_p = sum over children n of g_n c_np`, each ancestor once
 * (Griewank and Walther, Evaluating Derivatives, ch. 3). Ancestors behind a class limit are visited with 0.
 */
export function walkUp(network: CompiledNetwork, focus: number): Walk {
  const nodes = ancestorsOf(network, focus);
  const gain = new Map(nodes.map((node) => [node, 0]));
  gain.set(focus, 1);
  for (const node of nodes) {
    const own = gain.get(node)!;
    for (let link = network.linkStart[node]!; link < network.linkStart[node + 1]!; link += 1) {
      const parent = network.linkParent[link]!;
      gain.set(parent, gain.get(parent)! + own * network.linkSensitivity[link]!);
    }
  }
  return { nodes, gain };
}

function ancestorsOf(network: CompiledNetwork, focus: number): number[] {
  const found = new Set([focus]);
  // The set grows while it is walked: each new parent is visited in its turn.
  for (const node of found) {
    for (let link = network.linkStart[node]!; link < network.linkStart[node + 1]!; link += 1) {
      found.add(network.linkParent[link]!);
    }
  }
  return [...found].sort((a, b) => network.position[b]! - network.position[a]!);
}

/** `sum over members m of K_am g_m`: what a group's common estimate brings to one member. */
export function groupPull(group: CompiledGroup, place: number, gain: Map<number, number>): number {
  const row = group.covariance[place]!;
  let sum = 0;
  group.members.forEach((member, at) => (sum += row[at]! * (gain.get(member) ?? 0)));
  return sum;
}

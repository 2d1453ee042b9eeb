import { requireNumber } from '../quantity/domain.ts';
import { compiled } from './compile-network.ts';
import type { CompiledNetwork } from './compiled-network.ts';
import type { Network } from './network.ts';
import { childrenByParent } from './topological-order.ts';
import { requireNode } from './walk.ts';

/**
 * How far each descendant moves when one value or source moves by `delta`: forward accumulation. A class limit
 * stops the shift, since the child used the nominal value: descendants reached only through limits show 0.
 * @param delta in the network's unit
 * @throws EngineError `unknown-node`, `not-finite`; those of `compileNetwork`
 */
export function shift(
  network: Network | CompiledNetwork,
  from: string,
  delta: number,
): Record<string, number> {
  const net = compiled(network);
  const start = requireNode(net, from, 'from');
  requireNumber(delta, 'delta');
  const shifts = new Map([[start, delta]]);
  for (const node of descendantsOf(net, start)) {
    let sum = 0;
    for (let link = net.linkStart[node]!; link < net.linkStart[node + 1]!; link += 1) {
      sum += net.linkSensitivity[link]! * (shifts.get(net.linkParent[link]!) ?? 0);
    }
    shifts.set(node, sum);
  }
  shifts.delete(start);
  return Object.fromEntries(Array.from(shifts, ([node, value]) => [net.idOf(node), value]));
}

/** Descendants of a node, parents before children. */
function descendantsOf(net: CompiledNetwork, start: number): number[] {
  const children = childrenByParent(net.linkStart, net.linkParent);
  const found = new Set([start]);
  // The set grows while it is walked: each new child is visited in its turn.
  for (const node of found) {
    for (let at = children.start[node]!; at < children.start[node + 1]!; at += 1)
      found.add(children.child[at]!);
  }
  found.delete(start);
  return [...found].sort((a, b) => net.position[a]! - net.position[b]!);
}

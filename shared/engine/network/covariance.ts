import { EngineError } from '../errors.ts';
import { compiled } from './compile-network.ts';
import type { CompiledNetwork } from './compiled-network.ts';
import type { Network } from './network.ts';
import { groupPull, requireNode, type Walk, walkUp } from './walk.ts';

/**
 * Covariance of two values or sources through everything they share: the same walk from both (JCGM 102:2011, 6.2).
 * @throws EngineError `unknown-node`; `unknown-local` naming a shared value whose local part is not known; those of
 * `compileNetwork`
 */
export function covariance(network: Network | CompiledNetwork, a: string, b: string): number {
  const net = compiled(network);
  const walks = [a, b].map((id, at) => walkUp(net, requireNode(net, id, at === 0 ? 'a' : 'b')));
  return sharedVariance(net, walks[0]!, walks[1]!);
}

/**
 * Covariance matrix of the values or sources named, in that order; symmetric to the last digit (JCGM 102:2011, 6.2).
 * @throws EngineError as `covariance`
 */
export function covarianceMatrix(network: Network | CompiledNetwork, ids: readonly string[]): number[][] {
  const net = compiled(network);
  const walks = ids.map((id, at) => walkUp(net, requireNode(net, id, `ids[${at}]`)));
  const matrix = walks.map((): number[] => []);
  walks.forEach((one, i) => {
    for (let j = 0; j <= i; j += 1) {
      const shared = sharedVariance(net, one, walks[j]!);
      matrix[i]![j] = shared;
      matrix[j]![i] = shared;
    }
  });
  return matrix;
}

function sharedVariance(net: CompiledNetwork, one: Walk, other: Walk): number {
  let sum = 0;
  for (const node of one.nodes) {
    const gain = one.gain.get(node)!;
    const shared = other.gain.get(node) ?? 0;
    sum += gain * partVariance(net, node, shared, other);
    if (gain === 0 || shared === 0) continue;
    for (let link = net.linkStart[node]!; link < net.linkStart[node + 1]!; link += 1) {
      sum += gain * shared * net.linkSpread[link]! ** 2;
    }
  }
  return sum;
}

/** Covariance of one node's own part with the other walk's focus. */
function partVariance(net: CompiledNetwork, node: number, shared: number, other: Walk): number {
  const index = net.groupOf[node]!;
  if (index >= 0) return groupPull(net.groups[index]!, net.placeInGroup[node]!, other.gain);
  if (net.unknown[node] && shared !== 0) {
    throw new EngineError(
      'unknown-local',
      net.idOf(node),
      'an unknown local uncertainty',
      'Both values depend on it; give it or infer it first.',
    );
  }
  return shared * net.ownVariance[node]!;
}

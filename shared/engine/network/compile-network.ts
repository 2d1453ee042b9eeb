import { checkNetwork } from './check-network.ts';
import type { CompiledNetwork } from './compiled-network.ts';
import type { Network } from './network.ts';
import { networkFromArrays } from './network-from-arrays.ts';

/**
 * Compiles a network for repeated walks. Source: the linear model of JCGM 102:2011, 6.2, as `Network` writes it.
 * @throws EngineError `circle` naming its members, those of `checkNetwork` and of `checkGroups`
 */
export function compileNetwork(network: Network): CompiledNetwork {
  checkNetwork(network);
  const sources = network.sources ?? [];
  const nodes = [...network.values, ...sources];
  const nodeOf = new Map(nodes.map((node, index) => [node.id, index]));
  return networkFromArrays({
    local: Float64Array.from(network.values, (value) => value.local ?? -1),
    child: Int32Array.from(network.links, (link) => nodeOf.get(link.child)!),
    parent: Int32Array.from(network.links, (link) => nodeOf.get(link.parent)!),
    sensitivity: Float64Array.from(network.links, (link) => link.sensitivity),
    classLimit: Float64Array.from(network.links, (link) => link.classLimit?.standardUncertainty ?? -1),
    sourceUncertainty: Float64Array.from(sources, (source) => source.standardUncertainty),
    groups: network.groups?.map((group) => ({
      ...group,
      members: Int32Array.from(group.members, (member) => nodeOf.get(member)!),
    })),
    degreesOfFreedom: Float64Array.from(nodes, (node) => node.degreesOfFreedom ?? Infinity),
    estimates: nodes.map((node) => node.estimate),
    ids: nodes.map((node) => node.id),
  });
}

/** The network itself when it is compiled already. */
export function compiled(network: Network | CompiledNetwork): CompiledNetwork {
  return 'linkStart' in network ? network : compileNetwork(network);
}

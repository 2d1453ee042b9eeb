import type { Network } from '#shared/engine/network/network.ts';
import { GraphArrays, type GraphValueRow } from './graph-arrays.ts';

/** A value of class E2 at 1 kg that stands on its own; what a test is about is given. */
export function graphValue(id: number, changes: Partial<GraphValueRow> = {}): GraphValueRow {
  return {
    id,
    standardId: `standard ${id}`,
    holderId: 'home',
    issuerId: 'home',
    nominal: '1000.000000000000',
    class: 'E2',
    quantity: 'conventional mass',
    decisionRule: null,
    performedDay: 738_000,
    effectiveDay: 738_000,
    recordedDay: 738_000,
    deviation: 0,
    expandedU: 0.0005,
    u: 0.00025,
    uPlace: -5,
    ...changes,
  };
}

/** The links between values of an engine's network on the graph's arrays; value i of the network has id i + 1. */
export function graphOf(network: Network, changes: Partial<GraphValueRow> = {}): GraphArrays {
  const graph = new GraphArrays();
  const idOf = new Map(network.values.map((value, at) => [value.id, at + 1]));
  for (const id of idOf.values()) graph.addValue(graphValue(id, changes));
  for (const link of network.links) {
    const parentId = idOf.get(link.parent);
    if (parentId === undefined) continue;
    graph.addLink({
      childId: idOf.get(link.child)!,
      parentId,
      sensitivity: link.sensitivity,
      usedBeginDay: 738_000,
      usedEndDay: 738_000,
      isClassLimit: link.classLimit !== undefined,
      usedExpandedU: null,
    });
  }
  return graph;
}

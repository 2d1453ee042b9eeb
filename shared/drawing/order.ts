import dagre from 'dagre';
import order from 'dagre/lib/order/index.js';
import type { Stops } from './stops.ts';

/**
 * The order of the stops in each tier, left to right: all that is taken from dagre, so of its layout only this phase
 * runs. Tiers are known beforehand, and its own search for them and for positions would take nearly all the time.
 */
export function orderInTiers({ stops, steps, tiers }: Stops): string[][] {
  const graph = new dagre.graphlib.Graph({ compound: true });
  graph.setGraph({});
  for (const stop of stops) graph.setNode(stop.id, { rank: tiers - 1 - stop.tier });
  // Parallel links are one edge that weighs as many: the phase knows no others.
  for (const { upper, lower } of steps) {
    const former = graph.edge(upper, lower) as unknown as { weight: number } | undefined;
    graph.setEdge(upper, lower, { weight: (former?.weight ?? 0) + 1 });
  }
  order(graph);
  const inTiers: string[][] = Array.from({ length: tiers }, () => []);
  for (const stop of stops) inTiers[stop.tier]!.push(stop.id);
  const placeOf = (id: string) => (graph.node(id) as unknown as { order: number }).order;
  return inTiers.map((tier) => tier.sort((a, b) => placeOf(a) - placeOf(b)));
}

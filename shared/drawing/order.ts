import dagre from 'dagre';
import type { Stops } from './stops.ts';

/** The order of the stops in each tier, left to right: all that is taken from dagre. */
export function orderInTiers({ stops, steps, tiers }: Stops): string[][] {
  const graph = new dagre.graphlib.Graph({ multigraph: true });
  graph.setGraph({ rankdir: 'TB', nodesep: 10, ranksep: 40 });
  graph.setDefaultEdgeLabel(() => ({}));
  for (const stop of stops) graph.setNode(stop.id, { width: stop.width, height: 40 });
  steps.forEach((step, index) => graph.setEdge(step.upper, step.lower, {}, String(index)));
  dagre.layout(graph);
  const order: string[][] = Array.from({ length: tiers }, () => []);
  for (const stop of stops) order[stop.tier]!.push(stop.id);
  const xOf = (id: string) => graph.node(id).x;
  return order.map((tier) => tier.sort((a, b) => xOf(a) - xOf(b)));
}

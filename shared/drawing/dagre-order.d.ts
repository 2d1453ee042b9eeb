/** dagre's ordering phase, which its own types leave out. */
declare module 'dagre/lib/order/index.js' {
  import type { graphlib } from 'dagre';

  /**
   * Gives every node its `order` within its rank, so that few edges cross.
   * @param graph compound; nodes carry `rank`, edges `weight` and join neighbouring ranks
   */
  export default function order(graph: graphlib.Graph): void;
}

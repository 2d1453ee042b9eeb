/**
 * Where one shared effect enters a network, once per path: on the oldest covered values, and on a younger covered one
 * for that part of it only which comes over values that the effect does not reach. Everything else inherits it
 * through links, so the total sensitivity of each covered value is its own.
 * @param order every node after all of its parents
 * @param parentsOf links through which the effect passes (none through a class limit)
 * @param own own sensitivity of each covered node, not zero: its mass over 1 kg
 * @returns by node, the part of its own sensitivity that enters there; a thousandth and less is the difference
 * between a link's sensitivity and the ratio of the masses (buoyancy, deviations), and no entry
 */
export function noticeEntries<Node>(
  order: Iterable<Node>,
  parentsOf: (node: Node) => Iterable<{ parent: Node; sensitivity: number }>,
  own: ReadonlyMap<Node, number>,
): Map<Node, number> {
  const totals = new Map<Node, number>();
  const entries = new Map<Node, number>();
  for (const node of order) {
    let total = 0;
    for (const { parent, sensitivity } of parentsOf(node)) total += sensitivity * (totals.get(parent) ?? 0);
    const wanted = own.get(node);
    if (wanted !== undefined && wanted !== 0) {
      const part = 1 - total / wanted;
      if (Math.abs(part) > SMALLEST_PART) {
        entries.set(node, part);
        total = wanted;
      }
    }
    if (total !== 0) totals.set(node, total);
  }
  return entries;
}

const SMALLEST_PART = 1e-3;

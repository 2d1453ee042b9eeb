import { GAP, PLATE, ribbonWidth, STUB_REACH } from './geometry.ts';
import type { LayoutInput, LayoutLink } from './layout-input.ts';

/** A place in a tier: a plate, or the lane of a link that passes through. */
export interface Stop {
  id: string;
  tier: number;
  isLane: boolean;
  /** Width that must stay free, and where in it the links meet. */
  width: number;
  anchor: number;
  gap: number;
}

/** A step between stops in neighbouring tiers, `upper` above `lower`. */
export interface Step {
  upper: string;
  lower: string;
}

export interface Stops {
  stops: Stop[];
  steps: Step[];
  /** Stops of a link from its parent down to its child, by the link's place in the input. */
  ways: string[][];
  tiers: number;
}

/**
 * Splits every link that spans several tiers into lanes as wide as its ribbon, so that no ribbon crosses a
 * plate. Roots stand in the top tier, wherever the longest way would put them.
 */
export function stopsOf(input: LayoutInput): Stops {
  const top = Math.max(0, ...input.nodes.map((node) => node.tier));
  const tierOf = new Map(input.nodes.map((node) => [node.id, node.isRoot ? top : node.tier]));
  const stops: Stop[] = input.nodes.map((node) => ({
    id: node.id,
    tier: tierOf.get(node.id)!,
    isLane: false,
    width: PLATE.width + (node.hasStub ? STUB_REACH : 0),
    anchor: (node.hasStub ? STUB_REACH : 0) + PLATE.width / 2,
    gap: GAP.between,
  }));
  const steps: Step[] = [];
  const ways = input.links.map((link, index) => {
    const lanes = lanesOf(link, index, tierOf);
    stops.push(...lanes);
    const way = [link.parent, ...lanes.map((lane) => lane.id), link.child];
    for (let at = 1; at < way.length; at += 1) steps.push({ upper: way[at - 1]!, lower: way[at]! });
    return way;
  });
  return { stops, steps, ways, tiers: top + 1 };
}

function lanesOf(link: LayoutLink, index: number, tierOf: Map<string, number>): Stop[] {
  const { width } = ribbonWidth(link.flow);
  const lanes: Stop[] = [];
  for (let tier = tierOf.get(link.parent)! - 1; tier > tierOf.get(link.child)!; tier -= 1) {
    lanes.push({ id: `lane ${index} ${tier}`, tier, isLane: true, width, anchor: width / 2, gap: GAP.lane });
  }
  return lanes;
}

import { BAND, GAP, PLATE, ribbonWidth, STUB_REACH } from './geometry.ts';
import { fitX } from './fit-x.ts';
import type { LayoutInput, LayoutLink, Placement, PlacedPlate, PlacedRibbon, Point } from './layout-input.ts';
import { orderInTiers } from './order.ts';
import { portsOf, type Ports } from './ports.ts';
import { stopsOf, type Stop } from './stops.ts';

/**
 * Lays a chain out: the focus below, roots above, every link in its own lane. Pure, so that a worker can run it
 * and the same chain always looks the same. The order within tiers is dagre's; positions are ours.
 */
export function layoutChain(input: LayoutInput): Placement {
  if (input.nodes.length === 0) return { plates: [], ribbons: [], lanes: [], width: 0, height: 0 };
  const stops = stopsOf(input);
  const anchors = fitX(stops, orderInTiers(stops));
  const byId = new Map(stops.stops.map((stop) => [stop.id, stop]));
  shiftToOrigin(stops.stops, anchors);
  const tierTop = tierTops(input, stops.tiers);
  const ports = portsOf(input.links, stops.ways, anchors);
  const plates = input.nodes.map((node) => placePlate(byId.get(node.id)!, anchors, tierTop));
  const ribbons = input.links.map((link, index) =>
    placeRibbon(link, stops.ways[index]!, { byId, anchors, tierTop, ports, index }),
  );
  const lanes = stops.stops
    .filter((stop) => stop.isLane)
    .map((stop) => {
      const top = tierTop[stop.tier]!;
      return { x: anchors.get(stop.id)! - stop.anchor, top, bottom: top + PLATE.height, width: stop.width };
    });
  const right = Math.max(...stops.stops.map((stop) => anchors.get(stop.id)! - stop.anchor + stop.width));
  return { plates, ribbons, lanes, width: right, height: tierTop[0]! + PLATE.height };
}

function shiftToOrigin(stops: Stop[], anchors: Map<string, number>): void {
  const left = Math.min(...stops.map((stop) => anchors.get(stop.id)! - stop.anchor));
  for (const [id, x] of anchors) anchors.set(id, x - left);
}

/** Top edge of each tier, tier 0 (the focus) lowest; the gap leaves the widest ribbon room to bend. */
function tierTops(input: LayoutInput, tiers: number): number[] {
  const widest = Math.max(0, ...input.links.map((link) => ribbonWidth(link.flow).width));
  const gap = 1.2 * widest + GAP.tier;
  const first = BAND.height + BAND.gap;
  return Array.from({ length: tiers }, (_, tier) => first + (tiers - 1 - tier) * (PLATE.height + gap));
}

function placePlate(stop: Stop, anchors: Map<string, number>, tierTop: number[]): PlacedPlate {
  return { id: stop.id, x: anchors.get(stop.id)! - PLATE.width / 2, y: tierTop[stop.tier]! };
}

interface Around {
  byId: Map<string, Stop>;
  anchors: Map<string, number>;
  tierTop: number[];
  ports: Ports;
  index: number;
}

function placeRibbon(link: LayoutLink, way: string[], around: Around): PlacedRibbon {
  const { byId, anchors, tierTop, ports, index } = around;
  const points: Point[] = [
    {
      x: anchors.get(link.parent)! + ports.foot[index]!,
      y: tierTop[byId.get(link.parent)!.tier]! + PLATE.height,
    },
  ];
  for (const id of way.slice(1, -1)) {
    const top = tierTop[byId.get(id)!.tier]!;
    points.push({ x: anchors.get(id)!, y: top }, { x: anchors.get(id)!, y: top + PLATE.height });
  }
  points.push({ x: anchors.get(link.child)! + ports.head[index]!, y: tierTop[byId.get(link.child)!.tier]! });
  return {
    child: link.child,
    parent: link.parent,
    points,
    ...ribbonWidth(link.flow),
    isNegative: (link.flow ?? 0) < 0,
  };
}

/** Left edge of a plate's stub, for hit areas and export. */
export function stubLeft(plate: PlacedPlate): number {
  return plate.x - STUB_REACH;
}

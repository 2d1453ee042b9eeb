import { groupBy } from '#shared/group-by.ts';
import { ribbonWidth } from './geometry.ts';
import type { LayoutLink } from './layout-input.ts';

/** Where each link leaves its parent and enters its child: offset of its middle from the plate's middle, px. */
export interface Ports {
  foot: number[];
  head: number[];
}

interface Bundle {
  index: number;
  width: number;
  isNegative: boolean;
  /** x of the next stop on the link's way: ribbons leave in the order in which they part. */
  nextX: number;
}

/**
 * Stacks the flows at each plate's head and foot side by side and centred, in the order of their next stops.
 * Negative flows stand outside the positive band: they take from it.
 */
export function portsOf(links: LayoutLink[], ways: string[][], anchors: Map<string, number>): Ports {
  const bundle = (nextStop: (way: string[]) => string) =>
    links.map((link, index) => ({
      index,
      width: ribbonWidth(link.flow).width,
      isNegative: (link.flow ?? 0) < 0,
      nextX: anchors.get(nextStop(ways[index]!))!,
    }));
  const ports: Ports = { foot: [], head: [] };
  stackAll(
    bundle((way) => way[1]!),
    (index) => links[index]!.parent,
    ports.foot,
  );
  stackAll(
    bundle((way) => way.at(-2)!),
    (index) => links[index]!.child,
    ports.head,
  );
  return ports;
}

function stackAll(bundles: Bundle[], plateOf: (index: number) => string, offsets: number[]): void {
  for (const group of groupBy(bundles, (bundle) => plateOf(bundle.index)).values()) {
    const byX = group.sort((a, b) => a.nextX - b.nextX);
    const positive = byX.filter((bundle) => !bundle.isNegative);
    const band = positive.reduce((sum, bundle) => sum + bundle.width, 0);
    let at = -band / 2;
    for (const bundle of positive) {
      offsets[bundle.index] = at + bundle.width / 2;
      at += bundle.width;
    }
    for (const bundle of byX.filter((one) => one.isNegative)) {
      offsets[bundle.index] = at + bundle.width / 2;
      at += bundle.width;
    }
  }
}

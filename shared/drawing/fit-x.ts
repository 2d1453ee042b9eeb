import type { Stop, Stops } from './stops.ts';

const SWEEPS = 24;
/** A lane bends less readily than a plate moves: long links run straight. */
const LANE_PULL = 4;

/**
 * Places the anchors of the stops: each tier in turn is drawn towards its neighbours by weighted least squares
 * under the order and the least gaps, which pooling of adjacent violators solves exactly for one tier.
 * @returns anchor x by stop id
 */
export function fitX(stops: Stops, order: string[][]): Map<string, number> {
  const byId = new Map(stops.stops.map((stop) => [stop.id, stop]));
  const neighbours = neighboursOf(stops, byId);
  const x = new Map<string, number>();
  for (const tier of order)
    placeSideBySide(
      tier.map((id) => byId.get(id)!),
      x,
    );
  const upwards = order.map((_, tier) => tier);
  for (let sweep = 0; sweep < SWEEPS; sweep += 1) {
    const turn = sweep % 2 === 0 ? upwards : upwards.toReversed();
    for (const tier of turn)
      fitTier(
        order[tier]!.map((id) => byId.get(id)!),
        neighbours,
        x,
      );
  }
  return x;
}

type Neighbours = Map<string, { id: string; pull: number }[]>;

function neighboursOf(stops: Stops, byId: Map<string, Stop>): Neighbours {
  const neighbours: Neighbours = new Map(stops.stops.map((stop) => [stop.id, []]));
  for (const { upper, lower } of stops.steps) {
    const pull = byId.get(upper)!.isLane || byId.get(lower)!.isLane ? LANE_PULL : 1;
    neighbours.get(upper)!.push({ id: lower, pull });
    neighbours.get(lower)!.push({ id: upper, pull });
  }
  return neighbours;
}

/** Least distance of two neighbours' anchors. */
function distance(left: Stop, right: Stop): number {
  return left.width - left.anchor + Math.max(left.gap, right.gap) + right.anchor;
}

function placeSideBySide(tier: Stop[], x: Map<string, number>): void {
  let at = 0;
  tier.forEach((stop, index) => {
    at += index === 0 ? 0 : distance(tier[index - 1]!, stop);
    x.set(stop.id, at);
  });
  for (const stop of tier) x.set(stop.id, x.get(stop.id)! - at / 2);
}

interface Pool {
  weight: number;
  sum: number;
  count: number;
}

/** Isotonic regression of (wished x minus the least distances so far): exact under the order. */
function fitTier(tier: Stop[], neighbours: Neighbours, x: Map<string, number>): void {
  const offsets: number[] = [];
  const pools: Pool[] = [];
  tier.forEach((stop, index) => {
    offsets.push(index === 0 ? 0 : offsets[index - 1]! + distance(tier[index - 1]!, stop));
    const near = neighbours.get(stop.id)!;
    const weight = near.reduce((sum, one) => sum + one.pull, 0) || 0.01;
    const wish =
      near.length === 0
        ? x.get(stop.id)!
        : near.reduce((sum, one) => sum + one.pull * x.get(one.id)!, 0) / weight;
    pools.push({ weight, sum: weight * (wish - offsets[index]!), count: 1 });
    while (pools.length > 1 && mean(pools.at(-2)!) > mean(pools.at(-1)!)) merge(pools);
  });
  let index = 0;
  for (const pool of pools) {
    for (let taken = 0; taken < pool.count; taken += 1, index += 1)
      x.set(tier[index]!.id, mean(pool) + offsets[index]!);
  }
}

function mean(pool: Pool): number {
  return pool.sum / pool.weight;
}

function merge(pools: Pool[]): void {
  const last = pools.pop()!;
  const before = pools.at(-1)!;
  before.weight += last.weight;
  before.sum += last.sum;
  before.count += last.count;
}

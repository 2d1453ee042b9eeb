import { compiled } from './compile-network.ts';
import type { CompiledNetwork } from './compiled-network.ts';
import { MaxHeap } from './max-heap.ts';
import type { Network } from './network.ts';

/**
 * The exact variance of every value, in the order given, correlations included; `Infinity` where it depends on a
 * local part that is not known, since no bound can be given.
 *
 * Values are taken in topological order. Each is walked up only to the first ancestor through which every
 * remaining road leads: from there on the variance of that ancestor, already known, stands for all that is above.
 * With one parent this is a single step. Roots (sources above all) wait aside: one whose first child is the
 * ancestor reached, or comes after it, cannot be met further up. The cost is the number of links walked: small
 * where chains narrow upwards, at most the sum over values of their ancestors' links.
 * @throws EngineError those of `compileNetwork`
 */
export function variances(network: Network | CompiledNetwork): Float64Array {
  const net = compiled(network);
  const state = newState(net);
  for (let place = 0; place < net.nodeCount; place += 1) {
    state.variance[place] = oneParentVariance(state, place) ?? walkedVariance(state, place);
  }
  return Float64Array.from({ length: net.valueCount }, (_, node) => state.variance[state.placeOf[node]!]!);
}

/** The network renumbered by place in the topological order, with the work arrays of one walk. */
type State = {
  net: CompiledNetwork;
  order: Int32Array;
  placeOf: Int32Array;
  linkStart: Int32Array;
  parent: Int32Array;
  sensitivity: Float64Array;
  /** Own variance and class limits; infinite where not known; a group member's limits only. */
  own: Float64Array;
  /** For an ungrouped root the lowest place among its children, beyond all places if it has none; else -1. */
  firstChild: Int32Array;
  /** Group of a place, -1 for none, and the lowest place of each group's members. */
  group: Int32Array;
  lowestPlace: Int32Array;
  variance: Float64Array;
  gain: Float64Array;
  /** Place + 1 of the walk that wrote `gain` last. */
  stamp: Int32Array;
  heap: MaxHeap;
  /** Groups and roots met in the current walk, and the lowest place at which one may be met again. */
  metGroups: number[];
  metRoots: number[];
  lowestGroup: number;
  lowestRoot: number;
};

function newState(net: CompiledNetwork): State {
  const count = net.nodeCount;
  const { order, placeOf } = walkOrder(net);
  const state: State = {
    net,
    order,
    placeOf,
    ...linksByPlace(net, order, placeOf),
    own: new Float64Array(count),
    firstChild: new Int32Array(count).fill(count),
    group: Int32Array.from(order, (node) => net.groupOf[node]!),
    lowestPlace: Int32Array.from(net.groups, (group) =>
      group.members.reduce((lowest, node) => Math.min(lowest, placeOf[node]!), count),
    ),
    variance: new Float64Array(count),
    gain: new Float64Array(count),
    stamp: new Int32Array(count),
    heap: new MaxHeap(count),
    metGroups: [],
    metRoots: [],
    lowestGroup: count,
    lowestRoot: count,
  };
  for (let place = count - 1; place >= 0; place -= 1) {
    state.own[place] = ownVariance(net, order[place]!);
    const from = state.linkStart[place]!;
    const to = state.linkStart[place + 1]!;
    for (let link = from; link < to; link += 1) state.firstChild[state.parent[link]!] = place;
    if (from < to || state.group[place]! >= 0) state.firstChild[place] = -1;
    // Whether an unknown root cancels out is seen only by walking all roads to it.
    else if (state.own[place] === Infinity) state.firstChild[place] = 0;
  }
  return state;
}

/** Topological order with each root just before its first child: what is met together lies together in memory. */
function walkOrder(net: CompiledNetwork): { order: Int32Array; placeOf: Int32Array } {
  const order = new Int32Array(net.nodeCount);
  const placeOf = new Int32Array(net.nodeCount).fill(-1);
  let filled = 0;
  const put = (node: number) => {
    if (placeOf[node]! >= 0) return;
    placeOf[node] = filled;
    order[filled++] = node;
  };
  for (const node of net.order) {
    const from = net.linkStart[node]!;
    const to = net.linkStart[node + 1]!;
    if (from === to) continue;
    for (let link = from; link < to; link += 1) put(net.linkParent[link]!);
    put(node);
  }
  net.order.forEach(put);
  return { order, placeOf };
}

function linksByPlace(
  net: CompiledNetwork,
  order: Int32Array,
  placeOf: Int32Array,
): Pick<State, 'linkStart' | 'parent' | 'sensitivity'> {
  const linkStart = new Int32Array(net.nodeCount + 1);
  const parent = new Int32Array(net.linkParent.length);
  const sensitivity = new Float64Array(net.linkParent.length);
  let filled = 0;
  for (let place = 0; place < net.nodeCount; place += 1) {
    linkStart[place] = filled;
    const node = order[place]!;
    for (let link = net.linkStart[node]!; link < net.linkStart[node + 1]!; link += 1) {
      parent[filled] = placeOf[net.linkParent[link]!]!;
      sensitivity[filled++] = net.linkSensitivity[link]!;
    }
  }
  linkStart[net.nodeCount] = filled;
  return { linkStart, parent, sensitivity };
}

function ownVariance(net: CompiledNetwork, node: number): number {
  if (net.unknown[node]) return Infinity;
  let sum = net.ownVariance[node]!;
  for (let link = net.linkStart[node]!; link < net.linkStart[node + 1]!; link += 1) {
    sum += net.linkSpread[link]! * net.linkSpread[link]!;
  }
  return sum;
}

/** An infinite variance that enters with sensitivity 0 does not enter. */
function scaled(gain: number, variance: number): number {
  if (gain === 0) return 0;
  return variance === Infinity ? Infinity : gain * gain * variance;
}

/** The short cut for an ungrouped value with at most one parent; undefined where a walk is needed. */
function oneParentVariance(state: State, place: number): number | undefined {
  const from = state.linkStart[place]!;
  const count = state.linkStart[place + 1]! - from;
  if (count > 1 || state.group[place]! >= 0) return undefined;
  if (count === 0) return state.own[place]!;
  return state.own[place]! + scaled(state.sensitivity[from]!, state.variance[state.parent[from]!]!);
}

function walkedVariance(state: State, focus: number): number {
  const { heap, gain, stamp } = state;
  state.metGroups.length = 0;
  state.metRoots.length = 0;
  state.lowestGroup = state.net.nodeCount;
  state.lowestRoot = state.net.nodeCount;
  gain[focus] = 1;
  stamp[focus] = focus + 1;
  let sum = expand(state, focus, focus);
  while (heap.size > 0) {
    const place = heap.pop();
    // What was met and may be met again above would be correlated with this ancestor: then the walk goes on.
    if (heap.size === 0 && place < state.lowestGroup && place <= state.lowestRoot) {
      sum += scaled(gain[place]!, state.variance[place]!) + rootsOfLast(state, place, focus);
      break;
    }
    sum += expand(state, place, focus);
  }
  for (const root of state.metRoots) sum += scaled(gain[root]!, state.variance[root]!);
  for (const index of state.metGroups) sum += groupVariance(state, index, focus);
  return Math.max(0, sum);
}

/** Adds a node's own variance and hands its gain to its parents. */
function expand(state: State, place: number, focus: number): number {
  const { gain, stamp, parent, sensitivity, firstChild } = state;
  const own = gain[place]!;
  if (state.group[place]! >= 0) meetGroup(state, state.group[place]!);
  const to = state.linkStart[place + 1]!;
  let sum = scaled(own, state.own[place]!);
  for (let link = state.linkStart[place]!; link < to; link += 1) {
    const up = parent[link]!;
    const part = own * sensitivity[link]!;
    if (stamp[up] === focus + 1) {
      gain[up]! += part;
      continue;
    }
    const first = firstChild[up]!;
    if (first === place) {
      sum += scaled(part, state.variance[up]!);
      continue;
    }
    stamp[up] = focus + 1;
    gain[up] = part;
    if (first < 0) {
      state.heap.push(up);
    } else {
      state.metRoots.push(up);
      if (first < state.lowestRoot) state.lowestRoot = first;
    }
  }
  return sum;
}

function meetGroup(state: State, index: number): void {
  if (!state.metGroups.includes(index)) state.metGroups.push(index);
  state.lowestGroup = Math.min(state.lowestGroup, state.lowestPlace[index]!);
}

/** Twice the covariance of the last ancestor with the waiting roots whose first child it is. */
function rootsOfLast(state: State, place: number, focus: number): number {
  let sum = 0;
  for (let link = state.linkStart[place]!; link < state.linkStart[place + 1]!; link += 1) {
    const root = state.parent[link]!;
    if (state.stamp[root] !== focus + 1) continue;
    const product = state.gain[place]! * state.gain[root]! * state.sensitivity[link]!;
    if (product !== 0) sum += 2 * product * state.variance[root]!;
  }
  return sum;
}

/** `g' K g` over the members this walk has reached. */
function groupVariance(state: State, index: number, focus: number): number {
  const { members, covariance } = state.net.groups[index]!;
  const gains = Array.from(members, (node) => {
    const place = state.placeOf[node]!;
    return state.stamp[place] === focus + 1 ? state.gain[place]! : 0;
  });
  let sum = 0;
  gains.forEach((gain, i) => {
    if (gain !== 0) gains.forEach((other, j) => (sum += gain * other * covariance[i]![j]!));
  });
  return sum;
}

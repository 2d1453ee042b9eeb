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
 * With one parent this is a single step. Roots with one child are added on sight. The cost is the number of links
 * walked, so it is small where chains narrow upwards and at most the sum over values of their ancestors.
 * @throws EngineError those of `compileNetwork`
 */
export function variances(network: Network | CompiledNetwork): Float64Array {
  const net = compiled(network);
  const state = newState(net);
  for (let place = 0; place < net.nodeCount; place += 1) {
    state.variance[place] = oneParentVariance(state, place) ?? walkedVariance(state, place);
  }
  return Float64Array.from({ length: net.valueCount }, (_, node) => state.variance[net.position[node]!]!);
}

/** The network renumbered by place in the topological order, with the work arrays of one walk. */
type State = {
  net: CompiledNetwork;
  linkStart: Int32Array;
  parent: Int32Array;
  sensitivity: Float64Array;
  /** Own variance and class limits; infinite where not known; a group member's limits only. */
  own: Float64Array;
  /** 1 for an ungrouped root with one child. */
  privateRoot: Uint8Array;
  /** Group of a place, -1 for none, and the lowest place of each group's members. */
  group: Int32Array;
  lowestPlace: Int32Array;
  variance: Float64Array;
  gain: Float64Array;
  /** Place + 1 of the walk that wrote `gain` last. */
  stamp: Int32Array;
  heap: MaxHeap;
  /** Groups met in the current walk, and the lowest place among their members. */
  metGroups: Set<number>;
  lowestMet: number;
};

function newState(net: CompiledNetwork): State {
  const count = net.nodeCount;
  const state: State = {
    net,
    ...linksByPlace(net),
    own: new Float64Array(count),
    privateRoot: new Uint8Array(count),
    group: Int32Array.from(net.order, (node) => net.groupOf[node]!),
    lowestPlace: Int32Array.from(net.groups, (group) =>
      group.members.reduce((lowest, node) => Math.min(lowest, net.position[node]!), count),
    ),
    variance: new Float64Array(count),
    gain: new Float64Array(count),
    stamp: new Int32Array(count),
    heap: new MaxHeap(count),
    metGroups: new Set(),
    lowestMet: count,
  };
  const childCount = new Int32Array(count);
  for (const parent of state.parent) childCount[parent]! += 1;
  for (let place = 0; place < count; place += 1) {
    state.own[place] = ownVariance(net, net.order[place]!);
    const isRoot = state.linkStart[place] === state.linkStart[place + 1];
    state.privateRoot[place] = Number(isRoot && childCount[place] === 1 && state.group[place]! < 0);
  }
  return state;
}

function linksByPlace(net: CompiledNetwork): Pick<State, 'linkStart' | 'parent' | 'sensitivity'> {
  const linkStart = new Int32Array(net.nodeCount + 1);
  const parent = new Int32Array(net.linkParent.length);
  const sensitivity = new Float64Array(net.linkParent.length);
  let filled = 0;
  for (let place = 0; place < net.nodeCount; place += 1) {
    linkStart[place] = filled;
    const node = net.order[place]!;
    for (let link = net.linkStart[node]!; link < net.linkStart[node + 1]!; link += 1) {
      parent[filled] = net.position[net.linkParent[link]!]!;
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
  state.metGroups.clear();
  state.lowestMet = state.net.nodeCount;
  gain[focus] = 1;
  stamp[focus] = focus + 1;
  let sum = expand(state, focus, focus);
  while (heap.size > 0) {
    const place = heap.pop();
    // A met group below this place may share its covariance with what is above: then the walk goes on.
    if (heap.size === 0 && place < state.lowestMet) {
      sum += scaled(gain[place]!, state.variance[place]!);
      break;
    }
    sum += expand(state, place, focus);
  }
  for (const index of state.metGroups) sum += groupVariance(state, index, focus);
  return Math.max(0, sum);
}

/** Adds a node's own variance and hands its gain to its parents. */
function expand(state: State, place: number, focus: number): number {
  const { gain, stamp, parent, sensitivity } = state;
  const own = gain[place]!;
  const index = state.group[place]!;
  if (index >= 0) {
    state.metGroups.add(index);
    state.lowestMet = Math.min(state.lowestMet, state.lowestPlace[index]!);
  }
  let sum = scaled(own, state.own[place]!);
  for (let link = state.linkStart[place]!; link < state.linkStart[place + 1]!; link += 1) {
    const up = parent[link]!;
    const part = own * sensitivity[link]!;
    if (state.privateRoot[up]) {
      sum += scaled(part, state.variance[up]!);
    } else if (stamp[up] === focus + 1) {
      gain[up]! += part;
    } else {
      stamp[up] = focus + 1;
      gain[up] = part;
      state.heap.push(up);
    }
  }
  return sum;
}

/** `g' K g` over the members this walk has reached. */
function groupVariance(state: State, index: number, focus: number): number {
  const { members, covariance } = state.net.groups[index]!;
  const gains = Array.from(members, (node) => {
    const place = state.net.position[node]!;
    return state.stamp[place] === focus + 1 ? state.gain[place]! : 0;
  });
  let sum = 0;
  gains.forEach((gain, i) => {
    if (gain !== 0) gains.forEach((other, j) => (sum += gain * other * covariance[i]![j]!));
  });
  return sum;
}

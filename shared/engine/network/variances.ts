import { compiled } from './compile-network.ts';
import type { CompiledNetwork } from './compiled-network.ts';
import { MaxHeap } from './max-heap.ts';
import type { Network } from './network.ts';
import {
  FIRST_CHILD,
  GAIN,
  GROUP,
  INTEGERS,
  LINK_END,
  LINK_START,
  NUMBERS,
  OWN,
  PARENT,
  SENSITIVITY,
  STAMP,
  VARIANCE,
  type WalkRecords,
  walkRecords,
} from './walk-records.ts';

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
  const { numbers, placeOf } = state;
  for (let place = 0; place < net.nodeCount; place += 1) {
    numbers[place * NUMBERS + VARIANCE] = oneParentVariance(state, place) ?? walkedVariance(state, place);
  }
  const variance = new Float64Array(net.valueCount);
  for (let node = 0; node < net.valueCount; node += 1) {
    variance[node] = numbers[placeOf[node]! * NUMBERS + VARIANCE]!;
  }
  return variance;
}

/** The records with the work of one walk. */
type State = WalkRecords & {
  net: CompiledNetwork;
  /** Lowest place of each group's members. */
  lowestPlace: Int32Array;
  heap: MaxHeap;
  /** Groups and roots met in the current walk, and the lowest place at which a group may be met again. */
  metGroups: number[];
  metRoots: number[];
  lowestGroup: number;
};

function newState(net: CompiledNetwork): State {
  const records = walkRecords(net);
  return {
    ...records,
    net,
    lowestPlace: Int32Array.from(net.groups, (group) =>
      group.members.reduce((lowest, node) => Math.min(lowest, records.placeOf[node]!), net.nodeCount),
    ),
    heap: new MaxHeap(net.nodeCount),
    metGroups: [],
    metRoots: [],
    lowestGroup: net.nodeCount,
  };
}

/** An infinite variance that enters with sensitivity 0 does not enter. */
function scaled(gain: number, variance: number): number {
  if (gain === 0) return 0;
  return variance === Infinity ? Infinity : gain * gain * variance;
}

/** The short cut for an ungrouped value with at most one parent; undefined where a walk is needed. */
function oneParentVariance({ numbers, integers }: State, place: number): number | undefined {
  const at = place * INTEGERS;
  const count = integers[at + LINK_END]! - integers[at + LINK_START]!;
  if (count > 1 || integers[at + GROUP]! >= 0) return undefined;
  const own = numbers[place * NUMBERS + OWN]!;
  if (count === 0) return own;
  const parentVariance = numbers[integers[at + PARENT]! * NUMBERS + VARIANCE]!;
  return own + scaled(numbers[place * NUMBERS + SENSITIVITY]!, parentVariance);
}

/** One long function on purpose, since a register of a million values spends its time here and calls cost a sixth. */
function walkedVariance(state: State, focus: number): number {
  const { heap, numbers, integers, parent, sensitivity, metRoots } = state;
  const stamp = focus + 1;
  startWalk(state, focus);
  let sum = 0;
  let lowestRoot = state.net.nodeCount;
  for (let place = focus; ; place = heap.pop()) {
    // What was met and may be met again above would be correlated with this ancestor: then the walk goes on.
    if (heap.size === 0 && place < state.lowestGroup && place <= lowestRoot && place !== focus) {
      sum += shareOf(state, place) + rootsOfLast(state, place, stamp);
      break;
    }
    const at = place * INTEGERS;
    const gain = numbers[place * NUMBERS + GAIN]!;
    sum += scaled(gain, numbers[place * NUMBERS + OWN]!);
    if (integers[at + GROUP]! >= 0) meetGroup(state, integers[at + GROUP]!);
    let up = integers[at + PARENT]!;
    let part = gain * numbers[place * NUMBERS + SENSITIVITY]!;
    const end = integers[at + LINK_END]!;
    for (let link = integers[at + LINK_START]!; link < end;) {
      const first = integers[up * INTEGERS + FIRST_CHILD]!;
      if (integers[up * INTEGERS + STAMP] === stamp) {
        numbers[up * NUMBERS + GAIN]! += part;
      } else if (first === place) {
        sum += scaled(part, numbers[up * NUMBERS + VARIANCE]!);
      } else {
        integers[up * INTEGERS + STAMP] = stamp;
        numbers[up * NUMBERS + GAIN] = part;
        if (first < 0) heap.push(up);
        else metRoots.push(up);
        if (first >= 0 && first < lowestRoot) lowestRoot = first;
      }
      link += 1;
      if (link === end) break;
      up = parent[link]!;
      part = gain * sensitivity[link]!;
    }
    if (heap.size === 0) break;
  }
  for (const root of metRoots) sum += shareOf(state, root);
  for (const index of state.metGroups) sum += groupVariance(state, index, stamp);
  return Math.max(0, sum);
}

function startWalk(state: State, focus: number): void {
  state.metGroups.length = 0;
  state.metRoots.length = 0;
  state.lowestGroup = state.net.nodeCount;
  state.numbers[focus * NUMBERS + GAIN] = 1;
  state.integers[focus * INTEGERS + STAMP] = focus + 1;
}

/** What a place and all above it bring to the focus. */
function shareOf({ numbers }: State, place: number): number {
  return scaled(numbers[place * NUMBERS + GAIN]!, numbers[place * NUMBERS + VARIANCE]!);
}

function meetGroup(state: State, index: number): void {
  if (!state.metGroups.includes(index)) state.metGroups.push(index);
  state.lowestGroup = Math.min(state.lowestGroup, state.lowestPlace[index]!);
}

/** Twice the covariance of the last ancestor with the waiting roots whose first child it is. */
function rootsOfLast(
  { numbers, integers, parent, sensitivity }: State,
  place: number,
  stamp: number,
): number {
  const gain = numbers[place * NUMBERS + GAIN]!;
  const end = integers[place * INTEGERS + LINK_END]!;
  let sum = 0;
  for (let link = integers[place * INTEGERS + LINK_START]!; link < end; link += 1) {
    const root = parent[link]!;
    if (integers[root * INTEGERS + STAMP] !== stamp) continue;
    const product = gain * numbers[root * NUMBERS + GAIN]! * sensitivity[link]!;
    if (product !== 0) sum += 2 * product * numbers[root * NUMBERS + VARIANCE]!;
  }
  return sum;
}

/** `g' K g` over the members this walk has reached. */
function groupVariance(state: State, index: number, stamp: number): number {
  const { members, covariance } = state.net.groups[index]!;
  const gains = Array.from(members, (node) => {
    const place = state.placeOf[node]!;
    return state.integers[place * INTEGERS + STAMP] === stamp ? state.numbers[place * NUMBERS + GAIN]! : 0;
  });
  let sum = 0;
  gains.forEach((gain, i) => {
    if (gain !== 0) gains.forEach((other, j) => (sum += gain * other * covariance[i]![j]!));
  });
  return sum;
}

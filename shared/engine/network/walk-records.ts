import type { CompiledNetwork } from './compiled-network.ts';

/*
 * The network renumbered for walks. A walk touches places in an order that memory does not like, so all it needs of one
 * place lies together in a record of 64 bytes, one line of the processor's cache: eight numbers, or sixteen integers
 * over the same bytes. Field f of a place is `numbers[place * NUMBERS + f]` or `integers[place * INTEGERS + f]`.
 */

/** Numbers in a record. */
export const NUMBERS = 8;
/** Integers over the same bytes. */
export const INTEGERS = 16;

/** Own variance and class limits; infinite where not known; of a group member its class limits only. */
export const OWN = 0;
/** Variance found so far. */
export const VARIANCE = 1;
/** Sensitivity of the current walk's focus to the place. */
export const GAIN = 2;
/** Sensitivity of the first link; the others are in `sensitivity`. */
export const SENSITIVITY = 3;

/** Place + 1 of the walk that wrote `GAIN` last. */
export const STAMP = 8;
/** Group, -1 for none. */
export const GROUP = 9;
/** Parent of the first link; the others are in `parent`. */
export const PARENT = 10;
/** Links of the place: from here up to, not including, `LINK_END`. */
export const LINK_START = 11;
export const LINK_END = 12;
/** Of an ungrouped root the lowest place among its children, beyond all places if it has none; else -1. */
export const FIRST_CHILD = 13;

/** Places are numbers in `order`; links of a place lie together in `parent` and `sensitivity`. */
export type WalkRecords = {
  order: Int32Array;
  placeOf: Int32Array;
  numbers: Float64Array;
  integers: Int32Array;
  parent: Int32Array;
  sensitivity: Float64Array;
};

/** Renumbers a network; no variance is found yet. */
export function walkRecords(net: CompiledNetwork): WalkRecords {
  const { order, placeOf } = walkOrder(net);
  const numbers = new Float64Array(NUMBERS * net.nodeCount);
  const integers = new Int32Array(numbers.buffer);
  const records: WalkRecords = {
    order,
    placeOf,
    numbers,
    integers,
    parent: new Int32Array(net.linkParent.length),
    sensitivity: new Float64Array(net.linkParent.length),
  };
  let filled = 0;
  for (let place = 0; place < net.nodeCount; place += 1) filled = fillRecord(records, net, place, filled);
  for (let place = net.nodeCount - 1; place >= 0; place -= 1) findFirstChildren(records, place);
  return records;
}

/** Writes the record of a place and its links from `filled` on; returns where the next place's links begin. */
function fillRecord(records: WalkRecords, net: CompiledNetwork, place: number, filled: number): number {
  const { numbers, integers, parent, sensitivity, placeOf } = records;
  const node = records.order[place]!;
  const from = net.linkStart[node]!;
  const to = net.linkStart[node + 1]!;
  let own = net.unknown[node] ? Infinity : net.ownVariance[node]!;
  let next = filled;
  for (let link = from; link < to; link += 1) {
    own += net.linkSpread[link]! * net.linkSpread[link]!;
    parent[next] = placeOf[net.linkParent[link]!]!;
    sensitivity[next++] = net.linkSensitivity[link]!;
  }
  numbers[place * NUMBERS + OWN] = own;
  integers[place * INTEGERS + GROUP] = net.groupOf[node]!;
  integers[place * INTEGERS + LINK_START] = filled;
  integers[place * INTEGERS + LINK_END] = next;
  integers[place * INTEGERS + FIRST_CHILD] = net.nodeCount;
  if (from < to) {
    numbers[place * NUMBERS + SENSITIVITY] = sensitivity[filled]!;
    integers[place * INTEGERS + PARENT] = parent[filled]!;
  }
  return next;
}

/** Enters a place as first child of its parents; called from the last place to the first, so that the lowest stays. */
function findFirstChildren({ numbers, integers, parent }: WalkRecords, place: number): void {
  const at = place * INTEGERS;
  const from = integers[at + LINK_START]!;
  const to = integers[at + LINK_END]!;
  for (let link = from; link < to; link += 1) integers[parent[link]! * INTEGERS + FIRST_CHILD] = place;
  if (from < to || integers[at + GROUP]! >= 0) integers[at + FIRST_CHILD] = -1;
  // Whether an unknown root cancels out is seen only by walking all roads to it.
  else if (numbers[place * NUMBERS + OWN] === Infinity) integers[at + FIRST_CHILD] = 0;
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

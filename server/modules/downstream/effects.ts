import { Decimal } from '#shared/decimal.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import type { WeightClass } from '#shared/engine/conformity/r111-2004.ts';
import { noticeEntries } from '#shared/engine/network/notice-entries.ts';
import type { Below } from './below.ts';
import type { GraphArrays } from './graph-arrays.ts';

/** A change as the graph sees it: nodes, grams. */
export type GraphChange =
  | { kind: 'shift'; node: number; shift: number }
  | { kind: 'raise'; node: number; addedU: number }
  | { kind: 'withdraw'; nodes: readonly number[] }
  /** One effect with standard uncertainty `addedU` and a sensitivity to it for each value covered. */
  | {
      kind: 'notice';
      addedU: number;
      covered: readonly Covered[];
      /** Day number: its shift does not pass links used by notice since, whose child used the corrected value. */
      appliedFrom?: number;
    };

export interface Covered {
  node: number;
  shift: number;
  /** Its mass over 1 kg. */
  sensitivity: number;
  /** Standard uncertainty of the effect at this value, where it is not the same for each kilogram. */
  u?: number;
}

/** What the changes bring to each value, by place. */
export interface Effects {
  /** Grams; NaN where something it depends on is withdrawn. */
  shift: Float64Array;
  /** Added to the value's variance, g2: each change that raises an uncertainty is an independent effect. */
  addedVariance: Float64Array;
  isLost: Uint8Array;
  /** It, or something above it, used by its class limit a value that leaves its class. */
  isBeyondLimit: Uint8Array;
  /** Places of those that leave their class while others used them by its limit. */
  leaving: number[];
}

/** Grams in a milligram, in which limits are tabulated. */
const GRAMS_PER_MILLIGRAM = 1e-3;
/** Relative noise of doubles beside an exact limit. */
const NOISE = 1e-12;

/**
 * Forward accumulation through the values and all below them: what a value hands down arrives times the link's
 * sensitivity, and nothing passes a link through a class limit, since the child used the nominal.
 * @param judged the shift by which it is decided whether a value leaves its class, where that is not the shift itself
 */
export function effectsOf(
  graph: GraphArrays,
  found: Below,
  changes: readonly GraphChange[],
  judged: (place: number, shift: number) => number = (_, shift) => shift,
): Effects {
  const count = found.nodes.length;
  const walk = new Walk(graph, found);
  const shift = new Float64Array(count);
  const addedVariance = new Float64Array(count);
  const isLost = new Uint8Array(count);
  /** Shifts that do not pass every link, handed down already. */
  const noticed = new Float64Array(count);
  for (const change of changes) {
    switch (change.kind) {
      case 'shift':
        shift[found.placeOf(change.node)]! += change.shift;
        break;
      case 'raise':
        addSquares(addedVariance, walk.handDown([{ node: change.node, amount: change.addedU }]));
        break;
      case 'withdraw':
        for (const node of change.nodes) isLost[found.placeOf(node)] = 1;
        break;
      case 'notice': {
        const entries = walk.entryPoints(change.covered);
        const shifts = entries.map((entry) => ({ node: entry.node, amount: entry.shift }));
        add(noticed, walk.handDown(shifts, change.appliedFrom));
        const amounts = entries.map((entry) => ({
          node: entry.node,
          amount: entry.u ?? entry.sensitivity * change.addedU,
        }));
        addSquares(addedVariance, walk.handDown(amounts));
      }
    }
  }
  walk.accumulate(shift);
  add(shift, noticed);
  walk.spread(isLost);
  for (let place = 0; place < count; place += 1) if (isLost[place]) shift[place] = NaN;
  const { isBeyondLimit, leaving } = beyondLimits(walk, shift, judged);
  walk.spread(isBeyondLimit);
  return { shift, addedVariance, isLost, isBeyondLimit, leaving };
}

/** The links of the values found, in the order of `found`, read once for every pass. */
class Walk {
  readonly graph: GraphArrays;
  readonly found: Below;

  constructor(graph: GraphArrays, found: Below) {
    this.graph = graph;
    this.found = found;
  }

  /** Calls back for each link between two values found, parents' own links first. */
  each(visit: (place: number, parent: number, link: number) => void): void {
    const { graph, found } = this;
    for (let place = 0; place < found.nodes.length; place += 1) {
      for (let link = graph.firstUp[found.nodes[place]!]!; link >= 0; link = graph.nextUp[link]!) {
        const parent = found.placeOf(graph.linkParent[link]!);
        if (parent >= 0) visit(place, parent, link);
      }
    }
  }

  /** @param appliedFrom day number: nothing passes links used by notice from then on */
  accumulate(amounts: Float64Array, appliedFrom = Infinity): void {
    const { sensitivity, isClassLimit, isByNotice, usedEndDay } = this.graph;
    this.each((place, parent, link) => {
      if (isClassLimit[link] || amounts[parent] === 0) return;
      if (isByNotice[link] && usedEndDay[link]! >= appliedFrom) return;
      amounts[place]! += sensitivity[link]! * amounts[parent]!;
    });
  }

  /** What an effect that enters at some values amounts to everywhere. */
  handDown(entries: readonly { node: number; amount: number }[], appliedFrom?: number): Float64Array {
    const amounts = new Float64Array(this.found.nodes.length);
    for (const { node, amount } of entries) amounts[this.found.placeOf(node)]! += amount;
    this.accumulate(amounts, appliedFrom);
    return amounts;
  }

  /** Marks everything that depends on a marked value. */
  spread(marks: Uint8Array): void {
    this.each((place, parent, link) => {
      if (marks[parent] && this.passes(link)) marks[place] = 1;
    });
  }

  /** Where a notice enters, once a path, each for the part that enters there (`noticeEntries`). */
  entryPoints(covered: readonly Covered[]): Covered[] {
    const { graph, found } = this;
    const byPlace = new Map(covered.map((one) => [found.placeOf(one.node), one]));
    const parentsOf = (place: number) => {
      const parents: { parent: number; sensitivity: number }[] = [];
      for (let link = graph.firstUp[found.nodes[place]!]!; link >= 0; link = graph.nextUp[link]!) {
        const parent = found.placeOf(graph.linkParent[link]!);
        if (parent >= 0 && this.passes(link)) parents.push({ parent, sensitivity: graph.sensitivity[link]! });
      }
      return parents;
    };
    const masses = new Map([...byPlace].map(([place, { sensitivity }]) => [place, sensitivity]));
    return [...noticeEntries(found.nodes.keys(), parentsOf, masses)].map(([place, part]) => {
      const { node, shift, sensitivity, u } = byPlace.get(place)!;
      const own = { node, shift: part * shift, sensitivity: part * sensitivity };
      return u === undefined ? own : { ...own, u: part * u };
    });
  }

  passes(link: number): boolean {
    return !this.graph.isClassLimit[link] && this.graph.sensitivity[link] !== 0;
  }
}

function add(sum: Float64Array, amounts: Float64Array): void {
  for (let place = 0; place < sum.length; place += 1) sum[place]! += amounts[place]!;
}

function addSquares(sum: Float64Array, amounts: Float64Array): void {
  for (let place = 0; place < sum.length; place += 1) sum[place]! += amounts[place]! * amounts[place]!;
}

function beyondLimits(
  walk: Walk,
  shift: Float64Array,
  judged: (place: number, shift: number) => number,
): Pick<Effects, 'isBeyondLimit' | 'leaving'> {
  const { graph, found } = walk;
  const limits = classLimits(graph);
  const isBeyondLimit = new Uint8Array(shift.length);
  const leaving = new Set<number>();
  walk.each((place, parent, link) => {
    if (!graph.isClassLimit[link] || !shift[parent]) return;
    const node = found.nodes[parent]!;
    const limit = limits(node) ?? graph.statedLimits.get(link);
    if (limit === undefined) return;
    const before = Math.abs(graph.deviation[node]!);
    const after = Math.abs(graph.deviation[node]! + judged(parent, shift[parent]!));
    if (after <= limit * (1 + NOISE) || before > limit) return;
    isBeyondLimit[place] = 1;
    leaving.add(parent);
  });
  return { isBeyondLimit, leaving: [...leaving] };
}

/** Maximum permissible errors in grams by node; undefined without a class, or where the class has none. Each is looked up once. */
export function classLimits(graph: GraphArrays): (node: number) => number | undefined {
  const known = new Map<number, number | undefined>();
  return (node) => {
    const key = graph.class[node]! * 65_536 + graph.nominal[node]!;
    if (known.has(key)) return known.get(key);
    const limit = limitOf(graph, node);
    known.set(key, limit);
    return limit;
  };
}

function limitOf(graph: GraphArrays, node: number): number | undefined {
  if (graph.class[node] === 0) return undefined;
  const weightClass = graph.classes.at(graph.class[node]! - 1) as WeightClass;
  const limit = maximumPermissibleError(weightClass, new Decimal(graph.nominals.at(graph.nominal[node]!)));
  return limit ? limit.toNumber() * GRAMS_PER_MILLIGRAM : undefined;
}

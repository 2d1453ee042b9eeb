import type { Country } from './country.ts';
import { mixed } from './draws.ts';
import { parentTable, type ParentTable } from './value-links.ts';

/** What a register is like, as counted. */
export interface CountryFigures {
  laboratories: number;
  standards: number;
  certificates: number;
  values: number;
  links: number;
  levels: number;
  /** Mean and largest number of ancestors of values drawn at random. */
  meanAncestors: number;
  mostAncestors: number;
  /** Number of the value with the most below it, from 0, and how many. */
  root: { value: number; below: number };
  /** The value that comes closest to the number of descendants asked for. */
  wide: { value: number; below: number };
}

const SAMPLE = 2_000;
/** Steps whose values are tried for the one with a certain number of descendants: above the laboratories, few and wide. */
const DEEPEST_CANDIDATE = 4;

/**
 * Counts a planned register.
 * @param wantedBelow descendants that one value to be named should have, as nearly as there is one
 */
export function figuresOf(country: Country, wantedBelow: number): CountryFigures {
  const up = parentTable(country);
  const down = turned(up, country.valueCount);
  const counter = new Counter(country.valueCount);
  const ancestors = Array.from({ length: SAMPLE }, (_, n) =>
    counter.reach(up, mixed(country.seed, 99, n) % country.valueCount),
  );
  return {
    laboratories: country.laboratories.length,
    standards: country.standardCount,
    certificates: country.certificateCount,
    values: country.valueCount,
    links: up.parent.length,
    levels: levelsOf(up, country.valueCount),
    meanAncestors: ancestors.reduce((sum, count) => sum + count, 0) / SAMPLE,
    mostAncestors: Math.max(...ancestors),
    root: { value: 0, below: counter.reach(down, 0) },
    wide: closest(country, down, counter, wantedBelow),
  };
}

/** Children by value. */
function turned(up: ParentTable, count: number): ParentTable {
  const start = new Int32Array(count + 1);
  for (const parent of up.parent) start[parent + 1]! += 1;
  for (let value = 0; value < count; value += 1) start[value + 1]! += start[value]!;
  const filled = start.slice();
  const child = new Int32Array(up.parent.length);
  for (let value = 0; value < count; value += 1) {
    for (let at = up.start[value]!; at < up.start[value + 1]!; at += 1)
      child[filled[up.parent[at]!]!++] = value;
  }
  return { start, parent: child };
}

function levelsOf(up: ParentTable, count: number): number {
  const depth = new Uint8Array(count);
  let deepest = 0;
  for (let value = 0; value < count; value += 1) {
    for (let at = up.start[value]!; at < up.start[value + 1]!; at += 1) {
      depth[value] = Math.max(depth[value]!, depth[up.parent[at]!]! + 1);
    }
    deepest = Math.max(deepest, depth[value]!);
  }
  return deepest + 1;
}

function closest(
  country: Country,
  down: ParentTable,
  counter: Counter,
  wanted: number,
): CountryFigures['wide'] {
  let best = { value: 0, below: 0 };
  for (const work of country.works) {
    if (work.set.level === 0 || work.set.level > DEEPEST_CANDIDATE) continue;
    for (let value = work.firstValue; value < work.firstValue + work.set.count; value += 1) {
      const below = counter.reach(down, value, 2 * wanted);
      if (Math.abs(below - wanted) < Math.abs(best.below - wanted)) best = { value, below };
    }
  }
  return best;
}

/** Counts what can be reached; one array of marks serves every count. */
class Counter {
  readonly #marks: Int32Array;
  readonly #queue: Int32Array;
  #round = 0;

  constructor(count: number) {
    this.#marks = new Int32Array(count);
    this.#queue = new Int32Array(count);
  }

  reach(table: ParentTable, from: number, most = Infinity): number {
    this.#round += 1;
    const [marks, queue, round] = [this.#marks, this.#queue, this.#round];
    let found = 1;
    queue[0] = from;
    marks[from] = round;
    for (let at = 0; at < found && found <= most; at += 1) {
      const value = queue[at]!;
      for (let link = table.start[value]!; link < table.start[value + 1]!; link += 1) {
        const next = table.parent[link]!;
        if (marks[next] === round) continue;
        marks[next] = round;
        queue[found++] = next;
      }
    }
    return found - 1;
  }
}

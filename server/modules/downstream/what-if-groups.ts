import { SIGHT } from './sight.ts';
import type { DryRun } from './dry-run.ts';

/** What is counted of a group: nothing that its rows would not tell. */
export interface WhatIfGroupSums {
  key: string;
  count: number;
  warned: number;
  /** By place in `WORDS`. */
  words: [number, number, number];
  /** Grams; null where none can be computed. */
  largestShift: number | null;
  /** |shift|/U among those seen in full; null without any. */
  largestRatio: number | null;
}

/** The rows of a dry run in groups. */
export class WhatIfGroups {
  readonly #run: DryRun;
  readonly #keyOf: (node: number, sight: number) => string;
  readonly #groups = new Map<string, WhatIfGroupSums & { places: number[] }>();

  constructor(run: DryRun, keyOf: (node: number, sight: number) => string) {
    this.#run = run;
    this.#keyOf = keyOf;
  }

  /** Counts a visible row. */
  add(place: number): void {
    const { graph, found, effects, sight, word } = this.#run;
    const node = found.nodes[place]!;
    const group = this.#group(this.#keyOf(node, sight[place]!));
    group.places.push(place);
    group.count += 1;
    if (sight[place] !== SIGHT.full) group.warned += 1;
    group.words[word[place] as 0 | 1 | 2] += 1;
    const size = Math.abs(effects.shift[place]!);
    if (Number.isNaN(size)) return;
    group.largestShift = Math.max(group.largestShift ?? 0, size);
    const ratio = size / graph.expandedU[node]!;
    if (sight[place] === SIGHT.full && !Number.isNaN(ratio)) {
      group.largestRatio = Math.max(group.largestRatio ?? 0, ratio);
    }
  }

  all(): WhatIfGroupSums[] {
    return [...this.#groups.values()];
  }

  /** The rows of a group; none for a key that has none. */
  placesOf(key: string): readonly number[] {
    return this.#groups.get(key)?.places ?? [];
  }

  #group(key: string): WhatIfGroupSums & { places: number[] } {
    const known = this.#groups.get(key);
    if (known) return known;
    const words: [number, number, number] = [0, 0, 0];
    const fresh = { key, count: 0, warned: 0, words, largestShift: null, largestRatio: null, places: [] };
    this.#groups.set(key, fresh);
    return fresh;
  }
}

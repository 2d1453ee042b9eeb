import { deflateSync, inflateSync } from 'node:zlib';

/** What is alike shrinks to a tenth at the lowest level already, and the server has requests to answer. */
const FAST = { level: 1 };

/**
 * A list that is only added to and read once, kept as deflated blocks: the findings of a whole network are some
 * hundred thousand, and wait in memory until the work is done, so that a run that breaks off leaves nothing behind.
 */
export class PackedList<Item> {
  readonly #size: number;
  readonly #blocks: Buffer[] = [];
  #open: Item[] = [];
  #length = 0;

  /** @param size items of a block */
  constructor(size: number) {
    this.#size = size;
  }

  get length(): number {
    return this.#length;
  }

  /** @returns the item's place, from 0 */
  add(item: Item): number {
    this.#open.push(item);
    if (this.#open.length === this.#size) this.#close();
    this.#length += 1;
    return this.#length - 1;
  }

  /** The deflated blocks, each the JSON of a list. */
  packed(): readonly Buffer[] {
    if (this.#open.length > 0) this.#close();
    return this.#blocks;
  }

  /** The items, a block at a time. */
  *blocks(): Generator<Item[]> {
    for (const block of this.packed()) yield unpacked<Item>(block);
  }

  #close(): void {
    this.#blocks.push(deflateSync(JSON.stringify(this.#open), FAST));
    this.#open = [];
  }
}

/** The items of one block. */
export function unpacked<Item>(block: Buffer): Item[] {
  return JSON.parse(inflateSync(block).toString('utf8')) as Item[];
}

/**
 * A map that holds the most recently used entries, up to a number, and forgets the one unused for longest: what a
 * register of any size takes in memory stays bounded, and nothing that is asked for often has to be read again.
 */
export class RecentMap<Key, Value> {
  readonly #most: number;
  /** A `Map` keeps the order of insertion: what is used is put in anew, so the first is the one to forget. */
  readonly #entries = new Map<Key, Value>();

  /** @param most entries kept */
  constructor(most: number) {
    this.#most = most;
  }

  get size(): number {
    return this.#entries.size;
  }

  /** Whether it is held; it then counts as used. */
  has(key: Key): boolean {
    return this.get(key) !== undefined;
  }

  /** The entry, which counts as used. */
  get(key: Key): Value | undefined {
    const value = this.#entries.get(key);
    if (value === undefined) return undefined;
    this.#entries.delete(key);
    this.#entries.set(key, value);
    return value;
  }

  set(key: Key, value: Value): void {
    this.#entries.delete(key);
    this.#entries.set(key, value);
    if (this.#entries.size <= this.#most) return;
    const [oldest] = this.#entries.keys();
    this.#entries.delete(oldest!);
  }

  delete(key: Key): void {
    this.#entries.delete(key);
  }
}

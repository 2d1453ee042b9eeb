/** A set of register ids, one bit each: a million values in 125 kB. */
export class SeenIds {
  #bits = new Uint8Array(1 << 16);

  /** Adds an id. @returns whether it was new */
  add(id: number): boolean {
    const at = Math.floor(id / 8);
    if (at >= this.#bits.length) this.#grow(at);
    const bit = 1 << (id % 8);
    const isNew = (this.#bits[at]! & bit) === 0;
    this.#bits[at]! |= bit;
    return isNew;
  }

  #grow(at: number): void {
    const larger = new Uint8Array(Math.max(this.#bits.length * 2, at + 1));
    larger.set(this.#bits);
    this.#bits = larger;
  }
}

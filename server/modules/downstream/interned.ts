/** Texts that repeat (laboratories, nominals, classes), each kept once and named by its place. */
export class Interned {
  readonly #texts: string[] = [];
  readonly #places = new Map<string, number>();

  get size(): number {
    return this.#texts.length;
  }

  /** The place of a text, given one where it has none yet. */
  put(text: string): number {
    const known = this.#places.get(text);
    if (known !== undefined) return known;
    this.#places.set(text, this.#texts.length);
    return this.#texts.push(text) - 1;
  }

  /** The text at a place that `put` gave. */
  at(place: number): string {
    return this.#texts[place]!;
  }
}

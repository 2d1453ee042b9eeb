/**
 * Covariances of the local parts of one calibration's values, g2: half of a symmetric matrix as one array, since a
 * design of thirty weights has 435 of them and a country thousands of designs.
 */
export class GroupCovariance {
  readonly #places = new Map<number, number>();
  readonly #cells: Float64Array;

  /** @param packed "row column covariance" with value ids, one after the other, separated by commas; each pair once */
  constructor(packed: string) {
    const entries = packed.split(',').map((text) => text.split(' ').map(Number) as [number, number, number]);
    for (const [row, column] of entries) {
      for (const id of [row, column]) if (!this.#places.has(id)) this.#places.set(id, this.#places.size);
    }
    this.#cells = new Float64Array((this.#places.size * (this.#places.size + 1)) / 2);
    for (const [row, column, covariance] of entries) this.#cells[this.#cellOf(row, column)!] = covariance;
  }

  /** Of two values by id; 0 where none is given, or one is no member. */
  between(one: number, other: number): number {
    const cell = this.#cellOf(one, other);
    return cell === undefined ? 0 : this.#cells[cell]!;
  }

  #cellOf(one: number, other: number): number | undefined {
    const a = this.#places.get(one);
    const b = this.#places.get(other);
    if (a === undefined || b === undefined) return undefined;
    const [low, high] = a < b ? [a, b] : [b, a];
    return (high * (high + 1)) / 2 + low;
  }
}

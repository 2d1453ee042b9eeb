/** A heap of distinct places that gives the largest first, on one typed array: no allocation while it works. */
export class MaxHeap {
  size = 0;
  private readonly places: Int32Array;

  /** @param capacity the most entries it will ever hold at once */
  constructor(capacity: number) {
    this.places = new Int32Array(capacity);
  }

  push(place: number): void {
    const places = this.places;
    let at = this.size++;
    while (at > 0) {
      const up = (at - 1) >> 1;
      if (places[up]! >= place) break;
      places[at] = places[up]!;
      at = up;
    }
    places[at] = place;
  }

  /** Removes and returns the largest entry. */
  pop(): number {
    const places = this.places;
    const largest = places[0]!;
    const last = places[--this.size]!;
    let at = 0;
    for (;;) {
      let down = 2 * at + 1;
      if (down >= this.size) break;
      if (down + 1 < this.size && places[down + 1]! > places[down]!) down += 1;
      if (places[down]! <= last) break;
      places[at] = places[down]!;
      at = down;
    }
    places[at] = last;
    return largest;
  }
}

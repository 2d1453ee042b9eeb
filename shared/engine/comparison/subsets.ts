/** All subsets of a size, in the order of the items: the first keeps the first items. */
export function subsetsOfSize<T>(items: readonly T[], size: number): T[][] {
  const subsets: T[][] = [];
  const places = Array.from({ length: size }, (_, i) => i);
  for (;;) {
    subsets.push(places.map((place) => items[place]!));
    let turn = size - 1;
    while (turn >= 0 && places[turn] === items.length - size + turn) turn -= 1;
    if (turn < 0) return subsets;
    places[turn]! += 1;
    for (let next = turn + 1; next < size; next += 1) places[next] = places[next - 1]! + 1;
  }
}

import type { DisplayList, Plate } from '#shared/drawing/display-list.ts';

/**
 * The plate an arrow key leads to: up and down along the widest link, sideways to the next plate of the tier; Home
 * is the weight itself. Null where the key leads nowhere.
 */
export function plateFrom(list: DisplayList, from: string, key: string): string | null {
  if (key === 'Home') return list.plates.find((plate) => plate.isFocus)?.id ?? null;
  if (key === 'ArrowUp') return alongWidest(list, from, 'up');
  if (key === 'ArrowDown') return alongWidest(list, from, 'down');
  if (key === 'ArrowLeft') return beside(list, from, -1);
  if (key === 'ArrowRight') return beside(list, from, 1);
  return null;
}

function alongWidest(list: DisplayList, from: string, way: 'up' | 'down'): string | null {
  const links = list.ribbons
    .map(({ link, width }) => ({ link, width }))
    .filter(({ link }) => (way === 'up' ? link.childUid : link.parentUid) === from)
    .toSorted((a, b) => b.width - a.width);
  const [widest] = links;
  if (!widest) return null;
  return way === 'up' ? widest.link.parentUid : widest.link.childUid;
}

function beside(list: DisplayList, from: string, step: 1 | -1): string | null {
  const here = list.plates.find((plate) => plate.id === from);
  if (!here) return null;
  const tier = list.plates.filter((plate) => plate.y === here.y).toSorted(byX);
  return tier[tier.indexOf(here) + step]?.id ?? null;
}

function byX(a: Plate, b: Plate): number {
  return a.x - b.x;
}

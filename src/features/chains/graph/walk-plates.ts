import type { DisplayList } from '#shared/drawing/display-list.ts';

/**
 * The plate an arrow key leads to: up and down along the widest link, sideways to the next plate of the tier and on
 * to the next tier; Home is the weight itself. Null where the key leads nowhere.
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
    .toSorted((a, b) => Number(isEffect(a.link)) - Number(isEffect(b.link)) || b.width - a.width);
  const [widest] = links;
  if (!widest) return null;
  return way === 'up' ? widest.link.parentUid : widest.link.childUid;
}

/** Values come first: an effect that two of them share leads no further up. */
function isEffect({ role }: DisplayList['ribbons'][number]['link']): boolean {
  return role === 'source';
}

/** From the weight upwards, each tier from left to right: so every plate can be reached. */
function beside(list: DisplayList, from: string, step: 1 | -1): string | null {
  const inOrder = list.plates.toSorted((a, b) => b.y - a.y || a.x - b.x);
  const here = inOrder.findIndex((plate) => plate.id === from);
  return here === -1 ? null : (inOrder[here + step]?.id ?? null);
}

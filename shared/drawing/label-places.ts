import type { PlacedRibbon, Point } from './layout-input.ts';
import { bendOf, pointAt } from './ribbon-path.ts';
import { textWidth } from './text-width.ts';

/** A label that is to be set on a ribbon. */
export interface WantedLabel {
  text: string;
  ribbon: PlacedRibbon;
  /** A mark stands in the ribbon's middle: the label keeps beside it. */
  isBesideMark: boolean;
}

export interface PlacedLabel {
  text: string;
  x: number;
  y: number;
  anchor: 'start' | 'middle';
}

/** Where on a ribbon's last bend a label may stand, the best first. */
const PLACES = [0.5, 0.36, 0.64, 0.26, 0.74] as const;
const SIZE = 12;
const HEIGHT = 15;
/** Room at either side of a label, so that two are not read as one number. */
const CLEAR = 4;
/** From the middle of a marked ribbon to its label, beyond half its width. */
const BESIDE = 5;

interface Box {
  left: number;
  right: number;
  top: number;
}

/**
 * Sets labels so that none stands on another or on a mark: the widest ribbon chooses first. A label that finds no
 * place is left out; the table and the card have its number.
 */
export function placeLabels(
  wanted: readonly (WantedLabel | null)[],
  marks: readonly Point[],
): (PlacedLabel | null)[] {
  const taken: Box[] = marks.map(({ x, y }) => ({ left: x - 8, right: x + 4, top: y - HEIGHT / 2 }));
  const placed: (PlacedLabel | null)[] = wanted.map(() => null);
  const widestFirst = wanted
    .map((label, index) => ({ label, index }))
    .toSorted((a, b) => (b.label?.ribbon.width ?? 0) - (a.label?.ribbon.width ?? 0));
  for (const { label, index } of widestFirst) {
    if (!label) continue;
    const free = candidates(label).find((one) => !taken.some((box) => overlap(box, boxOf(one))));
    if (!free) continue;
    taken.push(boxOf(free));
    placed[index] = free;
  }
  return placed;
}

function candidates({ text, ribbon, isBesideMark }: WantedLabel): PlacedLabel[] {
  const bend = bendOf(ribbon.points.at(-2)!, ribbon.points.at(-1)!);
  const beside = Math.max(ribbon.width / 2, 5) + BESIDE;
  return PLACES.map((t) => {
    const { x, y } = pointAt(bend, t);
    return isBesideMark && t === 0.5
      ? { text, x: x + beside, y: y + 4, anchor: 'start' as const }
      : { text, x, y: y + 4, anchor: 'middle' as const };
  });
}

function boxOf({ text, x, y, anchor }: PlacedLabel): Box {
  const width = textWidth(text, 'mono', SIZE);
  const left = anchor === 'start' ? x : x - width / 2;
  return { left: left - CLEAR, right: left + width + CLEAR, top: y - 4 - HEIGHT / 2 };
}

function overlap(a: Box, b: Box): boolean {
  return a.left < b.right && b.left < a.right && Math.abs(a.top - b.top) < HEIGHT;
}

import type { DisplayList, Ribbon } from '#shared/drawing/display-list.ts';
import type { Point } from '#shared/drawing/layout-input.ts';
import type { View } from './view-of.ts';

const DURATION_MS = 220;
const EASING = 'cubic-bezier(0.3, 0, 0.2, 1)';
/** A ribbon that would be stretched more than this between two places fades in instead. */
const MOST_STRETCH = 6;

interface Shown {
  list: DisplayList;
  view: View;
}

/**
 * Plates that stay glide from where they stood to their new places, ribbons with them and to their new widths; what
 * is new fades in. Transforms and opacity only. Nothing moves for readers who asked for none.
 */
export function glide(box: HTMLElement, before: Shown, after: Shown): void {
  if (window.matchMedia('(prefers-reduced-motion: reduce)').matches) return;
  const platesBefore = new Map(before.list.plates.map((plate) => [plate.id, plate]));
  const ribbonsBefore = new Map(before.list.ribbons.map((ribbon) => [ribbon.id, ribbon]));
  const placed = (point: Point) => placeInNewView(point, before.view, after.view);
  const scale = before.view.zoom / after.view.zoom;
  const platesAfter = new Map(after.list.plates.map((plate) => [plate.id, plate]));
  for (const element of box.querySelectorAll<SVGGElement>('[data-plate-drawn]')) {
    const id = element.dataset['plateDrawn'] ?? '';
    const [from, to] = [platesBefore.get(id), platesAfter.get(id)];
    if (!to) continue;
    if (!from) fadeIn(element);
    else {
      const start = placed(from);
      if (start.x === to.x && start.y === to.y && scale === 1) continue;
      const shift = [start.x - to.x * scale, start.y - to.y * scale];
      move(element, matrix([scale, 0, 0, scale, ...shift]), STILL);
    }
  }
  const ribbonsAfter = new Map(after.list.ribbons.map((ribbon) => [ribbon.id, ribbon]));
  for (const element of box.querySelectorAll<SVGGElement>('[data-ribbon]')) {
    const id = element.dataset['ribbon'] ?? '';
    const [from, to] = [ribbonsBefore.get(id), ribbonsAfter.get(id)];
    if (!to) continue;
    const start = from && transformBetween(from, to, placed, scale);
    if (!start) fadeIn(element);
    else if (start !== STILL) move(element, start, STILL);
  }
}

function placeInNewView(point: Point, before: View, after: View): Point {
  return {
    x: (point.x * before.zoom + before.x - after.x) / after.zoom,
    y: (point.y * before.zoom + before.y - after.y) / after.zoom,
  };
}

const STILL = 'matrix(1, 0, 0, 1, 0, 0)';

/**
 * What makes the new ribbon stand where the old one stood, so that its ends stay at the gliding plates. An upright
 * one is stretched to the old width; a slanting one keeps to its ends. Undefined where that would distort it.
 */
export function transformBetween(
  from: Ribbon,
  to: Ribbon,
  placed: (point: Point) => Point,
  scale: number,
): string | undefined {
  const [a, b] = [placed(from.ends[0]), placed(from.ends[1])];
  const [c, d] = to.ends;
  const isUpright = Math.abs(d.x - c.x) < Math.max(12, to.width);
  const stretchX = isUpright
    ? (Math.max(1, from.width) * scale) / Math.max(1, to.width)
    : (b.x - a.x) / (d.x - c.x);
  const stretchY = (b.y - a.y) / (d.y - c.y);
  if (!isBearable(stretchX) || !isBearable(stretchY)) return undefined;
  const shiftX = (a.x + b.x) / 2 - ((c.x + d.x) / 2) * stretchX;
  const shiftY = a.y - c.y * stretchY;
  return matrix([stretchX, 0, 0, stretchY, shiftX, shiftY]);
}

function matrix(values: readonly number[]): string {
  return `matrix(${values.map((value) => Math.round(value * 1e4) / 1e4).join(', ')})`;
}

function isBearable(stretch: number): boolean {
  return Number.isFinite(stretch) && stretch > 1 / MOST_STRETCH && stretch < MOST_STRETCH;
}

function fadeIn(element: Element): void {
  element.animate([{ opacity: 0 }, { opacity: 1 }], { duration: DURATION_MS, easing: 'ease-out' });
}

function move(element: Element, from: string, to: string): void {
  element.animate([{ transform: from }, { transform: to }], { duration: DURATION_MS, easing: EASING });
}

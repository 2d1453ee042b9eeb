import type { Point } from './layout-input.ts';
import { bendOf, lineTo, moveTo, pointAt } from './ribbon-path.ts';

/** Distance of hatching lines along a ribbon or a stub, px. */
const SPACING = 5;
/** A thin line is hatched wider than it is, or the hatching would not be seen. */
const LEAST_WIDTH = 7;
/** Pieces a bend is followed in. */
const PIECES = 24;

interface Sample extends Point {
  /** Unit normal of the ribbon. */
  nx: number;
  ny: number;
}

/** Oblique lines across a ribbon, all along it, as one SVG path. */
export function ribbonHatching(points: readonly Point[], width: number): string {
  const half = Math.max(LEAST_WIDTH, width) / 2;
  const samples = evenly(samplesOf(points), SPACING);
  return samples
    .map(({ x, y, nx, ny }) => {
      // Half the width along the ribbon makes the lines stand at about 45 degrees to it, at most 6 px.
      const lean = Math.min(half, 6);
      const a = { x: x + nx * half - ny * lean, y: y + ny * half + nx * lean };
      const b = { x: x - nx * half + ny * lean, y: y - ny * half - nx * lean };
      return moveTo(a) + lineTo(b);
    })
    .join('');
}

/** The two edges of a ribbon as one SVG path: how a negative flow is outlined. */
export function ribbonOutline(points: readonly Point[], width: number): string {
  const samples = samplesOf(points);
  const edge = (side: 1 | -1) =>
    samples
      .map(({ x, y, nx, ny }, index) => {
        const at = { x: x + (side * nx * width) / 2, y: y + (side * ny * width) / 2 };
        return index === 0 ? moveTo(at) : lineTo(at);
      })
      .join('');
  return edge(1) + edge(-1);
}

/** Oblique lines in a box of this size, its left upper corner at the origin, as one SVG path. */
export function boxHatching(width: number, height: number): string {
  let path = '';
  for (let at = SPACING / 2; at < width + height; at += SPACING) {
    const from = { x: Math.min(at, width), y: Math.max(0, at - width) };
    const to = { x: Math.max(0, at - height), y: Math.min(at, height) };
    path += moveTo(from) + lineTo(to);
  }
  return path;
}

function samplesOf(points: readonly Point[]): Sample[] {
  const along: Point[] = [points[0]!];
  for (let index = 1; index < points.length; index += 1) {
    const bend = bendOf(points[index - 1]!, points[index]!);
    for (let piece = 1; piece <= PIECES; piece += 1) along.push(pointAt(bend, piece / PIECES));
  }
  return along.map((point, index) => {
    const before = along[Math.max(0, index - 1)]!;
    const after = along[Math.min(along.length - 1, index + 1)]!;
    const length = Math.hypot(after.x - before.x, after.y - before.y) || 1;
    return { ...point, nx: -(after.y - before.y) / length, ny: (after.x - before.x) / length };
  });
}

/** Samples at even distances along the way. */
function evenly(samples: readonly Sample[], step: number): Sample[] {
  const chosen: Sample[] = [];
  let walked = step / 2;
  for (let index = 1; index < samples.length; index += 1) {
    const [from, to] = [samples[index - 1]!, samples[index]!];
    const length = Math.hypot(to.x - from.x, to.y - from.y);
    for (; walked <= length; walked += step) {
      const t = length === 0 ? 0 : walked / length;
      chosen.push({ ...to, x: from.x + (to.x - from.x) * t, y: from.y + (to.y - from.y) * t });
    }
    walked -= length;
  }
  return chosen;
}

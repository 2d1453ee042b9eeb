import type { Point } from './layout-input.ts';

/** SVG path of a ribbon's middle line: vertical at every stop, one smooth bend between two. */
export function ribbonPath(points: readonly Point[]): string {
  return points
    .map((point, index) => (index === 0 ? moveTo(point) : bendTo(points[index - 1]!, point)))
    .join('');
}

/** Middle of the last bend, next to the child: where a break or a label sits. By symmetry of the bend, exact. */
export function ribbonMiddle(points: readonly Point[]): Point {
  const to = points.at(-1)!;
  const from = points.at(-2)!;
  return { x: (from.x + to.x) / 2, y: (from.y + to.y) / 2 };
}

/** The two parts of a ribbon that is broken in its middle: nothing is drawn within `opening` px of it. */
export function brokenPath(points: readonly Point[], opening: number): [string, string] {
  const bend = bendOf(points.at(-2)!, points.at(-1)!);
  const reach = reachOf(bend, opening);
  const upper = headOf(bend, 0.5 - reach);
  // The bend turned about: its head is the foot of what is below the break.
  const lower = headOf(bend.toReversed() as Bend, 0.5 - reach);
  const before = points.length > 2 ? ribbonPath(points.slice(0, -1)) : moveTo(points[0]!);
  return [before + curveTo(upper), moveTo(lower[3]) + curveTo(lower.toReversed() as Bend)];
}

/** A cubic Bezier curve. */
export type Bend = [Point, Point, Point, Point];

/** The bend between two stops, with vertical tangents. */
export function bendOf(from: Point, to: Point): Bend {
  const middle = (from.y + to.y) / 2;
  return [from, { x: from.x, y: middle }, { x: to.x, y: middle }, to];
}

/** Point of a bend at t from 0 to 1. */
export function pointAt([a, b, c, d]: Bend, t: number): Point {
  const s = 1 - t;
  const at = (key: 'x' | 'y') =>
    s * s * s * a[key] + 3 * s * s * t * b[key] + 3 * s * t * t * c[key] + t * t * t * d[key];
  return { x: at('x'), y: at('y') };
}

/** How far in t from the middle a bend is `distance` px away from it; short bends keep a tenth at each end. */
function reachOf(bend: Bend, distance: number): number {
  const middle = pointAt(bend, 0.5);
  let [low, high] = [0, 0.4];
  for (let step = 0; step < 20; step += 1) {
    const reach = (low + high) / 2;
    const { x, y } = pointAt(bend, 0.5 + reach);
    if (Math.hypot(x - middle.x, y - middle.y) < distance) low = reach;
    else high = reach;
  }
  return high;
}

/** The part of a bend up to t (de Casteljau's division). */
function headOf([a, b, c, d]: Bend, t: number): Bend {
  const [ab, bc, cd] = [between(a, b, t), between(b, c, t), between(c, d, t)];
  const [abc, bcd] = [between(ab, bc, t), between(bc, cd, t)];
  return [a, ab, abc, between(abc, bcd, t)];
}

function between(a: Point, b: Point, t: number): Point {
  return { x: a.x + (b.x - a.x) * t, y: a.y + (b.y - a.y) * t };
}

/** SVG path command that begins a line. */
export function moveTo({ x, y }: Point): string {
  return `M${text(x)},${text(y)}`;
}

/** SVG path command of a straight line. */
export function lineTo({ x, y }: Point): string {
  return `L${text(x)},${text(y)}`;
}

function bendTo(from: Point, to: Point): string {
  return from.x === to.x ? lineTo(to) : curveTo(bendOf(from, to));
}

function curveTo([, b, c, d]: Bend): string {
  return `C${[b, c, d].map(({ x, y }) => `${text(x)},${text(y)}`).join(' ')}`;
}

function text(value: number): string {
  return String(Math.round(value * 100) / 100);
}

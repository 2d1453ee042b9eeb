import type { Point } from './layout-input.ts';

/** SVG path of a ribbon's middle line: vertical at every stop, one smooth bend between two. */
export function ribbonPath(points: readonly Point[]): string {
  return points
    .map((point, index) => {
      if (index === 0) return `M${text(point.x)},${text(point.y)}`;
      const from = points[index - 1]!;
      if (from.x === point.x) return `L${text(point.x)},${text(point.y)}`;
      const middle = (from.y + point.y) / 2;
      return `C${text(from.x)},${text(middle)} ${text(point.x)},${text(middle)} ${text(point.x)},${text(point.y)}`;
    })
    .join('');
}

/** Middle of the last bend, next to the child: where a break or a label sits. By symmetry of the bend, exact. */
export function ribbonMiddle(points: readonly Point[]): Point {
  const to = points.at(-1)!;
  const from = points.at(-2)!;
  return { x: (from.x + to.x) / 2, y: (from.y + to.y) / 2 };
}

function text(value: number): string {
  return String(Math.round(value * 100) / 100);
}

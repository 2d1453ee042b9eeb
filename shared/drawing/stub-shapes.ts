import { shareText } from '#shared/numbers/share-text.ts';
import type { Plate } from './display-list.ts';
import { PLATE, STUB } from './geometry.ts';
import type { Shape } from './shapes.ts';

/** What a value adds of its own: a stub at its plate's left, with its share; hatched with "?" where unknown. */
export function stubShapes({ x: plateX, y: plateY, stub }: Plate): Shape[] {
  if (!stub) return [];
  const x = plateX - STUB.length;
  const middle = plateY + PLATE.height / 2;
  const box = {
    kind: 'rect' as const,
    x,
    y: middle - stub.height / 2,
    width: STUB.length,
    height: stub.height,
  };
  const text = stub.share === null ? '?' : stub.look === 'hairline' ? '' : shareText(stub.share, '.', 0);
  const shapes: Shape[] = [];
  if (stub.look === 'solid') shapes.push({ ...box, fill: 'local' });
  if (stub.look === 'hairline') shapes.push({ ...box, fill: 'ink-3' });
  if (stub.look === 'negative') shapes.push({ ...box, stroke: { ink: 'ink-2', width: 1, dash: [4, 3] } });
  if (stub.look === 'unknown') shapes.push({ ...box, stroke: { ink: 'ink-3', width: 1 } });
  if (stub.hatching !== null)
    shapes.push({
      kind: 'path',
      d: stub.hatching,
      at: { x, y: box.y },
      stroke: { ink: 'ink-3', width: 1 },
    });
  if (text !== '')
    shapes.push({
      kind: 'text',
      x: x - 4,
      y: middle + 4,
      anchor: 'end',
      spans: [{ text, face: 'mono', size: 12, ink: 'ink-2' }],
      halo: 'paper',
    });
  return shapes;
}

import type { Plate, Ribbon } from '#shared/drawing/display-list.ts';
import { PLATE, SCALE } from '#shared/drawing/geometry.ts';
import { plateFigure } from '#shared/drawing/plate-shapes.ts';
import { ribbonFigure } from '#shared/drawing/ribbon-shapes.ts';
import { STATE_GLYPHS, STATE_INKS } from '#shared/drawing/state-glyphs.ts';
import { sizeToFit } from '#shared/drawing/text-width.ts';
import type { Shape, TextSpan } from '#shared/drawing/shapes.ts';

/** Below this zoom a plate's small text can no longer be read: it shows its number and its state instead, large. */
export const BRIEF_BELOW = 0.75;

const PADDING = 9;
const ENLARGED = 1.45;
/** Drawn width of a share of 8 %. */
const LEAST_LABELLED = 0.08 * SCALE;
const ROOM = PLATE.width - 2 * PADDING;

/** A plate as it is drawn when small: outline, stub, number and state only. */
export function briefPlate(plate: Plate): Shape[] {
  const { name, x, y } = plate;
  const face = plate.node.type === 'value' ? 'mono' : 'sans';
  const text = plate.node.type === 'source' ? plate.foot : name;
  const size = sizeToFit([{ text, face }], 30, ROOM, 13);
  const outline = plateFigure({
    ...plate,
    name: '',
    corner: '',
    value: [],
    foot: '',
    stands: null,
    mark: null,
  });
  return [
    ...enlarged(outline.shapes),
    line({ x: x + PADDING, y: y + 36 }, { text, face, size, ink: 'ink' }),
    ...(plate.stands === null ? [] : standing(plate)),
  ];
}

/** The state's mark with its word, or with what is to be noticed; of a group, how many values it speaks for. */
function standing({ x, y, state, stands, mark, node }: Plate): Shape[] {
  const ink = STATE_INKS[state];
  const text = mark ?? (node.type === 'group' ? `${node.members.length} · ${stands}` : state);
  const size = sizeToFit([{ text, face: 'sans' }], 23, ROOM - 32, 13);
  return [
    {
      kind: 'path',
      d: STATE_GLYPHS[state],
      at: { x: x + PADDING - 3, y: y + 47, scale: 2 },
      stroke: { ink, width: 1.6 },
    },
    line({ x: x + PADDING + 32, y: y + 69 }, { text, face: 'sans', size, ink: mark ? 'brass' : ink }),
  ];
}

function line(at: { x: number; y: number }, span: TextSpan): Shape {
  return { kind: 'text', ...at, anchor: 'start', spans: [span] };
}

/** A ribbon as it is drawn when small: its share only where it is wide, and larger. */
export function briefRibbon(ribbon: Ribbon): Shape[] {
  const label = ribbon.width < LEAST_LABELLED ? null : ribbon.label;
  return enlarged(ribbonFigure({ ...ribbon, label }).shapes);
}

function enlarged(shapes: readonly Shape[]): Shape[] {
  return shapes.map((shape) =>
    shape.kind === 'text'
      ? {
          ...shape,
          y: shape.y + 2,
          spans: shape.spans.map((span) => ({ ...span, size: span.size * ENLARGED })),
        }
      : shape,
  );
}

import type { Plate, Ribbon } from '#shared/drawing/display-list.ts';
import { PLATE, SCALE } from '#shared/drawing/geometry.ts';
import { plateFigure } from '#shared/drawing/plate-shapes.ts';
import { ribbonFigure } from '#shared/drawing/ribbon-shapes.ts';
import { STATE_GLYPHS, STATE_INKS } from '#shared/drawing/state-glyphs.ts';
import { sizeToFit } from '#shared/drawing/text-width.ts';
import type { Shape } from '#shared/drawing/shapes.ts';

/** Below this zoom a plate's small text can no longer be read: it shows its number and its state instead, large. */
export const BRIEF_BELOW = 0.75;

const PADDING = 9;
const ENLARGED = 1.45;
/** Drawn width of a share of 8 %. */
const LEAST_LABELLED = 0.08 * SCALE;
const ROOM = PLATE.width - 2 * PADDING;

/** A plate as it is drawn when small: outline, stub, number and state only. */
export function briefPlate(plate: Plate): Shape[] {
  const { name, state, x, y } = plate;
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
  const glyph: Shape = {
    kind: 'path',
    d: STATE_GLYPHS[state],
    at: { x: x + PADDING - 3, y: y + 47, scale: 2 },
    stroke: { ink: STATE_INKS[state], width: 1.6 },
  };
  const line = (at: { x: number; y: number }, spans: Extract<Shape, { kind: 'text' }>['spans']): Shape => ({
    kind: 'text',
    ...at,
    anchor: 'start',
    spans,
  });
  return [
    ...enlarged(outline.shapes),
    line({ x: x + PADDING, y: y + 36 }, [{ text, face, size, ink: 'ink' }]),
    ...(plate.stands === null
      ? []
      : [
          glyph,
          line({ x: x + PADDING + 32, y: y + 69 }, [
            {
              text: plate.mark ?? state,
              face: 'sans',
              size: 23,
              ink: plate.mark ? 'brass' : STATE_INKS[state],
            },
          ]),
        ]),
  ];
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

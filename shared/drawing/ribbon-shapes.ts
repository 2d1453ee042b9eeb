import { shareText } from '#shared/numbers/share-text.ts';
import type { Ribbon } from './display-list.ts';
import type { Figure, Shape } from './shapes.ts';
import { textWidth } from './text-width.ts';

const GLYPHS = { broken: 'M-4.5 -4.5L4.5 4.5M4.5 -4.5L-4.5 4.5', caution: 'M0 -5.5L5.5 4.5H-5.5Z' } as const;
const TEXT_SIZE = 12;

/** A link as wide as what flows through it: broken in its middle where a check fails, hatched where one warns. */
export function ribbonFigure(ribbon: Ribbon): Figure {
  return {
    kind: 'ribbon',
    id: ribbon.id,
    title: titleOf(ribbon),
    shapes: [...strokes(ribbon), ...hatching(ribbon), ...glyph(ribbon), ...label(ribbon), ...noticed(ribbon)],
  };
}

function strokes({ look, strokes: pieces, outline, width }: Ribbon): Shape[] {
  const path = (d: string, stroke: Extract<Shape, { kind: 'path' }>['stroke'] & object): Shape => ({
    kind: 'path',
    d,
    stroke,
  });
  // Outlined ribbons stay open: what lies below them is seen, as they take from it.
  if (outline !== null) return [path(outline, { ink: 'ink-2', width: 1.2, dash: [5, 3] })];
  return pieces.map((d) => {
    if (look === 'informing') return path(d, { ink: 'ink-3', width: 1.5, dash: [1, 5], isRound: true });
    if (look === 'negative') return path(d, { ink: 'ink-2', width: Math.max(1, width), dash: [5, 3] });
    if (look === 'beside') return path(d, { ink: 'brass', width: 1, dash: [8, 3, 2, 3] });
    return path(d, { ink: look === 'solid' ? 'flow' : 'ink-3', width });
  });
}

function hatching(ribbon: Ribbon): Shape[] {
  if (ribbon.hatching === null) return [];
  return [{ kind: 'path', d: ribbon.hatching, stroke: { ink: 'caution', width: 1.2 } }];
}

/** The mark in the middle; the broken link is open there, the hatched one is covered. */
function glyph({ state, middle, outline }: Ribbon): Shape[] {
  if (state !== 'broken' && state !== 'caution') return [];
  const isCovered = state === 'caution' || outline !== null;
  return [
    ...(isCovered ? [{ kind: 'circle' as const, ...middle, radius: 9, fill: 'paper' as const }] : []),
    { kind: 'path', d: GLYPHS[state], at: middle, stroke: { ink: state, width: 2 } },
  ];
}

function label({ label: said }: Ribbon): Shape[] {
  if (said === null) return [];
  const { text, x, y, anchor } = said;
  return [
    {
      kind: 'text',
      x,
      y,
      anchor,
      spans: [{ text, face: 'mono', size: TEXT_SIZE, ink: 'ink-2' }],
      halo: 'paper',
    },
  ];
}

/** A word under the ribbon's middle, with a mark: colour alone says nothing. */
function noticed({ mark, middle }: Ribbon): Shape[] {
  if (mark === null) return [];
  const x = middle.x - textWidth(mark, 'sans', TEXT_SIZE) / 2 + 6;
  return [
    { kind: 'path', d: 'M4 0 8 4 4 8 0 4Z', at: { x: x - 12, y: middle.y + 10 }, fill: 'brass' },
    {
      kind: 'text',
      x,
      y: middle.y + 18,
      anchor: 'start',
      spans: [{ text: mark, face: 'sans', size: TEXT_SIZE, ink: 'brass' }],
      halo: 'paper',
    },
  ];
}

/** The link in words. */
function titleOf({ link, isToScale, state, mark, look }: Ribbon): string {
  const noticedWord = mark === null ? '' : `; ${mark}`;
  if (link.role === 'informs') return `Informs the consensus value; nothing flows${noticedWord}`;
  if (look === 'beside') return `Of the second weight; its flow is not drawn; ${state}${noticedWord}`;
  const share =
    link.flow === null ? 'share not computable' : `${shareText(link.flow, '.', 2)} of the variance`;
  const scale = isToScale || link.flow === null ? '' : ', not to scale';
  const way =
    link.sensitivity === null
      ? `${link.of.length} links in one`
      : `sensitivity ${link.sensitivity.toPrecision(6).replace('-', '\u2212')}`;
  return `${share}${scale}; ${way}; ${state}${noticedWord}`;
}

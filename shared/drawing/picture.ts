import { bandFigure } from './band-shapes.ts';
import type { DisplayList } from './display-list.ts';
import { plateFigure } from './plate-shapes.ts';
import { ribbonFigure } from './ribbon-shapes.ts';
import type { Figure, Picture, Shape } from './shapes.ts';
import { textWidth } from './text-width.ts';

/** Room around the drawing; a ribbon's label at the edge needs some of it. */
const MARGIN = 24;
const CAPTION = { size: 13, leading: 19, gap: 14 } as const;

interface PictureWords {
  title: string;
  description: string;
  /** Said under a drawing that leaves its page: what was asked, and how to read it. One paragraph an entry. */
  caption?: readonly string[];
}

/** The display list as shapes: SVG and PDF write the same ones. */
export function pictureOf(list: DisplayList, words: PictureWords): Picture {
  const left = Math.min(0, list.band.x) - MARGIN;
  const width = Math.max(list.width, list.band.width) + 2 * MARGIN;
  const lines = (words.caption ?? []).flatMap((paragraph) => wrap(paragraph, width - 2 * MARGIN));
  const caption = captionFigure(lines, left + MARGIN, list.height);
  // The widest first: what is drawn later lies above, and a thin line's label stays readable.
  const ribbons = list.ribbons.toSorted((a, b) => b.width - a.width);
  return {
    title: words.title,
    description: words.description,
    x: left,
    y: -MARGIN,
    width,
    height: list.height + 2 * MARGIN + (lines.length > 0 ? CAPTION.gap + lines.length * CAPTION.leading : 0),
    figures: [
      bandFigure(list.band),
      ...ribbons.map(ribbonFigure),
      ...list.plates.map(plateFigure),
      ...(lines.length > 0 ? [caption] : []),
    ],
  };
}

function captionFigure(lines: readonly string[], x: number, under: number): Figure {
  return {
    kind: 'caption',
    id: 'caption',
    title: '',
    shapes: lines.map((text, index): Shape => ({
      kind: 'text',
      x,
      y: under + MARGIN + CAPTION.gap + index * CAPTION.leading,
      anchor: 'start',
      spans: [{ text, face: 'sans', size: CAPTION.size, ink: 'ink-2' }],
    })),
  };
}

function wrap(paragraph: string, width: number): string[] {
  const lines: string[] = [''];
  for (const word of paragraph.split(' ')) {
    const longer = `${lines.at(-1)} ${word}`.trim();
    if (textWidth(longer, 'sans', CAPTION.size) <= width) lines[lines.length - 1] = longer;
    else lines.push(word);
  }
  return lines;
}

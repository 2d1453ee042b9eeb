import { THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';
import type { DisplayList } from './display-list.ts';
import { plateFigure } from './plate-shapes.ts';
import { ribbonFigure } from './ribbon-shapes.ts';
import type { Figure, Picture, Shape, TextSpan } from './shapes.ts';
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

/** The definition in force when the roots were determined: one band across the top. */
function bandFigure(band: DisplayList['band']): Figure {
  const size = 15;
  const words = (text: string): TextSpan => ({ text, face: 'serif', size, ink: 'ink' });
  const planck: TextSpan[] = [
    { ...words('h'), face: 'italic' },
    words(` = 6.626${THIN_SPACE}070${THIN_SPACE}15 × 10`),
    { ...words('\u221234'), size: size * 0.72, rise: size * 0.36 },
    words(' J s, exactly'),
  ];
  const prototype = words('the mass of the international prototype, until 2019-05-20');
  const lines: TextSpan[][] = {
    'planck constant': [[words('The kilogram: '), ...planck]],
    'international prototype': [[words('The kilogram: '), prototype]],
    both: [
      [words('The kilogram: '), prototype],
      [words('since then: '), ...planck],
    ],
  }[band.definition];
  const first = band.height / 2 + size * 0.34 - ((lines.length - 1) * 19) / 2;
  return {
    kind: 'band',
    id: 'definition',
    title: lines.map((spans) => spans.map(({ text }) => text).join('')).join('; '),
    isFaint: false,
    shapes: [
      {
        kind: 'rect',
        x: band.x + 0.5,
        y: 0.5,
        width: band.width - 1,
        height: band.height - 1,
        fill: 'raised',
        stroke: { ink: 'ink', width: 1 },
      },
      ...lines.map((spans, index): Shape => ({
        kind: 'text',
        x: band.x + band.width / 2,
        y: first + index * 19,
        anchor: 'middle',
        spans,
      })),
    ],
  };
}

function captionFigure(lines: readonly string[], x: number, under: number): Figure {
  return {
    kind: 'caption',
    id: 'caption',
    title: '',
    isFaint: false,
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

import { THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';
import type { DisplayList } from './display-list.ts';
import type { Figure, Shape, TextSpan } from './shapes.ts';

/**
 * The definition in force when the roots were determined: one band across the top. The Planck constant is exact
 * since 2019-05-20 (26th CGPM, Resolution 1).
 */
export function bandFigure(band: DisplayList['band'], size = 15): Figure {
  const leading = size * 1.26;
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
  const first = band.height / 2 + size * 0.34 - ((lines.length - 1) * leading) / 2;
  return {
    kind: 'band',
    id: 'definition',
    title: lines.map((spans) => spans.map(({ text }) => text).join('')).join('; '),
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
        y: first + index * leading,
        anchor: 'middle',
        spans,
      })),
    ],
  };
}

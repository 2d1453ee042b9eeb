import type { Inks } from './inks.ts';
import type { Figure, Picture, Shape, TextSpan } from './shapes.ts';
import type { Face } from './text-width.ts';

interface SvgOptions {
  inks: Inks;
  /** Rules that bring the fonts along, as data addresses; left out where the page has them. */
  fontRules?: string;
  /** Fills the ground; left out where the drawing stands on a page. */
  hasGround?: boolean;
  /** Begins the drawing's own names, where several drawings stand in one page. */
  prefix?: string;
}

/** Families in the order in which signs are looked for; the last has every sign that the others lack. */
const FAMILIES: Readonly<Record<Face, string>> = {
  sans: "'Instrument Sans Variable','Newsreader Variable','Source Serif 4 Variable','Commit Mono',sans-serif",
  serif: "'Newsreader Variable','Source Serif 4 Variable','Commit Mono',serif",
  italic: "'Newsreader Variable','Source Serif 4 Variable','Commit Mono',serif",
  mono: "'Commit Mono',monospace",
};

/**
 * A picture as SVG that stands alone: text stays text, and each plate and ribbon says what it is. Only presentation
 * attributes are used, so that it may stand in a page under a strict content security policy.
 */
export function toSvg(picture: Picture, options: SvgOptions): string {
  const { x, y, width, height } = picture;
  const box = [x, y, width, height].map(number).join(' ');
  const prefix = options.prefix ?? 'chain';
  const style = options.fontRules
    ? `<style>${escaped(options.fontRules)}text{font-variant-numeric:tabular-nums lining-nums}</style>`
    : '';
  const ground = options.hasGround
    ? rect({ kind: 'rect', x, y, width, height, fill: 'paper' }, options.inks)
    : '';
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="${box}" width="${number(width)}" height="${number(height)}" ` +
    `role="img" aria-labelledby="${prefix}-title ${prefix}-description">` +
    `<title id="${prefix}-title">${escaped(picture.title)}</title>` +
    `<desc id="${prefix}-description">${escaped(picture.description)}</desc>` +
    style +
    ground +
    picture.figures.map((figure) => figureText(figure, options.inks)).join('') +
    '</svg>'
  );
}

function figureText(figure: Figure, inks: Inks): string {
  const title = figure.title === '' ? '' : `<title>${escaped(figure.title)}</title>`;
  const shapes = figure.shapes.map((shape) => shapeText(shape, inks)).join('');
  return `<g data-${figure.kind}="${escaped(figure.id)}">${title}${shapes}</g>`;
}

function shapeText(shape: Shape, inks: Inks): string {
  if (shape.kind === 'rect') return rect(shape, inks);
  if (shape.kind === 'text') return text(shape, inks);
  const paint = paintText(shape, inks);
  if (shape.kind === 'circle')
    return `<circle cx="${number(shape.x)}" cy="${number(shape.y)}" r="${number(shape.radius)}"${paint}/>`;
  const { at } = shape;
  const scale = at?.scale === undefined ? '' : ` scale(${number(at.scale)})`;
  const place = at ? ` transform="translate(${number(at.x)} ${number(at.y)})${scale}"` : '';
  return `<path d="${shape.d}"${place}${paint}/>`;
}

function rect(shape: Extract<Shape, { kind: 'rect' }>, inks: Inks): string {
  const { x, y, width, height } = shape;
  return `<rect x="${number(x)}" y="${number(y)}" width="${number(width)}" height="${number(height)}"${paintText(shape, inks)}/>`;
}

function paintText({ fill, stroke }: Exclude<Shape, { kind: 'text' }>, inks: Inks): string {
  const filled = ` fill="${fill ? inks[fill] : 'none'}"`;
  if (!stroke) return filled;
  const dash = stroke.dash ? ` stroke-dasharray="${stroke.dash.join(' ')}"` : '';
  const cap = stroke.isRound ? ' stroke-linecap="round"' : '';
  return `${filled} stroke="${inks[stroke.ink]}" stroke-width="${number(stroke.width)}"${dash}${cap}`;
}

function text(shape: Extract<Shape, { kind: 'text' }>, inks: Inks): string {
  const halo = shape.halo
    ? ` stroke="${inks[shape.halo]}" stroke-width="4" stroke-linejoin="round" paint-order="stroke"`
    : '';
  const spans = shape.spans.map((span, index) => spanText(span, shape.spans[index - 1], inks)).join('');
  return `<text x="${number(shape.x)}" y="${number(shape.y)}" text-anchor="${shape.anchor}" xml:space="preserve"${halo}>${spans}</text>`;
}

function spanText(span: TextSpan, before: TextSpan | undefined, inks: Inks): string {
  const fall = (before?.rise ?? 0) - (span.rise ?? 0);
  const shift = fall === 0 ? '' : ` dy="${number(fall)}"`;
  const slant = span.face === 'italic' ? ' font-style="italic"' : '';
  return `<tspan font-family="${FAMILIES[span.face]}" font-size="${number(span.size)}" fill="${inks[span.ink]}"${slant}${shift}>${escaped(span.text)}</tspan>`;
}

function number(value: number): string {
  return String(Math.round(value * 1000) / 1000);
}

/** Markup's own signs spelt out; control characters, which XML has no way to write, become spaces. */
function escaped(words: string): string {
  return words
    .replace(/\p{Cc}/gu, ' ')
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;');
}

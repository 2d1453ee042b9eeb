import type { Inks } from '#shared/drawing/inks.ts';
import type { TextSpan } from '#shared/drawing/shapes.ts';
import { THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';
import { firstFont, fontFor, type ShippedFont } from './faces.ts';

export type Paper = PDFKit.PDFDocument;

/** A piece of a span that one font sets; a thin space is an ordinary one set narrow, so that it can be copied. */
interface Run {
  font: ShippedFont;
  text: string;
  size: number;
  width: number;
}

/** A thin space is a fifth of the size, as browsers set it in fonts that have none. */
const THIN = 0.2;
/** Digits of one width; only the sans has others. Shaping with a feature is not remembered, so it is asked where needed. */
const FEATURES: PDFKit.Mixins.OpenTypeFeatures[] = ['tnum'];
/** Signs that have a tabular form: digits, and what stands among them. */
const NUMERIC = /[\d#$%+<=>¢£¥€°±×÷−]/;
const HALO_WIDTH = 4;

interface Place {
  x: number;
  /** Of the baseline, from the top of the page. */
  y: number;
  anchor?: 'start' | 'middle' | 'end';
}

/** Sets a line of text in its inks; an outline in `halo` keeps it readable above a line of a drawing. */
export function setLine(
  paper: Paper,
  spans: readonly TextSpan[],
  place: Place,
  inks: Inks,
  halo?: string,
): void {
  const lineWidth = place.anchor === 'start' || !place.anchor ? 0 : widthOf(paper, spans);
  let x = place.x - (place.anchor === 'end' ? lineWidth : place.anchor === 'middle' ? lineWidth / 2 : 0);
  for (const span of spans) {
    for (const run of runsOf(paper, span)) {
      const y = place.y - (span.rise ?? 0);
      if (halo) setRun(paper, run, { x, y }, { halo });
      setRun(paper, run, { x, y }, { fill: inks[span.ink] });
      x += run.width;
    }
  }
}

/** Width of a line of text, points. */
export function widthOf(paper: Paper, spans: readonly TextSpan[]): number {
  return spans.flatMap((span) => runsOf(paper, span)).reduce((sum, run) => sum + run.width, 0);
}

function setRun(
  paper: Paper,
  run: Run,
  { x, y }: { x: number; y: number },
  how: { fill: string } | { halo: string },
): void {
  use(paper, run.font, run.size);
  const options = { lineBreak: false, baseline: 'alphabetic', ...featuresOf(run) } as const;
  if ('fill' in how) paper.fillColor(how.fill).text(run.text, x, y, options);
  else
    paper
      .lineWidth(HALO_WIDTH)
      .lineJoin('round')
      .undash()
      .strokeColor(how.halo)
      .text(run.text, x, y, { ...options, stroke: true, fill: false });
}

function runsOf(paper: Paper, span: TextSpan): Run[] {
  const runs: { font: ShippedFont; text: string }[] = [];
  for (const sign of span.text) {
    const font = sign === THIN_SPACE ? firstFont(span.face) : fontFor(span.face, sign.codePointAt(0)!);
    const last = runs.at(-1);
    const isThin = sign === THIN_SPACE || last?.text === THIN_SPACE;
    if (last && last.font === font && !isThin) last.text += sign;
    else runs.push({ font, text: sign });
  }
  return runs.map(({ font, text }) =>
    text === THIN_SPACE
      ? { font, text: ' ', size: span.size, width: THIN * span.size }
      : { font, text, size: span.size, width: runWidth(paper, font, text) * span.size },
  );
}

const widths = new WeakMap<Paper, Map<string, number>>();

/** Width at size one; each run of a document is measured once. */
function runWidth(paper: Paper, font: ShippedFont, text: string): number {
  const known = widths.get(paper) ?? new Map<string, number>();
  widths.set(paper, known);
  const key = `${font.name} ${text}`;
  const width = known.get(key);
  if (width !== undefined) return width;
  use(paper, font, 1000);
  const measured = paper.widthOfString(text, featuresOf({ font, text })) / 1000;
  known.set(key, measured);
  return measured;
}

function featuresOf({ font, text }: { font: ShippedFont; text: string }): {
  features?: PDFKit.Mixins.OpenTypeFeatures[];
} {
  return font.hasProportionalDigits && NUMERIC.test(text) ? { features: FEATURES } : {};
}

function use(paper: Paper, font: ShippedFont, size: number): void {
  paper.registerFont(font.name, font.sfnt).font(font.name).fontSize(size);
}

import { PRINT, type Ink } from '#shared/drawing/inks.ts';
import type { Picture, TextSpan } from '#shared/drawing/shapes.ts';
import type { Face } from '#shared/drawing/text-width.ts';
import { finished, newPaper, type DocumentWords } from './document.ts';
import { drawPicture } from './draw-picture.ts';
import { setLine, type Paper } from './set-line.ts';
import { wrap } from './wrap.ts';

/** A4, points. */
const A4 = { short: 595.28, long: 841.89 } as const;
/** 20 mm at the sides, for holes and hands. */
const MARGIN = { side: 56.7, top: 54, foot: 74 } as const;

/** Paragraphs of so many lines stay on one page. */
const KEPT_LINES = 8;

interface SheetWords extends DocumentWords {
  /** Said at the foot of each page, beside its number. */
  foot: TextSpan[];
}

/** A span of text in document sizes, points. */
export function span(text: string, size: number, face: Face = 'sans', ink: Ink = 'ink'): TextSpan {
  return { text, face, size, ink };
}

const RAISED = '⁻⁰¹²³⁴⁵⁶⁷⁸⁹';
const LOWERED = '\u22120123456789';

/** Exponents, and the symbols of quantities before their equals sign. */
const SET_APART = /([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+|\b[hkU](?= = ))/;

/** Prose in the serif: exponents, written as raised signs, are digits raised; symbols of quantities lean. */
export function prose(text: string, size: number, ink: Ink = 'ink'): TextSpan[] {
  return text
    .split(SET_APART)
    .map((piece, index): TextSpan => {
      if (index % 2 === 0) return span(piece, size, 'serif', ink);
      if (/[hkU]/.test(piece)) return span(piece, size, 'italic', ink);
      const plain = [...piece].map((sign) => LOWERED[RAISED.indexOf(sign)]).join('');
      return { ...span(plain, size * 0.72, 'serif', ink), rise: size * 0.36 };
    })
    .filter(({ text: piece }) => piece !== '');
}

/** A4 pages filled from the top, each with its foot. */
export class Sheet {
  readonly paper: Paper;
  /** Where the next thing begins, from the top of the page. */
  y = 0;
  readonly #words: SheetWords;

  constructor(words: SheetWords) {
    this.#words = words;
    this.paper = newPaper(words);
    this.addPage();
  }

  /** Width between the margins. */
  get width(): number {
    return this.paper.page.width - 2 * MARGIN.side;
  }

  get left(): number {
    return MARGIN.side;
  }

  /** What is left of the page above its foot. */
  get room(): number {
    return this.paper.page.height - MARGIN.foot - this.y;
  }

  addPage(layout: 'portrait' | 'landscape' = 'portrait'): void {
    const size: [number, number] = layout === 'portrait' ? [A4.short, A4.long] : [A4.long, A4.short];
    this.paper.addPage({ size, margin: 0 });
    this.y = MARGIN.top;
  }

  /** Begins a new page where less than this is left. */
  need(height: number): void {
    if (this.room < height) this.addPage(this.paper.page.width > A4.short + 1 ? 'landscape' : 'portrait');
  }

  /** Rich text over as many lines and pages as it needs; a short paragraph is never parted. */
  paragraph(
    spans: readonly TextSpan[],
    { leading = 14, after = 6 }: { leading?: number; after?: number } = {},
  ): void {
    const lines = wrap(this.paper, spans, this.width);
    this.need(Math.min(lines.length, KEPT_LINES) * leading);
    for (const line of lines) {
      this.need(leading);
      setLine(this.paper, line, { x: this.left, y: this.y + leading * 0.75 }, PRINT);
      this.y += leading;
    }
    this.y += after;
  }

  /** A heading that keeps some of what follows with it. */
  heading(text: string, size = 14): void {
    this.need(size * 2 + 48);
    this.y += size * 0.7;
    this.paragraph([span(text, size, 'serif')], { leading: size * 1.35, after: 4 });
  }

  /** A hairline across the page. */
  rule(ink: Ink = 'rule', width = 0.5): void {
    this.paper
      .moveTo(this.left, this.y)
      .lineTo(this.left + this.width, this.y)
      .undash()
      .lineWidth(width)
      .stroke(PRINT[ink]);
  }

  /** At which scale a picture fits the rest of the page; never enlarged. */
  scaleOf(picture: Picture): number {
    return Math.min(1, this.width / picture.width, this.room / picture.height);
  }

  /** A picture as large as fits. */
  picture(picture: Picture): void {
    const scale = this.scaleOf(picture);
    const x = this.left + (this.width - picture.width * scale) / 2;
    drawPicture(this.paper, picture, { x, y: this.y, scale }, PRINT);
    this.y += picture.height * scale;
  }

  /** Sets the foot of each page and closes the document. */
  async finish(): Promise<Buffer> {
    const { start, count } = this.paper.bufferedPageRange();
    for (let page = start; page < start + count; page += 1) {
      this.paper.switchToPage(page);
      this.#foot(page - start + 1, count);
    }
    return finished(this.paper);
  }

  #foot(page: number, pages: number): void {
    const { width, height } = this.paper.page;
    const top = height - MARGIN.foot + 22;
    this.y = top;
    this.rule();
    const number = [span(`page ${page} of ${pages}`, 7.5, 'sans', 'ink-2')];
    setLine(this.paper, number, { x: width - MARGIN.side, y: top + 12, anchor: 'end' }, PRINT);
    wrap(this.paper, this.#words.foot, this.width - 70).forEach((line, index) =>
      setLine(this.paper, line, { x: this.left, y: top + 12 + index * 10 }, PRINT),
    );
  }
}

import { describe, expect, it } from 'vitest';
import { newPaper } from './document.ts';
import { widthOf } from './set-line.ts';
import { prose, span } from './sheet.ts';
import { wrap } from './wrap.ts';

const paper = newPaper({
  title: 'A test',
  subject: '',
  keywords: '',
  created: new Date('2026-01-01T00:00:00Z'),
});
const WORDS = 'The weight was calibrated with 1\u2009000.000\u200912 g against its reference and then again.';
const texts = (lines: readonly (readonly { text: string }[])[]) =>
  lines.map((line) => line.map(({ text }) => text).join(''));

describe('lines of text', () => {
  it('are no wider than they may be, and lose nothing', () => {
    const lines = wrap(paper, [span(WORDS, 10)], 120);
    expect(lines.length).toBeGreaterThan(2);
    for (const line of lines) expect(widthOf(paper, line)).toBeLessThanOrEqual(120);
    expect(texts(lines).join(' ')).toBe(WORDS);
  });

  it('hold a number together at its thin spaces', () => {
    const broken = texts(wrap(paper, [span(WORDS, 10)], 90));
    expect(broken.some((line) => line.includes('1\u2009000.000\u200912'))).toBe(true);
  });

  it('break what is wider than a line, such as a hash', () => {
    const hash = 'f'.repeat(64);
    const lines = wrap(paper, [span(hash, 10, 'mono')], 100);
    for (const line of lines) expect(widthOf(paper, line)).toBeLessThanOrEqual(100 + 1e-6);
    expect(texts(lines).join('')).toBe(hash);
  });

  it('keep the face of each word', () => {
    const [line] = wrap(paper, [span('plain ', 10), span('mono', 10, 'mono'), span(' again', 10)], 500);
    expect(line!.map(({ text, face }) => [text, face])).toEqual([
      ['plain ', 'sans'],
      ['mono', 'mono'],
      [' again', 'sans'],
    ]);
  });

  it('raise exponents and lean the symbols of quantities in prose', () => {
    const spans = prose('h = 6.6 × 10⁻³⁴ J s; k = 2; the Kk = x', 10);
    expect(spans.filter(({ face }) => face === 'italic').map(({ text }) => text)).toEqual(['h', 'k']);
    expect(spans.find(({ rise }) => rise !== undefined)!.text).toBe('\u221234');
  });
});

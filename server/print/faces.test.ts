import { describe, expect, it } from 'vitest';
import { textWidth, type Face } from '#shared/drawing/text-width.ts';
import { newPaper } from './document.ts';
import { firstFont, fontFor, webFont } from './faces.ts';
import { widthOf } from './set-line.ts';
import { sfntOf } from './sfnt.ts';

const paper = newPaper({
  title: 'A test',
  subject: '',
  keywords: '',
  created: new Date('2026-01-01T00:00:00Z'),
});

describe('shipped fonts', () => {
  it('finds each sign of a document in a shipped font, as the style sheet orders them', () => {
    const familyOf = (face: Face, sign: string) => fontFor(face, sign.codePointAt(0)!).name.split('/')[1];
    expect(familyOf('sans', 'a')).toBe('instrument-sans');
    expect(familyOf('sans', '±')).toBe('newsreader');
    expect(familyOf('sans', 'µ')).toBe('newsreader');
    expect(familyOf('serif', 'Δ')).toBe('source-serif-4');
    expect(familyOf('serif', '−')).toBe('newsreader');
    expect(familyOf('serif', 'ł')).toBe('newsreader');
    expect(familyOf('sans', '→')).toBe('commit-mono');
    expect(familyOf('mono', 'Ж')).toBe('source-serif-4');
  });

  it.each<Face>(['serif', 'sans', 'mono'])('have the widths that the drawing reckons with: %s', (face) => {
    const signs = [...Array(94).keys()].map((index) => String.fromCharCode(33 + index));
    for (const sign of [...signs, '\u2009', '±', 'µ', '−', '–', '×']) {
      const set = widthOf(paper, [{ text: sign, face, size: 1000, ink: 'ink' }]);
      // The tables hold whole thousandths.
      expect(Math.abs(set - textWidth(sign, face, 1000)), sign).toBeLessThanOrEqual(0.51);
    }
  });

  it('unpacks to tables on four-byte borders, without what bends a variable font', () => {
    const { sfnt } = firstFont('serif');
    const count = sfnt.readUInt16BE(4);
    const tags = Array.from({ length: count }, (_, at) =>
      sfnt.toString('latin1', 12 + 16 * at, 16 + 16 * at),
    );
    expect(tags).toEqual(expect.arrayContaining(['glyf', 'loca', 'cmap', 'hmtx', 'GPOS']));
    expect(tags).not.toContain('gvar');
    for (let at = 0; at < count; at += 1) expect(sfnt.readUInt32BE(20 + 16 * at) % 4).toBe(0);
  });

  it('refuses what is no web font', () => {
    expect(() =>
      sfntOf(Buffer.from('OTTO and nothing more than that, padded to the length of a header')),
    ).toThrow('not a WOFF2 font');
    const cut = webFont('@fontsource/commit-mono/files/commit-mono-latin-400-normal.woff2').subarray(0, 2000);
    expect(() => sfntOf(cut)).toThrow();
  });
});

import { describe, expect, it } from 'vitest';
import { Sheet, span } from './sheet.ts';
import { setTable } from './table.ts';

const WORDS = {
  title: 'A test',
  subject: 'Of pages',
  keywords: 'sha256 none',
  created: new Date('2026-01-01T00:00:00Z'),
  foot: [span('What was asked', 7.5)],
};

/** Where the foot of a page begins, from its top. */
const roomOf = (sheet: Sheet) => sheet.y + sheet.room;

describe('pages of paper', () => {
  it('carry a table on from page to page, and no row into the foot', async () => {
    const sheet = new Sheet(WORDS);
    const rows = Array.from({ length: 120 }, (_, row) => [
      [[span(`Row ${row}`, 9)]],
      [[span('words that take up more than a single line of this narrow column', 9)]],
    ]);
    const ends: number[] = [];
    for (const row of rows) {
      setTable(
        sheet,
        [
          { head: 'Row', parts: 4 },
          { head: 'Words', parts: 1 },
        ],
        [row],
      );
      ends.push(sheet.y - 8);
    }
    expect(Math.max(...ends)).toBeLessThanOrEqual(roomOf(sheet));
    expect(sheet.paper.bufferedPageRange().count).toBeGreaterThan(5);
    await sheet.finish();
  });

  it('keep a short paragraph whole, and part a long one', () => {
    const sheet = new Sheet(WORDS);
    sheet.y = roomOf(sheet) - 20;
    sheet.paragraph([span('Three lines of text are kept together on one page. '.repeat(5), 10)]);
    expect(sheet.paper.bufferedPageRange().count).toBe(2);
    const long = new Sheet(WORDS);
    long.paragraph([span('A long paragraph runs over pages. '.repeat(400), 10)]);
    expect(long.paper.bufferedPageRange().count).toBeGreaterThan(1);
    expect(long.y).toBeLessThanOrEqual(roomOf(long) + 6);
  });

  it('are the same bytes for the same words, and say when they are of', async () => {
    const make = () => {
      const sheet = new Sheet(WORDS);
      sheet.heading('A heading');
      sheet.paragraph([span('1\u2009000.000\u200912 ± 0.000\u200921 g', 10, 'serif')]);
      return sheet.finish();
    };
    const [one, two] = [await make(), await make()];
    expect(one.equals(two)).toBe(true);
    expect(one.toString('latin1')).toContain('(D:20260101000000Z)');
  });

  it('are on their side where a picture is wide', () => {
    const sheet = new Sheet(WORDS);
    const upright = sheet.width;
    sheet.addPage('landscape');
    expect(sheet.width).toBeGreaterThan(upright);
    const picture = { title: '', description: '', x: 0, y: 0, width: 3000, height: 400, figures: [] };
    expect(sheet.scaleOf(picture)).toBeCloseTo(sheet.width / 3000, 9);
    expect(sheet.scaleOf({ ...picture, width: 30, height: 40 })).toBe(1);
  });
});

import { PRINT } from '#shared/drawing/inks.ts';
import type { TextSpan } from '#shared/drawing/shapes.ts';
import { setLine } from './set-line.ts';
import { span, type Sheet } from './sheet.ts';
import { wrap } from './wrap.ts';

export interface Column {
  head: string;
  /** Parts of the table's width. */
  parts: number;
  align?: 'left' | 'right';
}

/** A cell: paragraphs of rich text, one under the other. */
export type Cell = readonly (readonly TextSpan[])[];

const GUTTER = 8;
const PADDING = { top: 4, foot: 4 } as const;

/** A hairline table; its head is set again on every page, and a row is never parted. */
export function setTable(
  sheet: Sheet,
  columns: readonly Column[],
  rows: readonly (readonly Cell[])[],
  leading = 11.5,
): void {
  const places = placesOf(sheet, columns);
  setHead(sheet, columns, places);
  for (const row of rows) {
    const cells = row.map((cell, index) =>
      cell.flatMap((paragraph) => wrap(sheet.paper, paragraph, places[index]!.width)),
    );
    const height = Math.max(...cells.map((lines) => lines.length)) * leading + PADDING.top + PADDING.foot;
    if (sheet.room < height) {
      sheet.need(height);
      setHead(sheet, columns, places);
    }
    cells.forEach((lines, index) => setCell(sheet, lines, { ...places[index]!, leading }));
    sheet.y += height;
    sheet.rule();
  }
  sheet.y += 8;
}

interface CellPlace {
  x: number;
  width: number;
  align: 'left' | 'right';
}

function placesOf(sheet: Sheet, columns: readonly Column[]): CellPlace[] {
  const parts = columns.reduce((sum, column) => sum + column.parts, 0);
  const usable = sheet.width - GUTTER * (columns.length - 1);
  let x = sheet.left;
  return columns.map((column) => {
    const width = (usable * column.parts) / parts;
    const place = { x, width, align: column.align ?? ('left' as const) };
    x += width + GUTTER;
    return place;
  });
}

function setHead(sheet: Sheet, columns: readonly Column[], places: readonly CellPlace[]): void {
  const heads = columns.map((column, index) =>
    wrap(sheet.paper, [span(column.head, 8, 'sans', 'ink-2')], places[index]!.width),
  );
  const height = Math.max(...heads.map((lines) => lines.length)) * 10 + PADDING.top;
  sheet.need(height + 30);
  heads.forEach((lines, index) => setCell(sheet, lines, { ...places[index]!, leading: 10 }));
  sheet.y += height;
  sheet.rule('ink', 0.7);
}

function setCell(
  sheet: Sheet,
  lines: readonly (readonly TextSpan[])[],
  place: CellPlace & { leading: number },
): void {
  const x = place.align === 'right' ? place.x + place.width : place.x;
  const anchor = place.align === 'right' ? 'end' : 'start';
  lines.forEach((line, index) =>
    setLine(
      sheet.paper,
      line,
      { x, y: sheet.y + PADDING.top + (index + 0.72) * place.leading, anchor },
      PRINT,
    ),
  );
}

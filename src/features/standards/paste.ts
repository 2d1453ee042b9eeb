import { isGrams, nominalEntry, nominalMarking, usualShape } from './nominal.ts';
import { MEMBER_COLUMNS, type MemberColumn, type MemberEntry } from './set-entries.ts';

/** Rows and cells of text copied from a spreadsheet; a single cell is left to the browser. */
export function pastedCells(text: string): string[][] | null {
  const lines = text.replace(/\r\n?/g, '\n').replace(/\n+$/, '').split('\n');
  const cells = lines.map((line) => line.split('\t').map((cell) => cell.trim()));
  return cells.length === 1 && cells[0]!.length === 1 ? null : cells;
}

/**
 * Rows with pasted cells laid over them from one cell on, to the right and down; new rows are added as needed.
 * Nothing is dropped in silence: what cannot be read stays as text and the form names the row.
 */
export function withPasted(
  rows: readonly MemberEntry[],
  at: { row: number; column: MemberColumn },
  cells: readonly (readonly string[])[],
  decimalMark: '.' | ',',
): MemberEntry[] {
  const next = [...rows];
  const firstColumn = MEMBER_COLUMNS.indexOf(at.column);
  cells.forEach((line, offset) => {
    const index = at.row + offset;
    let row: MemberEntry = next[index] ?? { nominal: '', marking: '', serial: null, shape: 'knob' };
    const isNew = next[index] === undefined;
    line.forEach((cell, step) => {
      const column = MEMBER_COLUMNS[firstColumn + step];
      if (column) row = withCell(row, column, cell, decimalMark);
    });
    next[index] = isNew ? completed(row) : row;
  });
  return next;
}

function withCell(row: MemberEntry, column: MemberColumn, cell: string, decimalMark: '.' | ','): MemberEntry {
  if (column === 'nominal') {
    return { ...row, nominal: nominalEntry(cell, decimalMark) };
  }
  if (column === 'serial') return { ...row, serial: cell === '' ? null : cell };
  if (column === 'shape') return { ...row, shape: cell.toLowerCase() as MemberEntry['shape'] };
  return { ...row, marking: cell };
}

/** A pasted row that says only its nominal gets the usual marking and shape. */
function completed(row: MemberEntry): MemberEntry {
  if (!isGrams(row.nominal) || row.marking !== '') return row;
  return { ...row, marking: nominalMarking(row.nominal), shape: usualShape(row.nominal) };
}

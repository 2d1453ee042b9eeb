/** A vertical mark that wants a label at its head. */
export interface Mark {
  kind: 'epoch' | 'due';
  x: number;
  text: string;
}

/** A mark with the place of its label: at which side of the line, in which row from the top. */
export interface PlacedLabel extends Mark {
  anchor: 'start' | 'end';
  row: number;
}

/** Width of a character of the 12 px label, pixels, on the generous side. */
const CHARACTER = 6.4;
const GAP = 6;

/** Gives each label a side and a row so that none leaves the frame or covers another. */
export function placeLabels(marks: readonly Mark[], frame: { left: number; right: number }): PlacedLabel[] {
  const rows: { from: number; to: number }[][] = [];
  return marks.map((mark) => {
    const width = mark.text.length * CHARACTER + GAP;
    const fitsLeft = mark.x - width >= frame.left;
    const fitsRight = mark.x + width <= frame.right;
    const anchor =
      mark.kind === 'epoch' ? (fitsLeft || !fitsRight ? 'end' : 'start') : fitsRight ? 'start' : 'end';
    const from = anchor === 'start' ? mark.x : mark.x - width;
    const taken = { from, to: from + width };
    const isFree = (row: (typeof taken)[]) =>
      row.every((other) => other.to <= taken.from || other.from >= taken.to);
    const found = rows.findIndex(isFree);
    const row = found === -1 ? rows.length : found;
    rows[row] = [...(rows[row] ?? []), taken];
    return { ...mark, anchor, row };
  });
}

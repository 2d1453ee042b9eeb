/** A vertical mark that wants a label at its head. */
export interface Mark {
  kind: 'epoch' | 'due';
  /** The day it stands for, ISO 8601. */
  day: string;
  x: number;
  /** From the fullest to the shortest; the first that fits is set. */
  texts: readonly [string, ...string[]];
}

/** A mark with its label: the text that fits, at which side of the line, in which row from the top. */
export interface PlacedLabel {
  kind: Mark['kind'];
  day: string;
  x: number;
  text: string;
  /** Where the text begins, or ends for `end`. */
  textX: number;
  anchor: 'start' | 'end';
  row: number;
}

/** Width of a character of the 13 px label, pixels, on the generous side. */
const CHARACTER = 6.7;
const GAP = 6;

interface Extent {
  left: number;
  right: number;
}

/** Gives each label a text, a side and a row so that none leaves the frame or covers another. */
export function placeLabels(marks: readonly Mark[], frame: Extent): PlacedLabel[] {
  const rows: Extent[][] = [];
  return marks.map((mark) => {
    const { taken, ...label } = besideLine(mark, frame);
    const isFree = (row: Extent[]) =>
      row.every((other) => other.right + GAP <= taken.left || other.left - GAP >= taken.right);
    const found = rows.findIndex(isFree);
    const row = found === -1 ? rows.length : found;
    rows[row] = [...(rows[row] ?? []), taken];
    return { kind: mark.kind, day: mark.day, x: mark.x, ...label, row };
  });
}

/** An intervention is told before its line, a due date after it, where there is room. */
function besideLine(
  mark: Mark,
  frame: Extent,
): Pick<PlacedLabel, 'text' | 'textX' | 'anchor'> & { taken: Extent } {
  const sides = mark.kind === 'epoch' ? (['end', 'start'] as const) : (['start', 'end'] as const);
  for (const text of mark.texts) {
    for (const anchor of sides) {
      const taken = extentOf(text, mark.x, anchor);
      if (taken.left >= frame.left && taken.right <= frame.right) {
        return { text, anchor, textX: mark.x + (anchor === 'end' ? -GAP : GAP), taken };
      }
    }
  }
  const text = mark.texts.at(-1)!;
  const taken = { left: frame.left, right: frame.left + text.length * CHARACTER };
  return { text, anchor: 'start', textX: frame.left, taken };
}

function extentOf(text: string, x: number, anchor: 'start' | 'end'): Extent {
  const width = text.length * CHARACTER + GAP;
  return anchor === 'end' ? { left: x - width, right: x } : { left: x, right: x + width };
}

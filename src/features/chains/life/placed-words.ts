import type { LifeEvent } from '#shared/contracts/chain-life.ts';
import { placeOf, type LifeAxis } from './life-axis.ts';
import { rankOf, wordOf } from './event-words.ts';

/** A word beside the line, at its event. */
export interface PlacedWord {
  key: string;
  word: string;
  /** Left edge, px. */
  left: number;
}

/** Width of a character of the small text, px, on the generous side: words may not touch. */
const CHARACTER = 6.6;
const GAP = 10;

/**
 * The words that find room beside each other in one row: the gravest events first, each at its mark, moved inwards at
 * the ends. An event without room is read at the handle.
 * @param width of the line, px
 */
export function placedWords(axis: LifeAxis, events: readonly LifeEvent[], width: number): PlacedWord[] {
  const placed: (PlacedWord & { right: number })[] = [];
  for (const [key, event] of [...events.entries()].sort(([, a], [, b]) => rankOf(a) - rankOf(b))) {
    const word = wordOf(event);
    const size = word.length * CHARACTER;
    const middle = placeOf(axis, event.inForceFrom) * width;
    const left = Math.min(width - size, Math.max(0, middle - size / 2));
    const isFree = placed.every((other) => left > other.right + GAP || left + size + GAP < other.left);
    if (left >= 0 && isFree) placed.push({ key: `${key} ${word}`, word, left, right: left + size });
  }
  return placed.map(({ right: _, ...word }) => word);
}

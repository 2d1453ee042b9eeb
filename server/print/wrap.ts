import type { TextSpan } from '#shared/drawing/shapes.ts';
import { widthOf, type Paper } from './set-line.ts';

/** A piece that no line is broken in, with the space before it. */
interface Word {
  spans: TextSpan[];
  width: number;
  space: TextSpan | null;
}

/**
 * Breaks rich text into lines no wider than `width`. Lines break at ordinary spaces; thin spaces hold numbers and
 * units together. What is wider than a whole line (a hash) is broken anywhere.
 */
export function wrap(paper: Paper, spans: readonly TextSpan[], width: number): TextSpan[][] {
  const lines: TextSpan[][] = [];
  let line: TextSpan[] = [];
  let taken = 0;
  for (const word of wordsOf(paper, spans).flatMap((one) => brokenUp(paper, one, width))) {
    const space = word.space && line.length > 0 ? widthOf(paper, [word.space]) : 0;
    if (line.length > 0 && taken + space + word.width > width) {
      lines.push(line);
      line = [];
      taken = 0;
    }
    if (word.space && line.length > 0) line.push(word.space);
    line.push(...word.spans);
    taken += (line.length > word.spans.length ? space : 0) + word.width;
  }
  return line.length > 0 ? [...lines, line].map(joinAlike) : lines.map(joinAlike);
}

function wordsOf(paper: Paper, spans: readonly TextSpan[]): Word[] {
  const words: Word[] = [];
  let current: TextSpan[] = [];
  let space: TextSpan | null = null;
  const close = () => {
    if (current.length > 0) words.push({ spans: current, width: widthOf(paper, current), space });
    current = [];
  };
  for (const span of spans) {
    for (const piece of span.text.split(/( )/)) {
      if (piece === '') continue;
      if (piece === ' ') {
        close();
        space = { ...span, text: ' ' };
      } else current.push({ ...span, text: piece });
    }
  }
  close();
  return words;
}

function brokenUp(paper: Paper, word: Word, width: number): Word[] {
  if (word.width <= width) return [word];
  const pieces: Word[] = [];
  for (const span of word.spans) {
    for (const sign of span.text) {
      const piece = { ...span, text: sign };
      const wide = widthOf(paper, [piece]);
      const last = pieces.at(-1);
      if (last && last.width + wide <= width) {
        last.spans.push(piece);
        last.width += wide;
      } else pieces.push({ spans: [piece], width: wide, space: pieces.length === 0 ? word.space : null });
    }
  }
  return pieces;
}

function joinAlike(line: TextSpan[]): TextSpan[] {
  const joined: TextSpan[] = [];
  for (const span of line) {
    const last = joined.at(-1);
    const isAlike =
      last &&
      last.face === span.face &&
      last.size === span.size &&
      last.ink === span.ink &&
      last.rise === span.rise;
    if (isAlike) joined[joined.length - 1] = { ...last, text: last.text + span.text };
    else joined.push(span);
  }
  return joined;
}

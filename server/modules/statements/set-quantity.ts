import type { TextSpan } from '#shared/drawing/shapes.ts';
import type { Face } from '#shared/drawing/text-width.ts';
import { quantitySpans, type InkSpan } from '#shared/numbers/ink-spans.ts';

/** Size and rise of an exponent, parts of the text's size. */
const RAISED = { size: 0.72, rise: 0.36 } as const;

/** A number in document ink: the digits beyond its standard uncertainty in the lightest. */
export function setQuantity(
  input: Parameters<typeof quantitySpans>[0],
  size: number,
  options: Parameters<typeof quantitySpans>[1] & { face?: Face } = {},
): TextSpan[] {
  return quantitySpans(input, options).map((piece) => inked(piece, size, options.face ?? 'serif'));
}

function inked(piece: InkSpan, size: number, face: Face): TextSpan {
  const ink = piece.isBeyond ? 'ink-3' : 'ink';
  if (!piece.isRaised) return { text: piece.text, face, size, ink };
  return { text: piece.text, face, size: size * RAISED.size, rise: size * RAISED.rise, ink };
}

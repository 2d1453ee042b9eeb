/** The faces of documents: each is one shipped font and what it falls back to. */
export type Face = 'sans' | 'serif' | 'italic' | 'mono';

const FIRST = 32;
/** Signs beyond ASCII that the drawing writes, in the order of the tables' last places. */
const SIGNS = '·±−–×µ²³→’';
const THIN = '\u2009';
/** What a sign of no table is taken for: wider than most, so that nothing runs over. */
const UNKNOWN = 680;
const MONO = 600;
const THIN_WIDTH = 200;

/** Advance widths from a space on, thousandths of the size; 0: the face lacks the sign. Digits tabular. */
const SERIF = [
  229, 270, 354, 567, 567, 781, 717, 199, 285, 285, 435, 512, 239, 354, 230, 401, 567, 567, 567, 567, 567,
  567, 567, 567, 567, 567, 253, 269, 512, 512, 512, 441, 891, 711, 644, 705, 763, 640, 592, 751, 800, 339,
  446, 730, 603, 979, 771, 777, 609, 777, 645, 555, 670, 768, 692, 967, 719, 684, 634, 329, 401, 330, 512,
  410, 500, 460, 546, 437, 556, 462, 345, 496, 561, 280, 247, 541, 269, 832, 573, 526, 564, 545, 394, 384,
  342, 537, 527, 743, 507, 524, 431, 322, 252, 322, 512, 247, 512, 512, 521, 512, 564, 350, 330, 0, 237,
];
const SANS = [
  200, 273, 384, 716, 608, 600, 755, 232, 406, 406, 408, 600, 255, 506, 255, 443, 600, 600, 600, 600, 600,
  600, 600, 600, 600, 600, 255, 255, 600, 600, 600, 567, 853, 728, 636, 741, 752, 638, 602, 765, 736, 254,
  455, 692, 588, 906, 736, 786, 656, 787, 656, 608, 648, 712, 728, 1089, 688, 676, 623, 406, 443, 406, 531,
  426, 354, 533, 606, 533, 606, 564, 354, 606, 599, 240, 240, 535, 240, 922, 599, 584, 606, 606, 375, 473,
  377, 589, 523, 767, 551, 523, 496, 406, 242, 406, 531, 255, 0, 600, 586, 600, 0, 0, 0, 0, 255,
];

/**
 * Width of a text in a face, px, kerning apart: enough to know what fits a plate without a page. A test holds
 * the tables equal to the fonts.
 */
export function textWidth(text: string, face: Face, size: number): number {
  let sum = 0;
  for (const sign of text) sum += advance(sign, face);
  return (sum * size) / 1000;
}

function advance(sign: string, face: Face): number {
  if (sign === THIN) return THIN_WIDTH;
  if (face === 'mono') return MONO;
  const code = sign.codePointAt(0)!;
  const place = code < 127 ? code - FIRST : SIGNS.indexOf(sign) + (SIGNS.includes(sign) ? 95 : 0);
  const own = (face === 'sans' ? SANS : SERIF)[place] ?? 0;
  return own || (SERIF[place] ?? 0) || UNKNOWN;
}

/** The text itself, or its beginning and an ellipsis where it would run over. */
export function cutToFit(text: string, face: Face, size: number, room: number): string {
  if (textWidth(text, face, size) <= room) return text;
  const signs = [...text];
  while (signs.length > 0 && textWidth(`${signs.join('').trimEnd()}…`, face, size) > room) signs.pop();
  return `${signs.join('').trimEnd()}…`;
}

/** The largest size, up to the one wished, at which the texts fit side by side; `least` where none does. */
export function sizeToFit(
  pieces: readonly { text: string; face: Face }[],
  wished: number,
  room: number,
  least: number,
): number {
  const atOne = pieces.reduce((sum, piece) => sum + textWidth(piece.text, piece.face, 1), 0);
  return Math.max(least, Math.min(wished, Math.floor((room / atOne) * 10) / 10));
}

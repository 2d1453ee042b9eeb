/** A nominal value that the country's sets hold. A second piece of one nominal bears a star. */
export interface Piece {
  /** Grams. */
  nominal: string;
  /** Grams, as the register writes them. */
  column: string;
  marking: string;
  /** floor(log10) of the nominal in grams. */
  decade: number;
}

const HEAVY = [20, 10, 5, 2, 1].map((kilograms) => piece(`${kilograms}000`, `${kilograms} kg`));
const GRAMS = ['500', '200', '200*', '100', '50', '20', '20*', '10', '5', '2', '2*', '1'];

/** Every piece, heaviest first. A set is a run of them. */
export const PIECES: readonly Piece[] = [
  ...HEAVY,
  ...GRAMS.map((text) => piece(text.replace('*', ''), mark(text, 'g'))),
  ...GRAMS.map((text) => piece((Number(text.replace('*', '')) / 1000).toString(), mark(text, 'mg'))),
];

/** Place of the 1 kg piece. */
export const KILOGRAM = 4;
/** A whole set, 20 kg to 1 mg. */
export const WHOLE_SET = { from: 0, count: PIECES.length };

function mark(text: string, unit: string): string {
  return text.endsWith('*') ? `${text.slice(0, -1)} ${unit}*` : `${text} ${unit}`;
}

function piece(nominal: string, marking: string): Piece {
  const grams = Number(nominal);
  return { nominal, column: grams.toFixed(12), marking, decade: Math.floor(Math.log10(grams) + 1e-9) };
}

/** Sizes of the drawing, px. A share of 100 % is as wide as SCALE. */
export const SCALE = 56;
export const PLATE = { width: 186, height: 84 } as const;
/** A stub is drawn this long; its label stands at its left. */
export const STUB = { length: 34, unknownHeight: 16 } as const;
/** How far a local contribution's stub reaches out of its plate, its label included. */
export const STUB_REACH = 66;
export const GAP = { between: 22, lane: 14, tier: 40 } as const;
/** Room for the definition's band above the roots, wide and high enough for its longest words in two lines. */
export const BAND = { leastWidth: 470, height: 48, gap: 26 } as const;
/** A broken link is open for this many px on either side of its middle. */
export const OPENING = 9;

/** Drawn width of a share: true to scale, or a hairline that says it is not. */
export function ribbonWidth(share: number | null): { width: number; isToScale: boolean } {
  const width = Math.abs(share ?? 0) * SCALE;
  return width < 1 ? { width: 1, isToScale: false } : { width, isToScale: true };
}

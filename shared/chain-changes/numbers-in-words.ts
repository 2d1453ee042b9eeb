import { Decimal } from '#shared/decimal.ts';
import { quantityLine, quantityText } from '#shared/numbers/quantity-text.ts';
import type { Wording } from './change.ts';

const SIGNIFICANT = 6;

/** Whether two decimals on the wire are different numbers. */
export function differs(one: string, other: string): boolean {
  return !new Decimal(one).eq(other);
}

/** A deviation with its U, grams, as it is read: "+0.29 ± 0.20 mg". */
export function massText(
  of: { deviation: string; expandedU: string | number | null; k: string | null },
  wording: Wording,
): string {
  const input = {
    value: of.deviation,
    expandedUncertainty: typeof of.expandedU === 'number' ? plain(of.expandedU) : of.expandedU,
    coverageFactor: of.k,
    kind: 'deviation' as const,
    shownIn: 'auto' as const,
  };
  return quantityLine(quantityText(input, wording));
}

/** A shift in grams, signed, to the place at which `expandedU` is known. */
export function shiftText(shift: string, wording: Wording): string {
  const value = new Decimal(shift).toSignificantDigits(2).toFixed();
  return quantityLine(quantityText({ value, kind: 'deviation', shownIn: 'auto' }, wording));
}

/** An uncertainty in grams to its two digits. */
export function uText(u: number | string | null, wording: Wording): string {
  if (u === null) return 'not stated';
  const value = typeof u === 'number' ? plain(u) : u;
  return quantityLine(
    quantityText({ value, kind: 'uncertainty', coverageFactor: 1, shownIn: 'auto' }, wording),
  );
}

function plain(value: number): string {
  return new Decimal(value).toSignificantDigits(SIGNIFICANT).toFixed();
}

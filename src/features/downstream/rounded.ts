import { Decimal } from '#shared/decimal.ts';
import { THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';
import type { DecimalMark } from '#shared/engine/quantity/read-number.ts';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';

const SHIFT_DIGITS = 3;

/** A computed mass as plain text with three significant digits: it is a forecast, not a value of record. Grams. */
export function roundedText(grams: number): string {
  return new Decimal(grams).toSignificantDigits(SHIFT_DIGITS).toFixed();
}

/** A computed mass as plain text, whatever its size. Grams. */
export function plainText(grams: number): string {
  return new Decimal(grams).toFixed();
}

/** A shift over U: two decimals. */
export function ratioText(
  ratio: number,
  { decimalMark = '.', isSigned = false }: { decimalMark?: DecimalMark; isSigned?: boolean } = {},
): string {
  const isSmall = ratio !== 0 && Math.abs(ratio) < 0.005;
  if (isSmall) return `below${THIN_SPACE}0${decimalMark}01`;
  return formatDecimal(ratio.toFixed(2), { decimalMark, decimals: 2, isSigned });
}

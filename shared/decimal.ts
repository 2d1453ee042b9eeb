import { Decimal as DecimalBase } from 'decimal.js';
import { z } from 'zod';

/**
 * The one Decimal class of the product: 60 significant digits, half to even. Every mass, nominal and
 * deviation is one of these from the form to the column and back; nothing calls `Decimal.set`.
 */
export const Decimal = DecimalBase.clone({
  precision: 60,
  rounding: DecimalBase.ROUND_HALF_EVEN,
  toExpNeg: -60,
  toExpPos: 60,
});
export type Decimal = DecimalBase;

const DECIMAL_TEXT = /^[+-]?\d+(\.\d+)?$/;

/** The canonical text of a decimal: plain notation, no exponent, no plus sign, no trailing zeros, "0" for zero. */
export function decimalText(value: DecimalBase | string): string {
  const text = new Decimal(value).toFixed();
  return text === '-0' ? '0' : text;
}

/**
 * A decimal on the wire: text in plain notation, parsed to canonical form. A JSON number is refused, since
 * it has already lost digits.
 */
export const DecimalString = z
  .string({ error: 'A decimal is sent as text, so that no digit is lost' })
  .trim()
  .max(60)
  .regex(DECIMAL_TEXT, 'Write a plain decimal number such as 0.000 212 without spaces or exponent')
  .transform((text) => decimalText(text));

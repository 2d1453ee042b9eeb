import { Decimal } from '#shared/decimal.ts';
import type { QuantityText } from './quantity-text.ts';
import { THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';

/** What is smaller than this is written as below it: a hundredth of a microgram, grams. */
const LEAST = '0.00000001';

/**
 * Two significant digits of an amount in grams, for one that no uncertainty gives its digits; null where it is not
 * zero and yet below 0.01 µg, which no balance tells.
 */
export function twoDigits(grams: string): string | null {
  const amount = new Decimal(grams);
  if (!amount.isZero() && amount.abs().lt(LEAST)) return null;
  return amount.toSignificantDigits(2).toFixed();
}

/** "below 0.01 µg" where the digits shown of an amount that is not zero are all zeros; null elsewhere. */
export function belowDigits(grams: string, { value, unit }: QuantityText): string | null {
  const digits = value.known + value.beyond;
  if (new Decimal(grams).isZero() || /[1-9]/.test(digits)) return null;
  return `below ${digits.replace(/0(?=\D*$)/, '1')}${THIN_SPACE}${unit}`;
}

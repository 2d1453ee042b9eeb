import { Decimal } from '#shared/decimal.ts';
import { MINUS_SIGN, THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';
import type { DecimalMark } from '#shared/engine/quantity/read-number.ts';
import { convertUnit, type Unit } from '#shared/engine/quantity/units.ts';

/** Digits split where the standard uncertainty begins: `known` in ink, `beyond` in the lightest ink. */
export interface DigitParts {
  known: string;
  beyond: string;
}

/** The same value in another unit of its dimension: a shift of the decimal sign, so no digit is lost. */
export function convertText(text: string, from: Unit, to: Unit): string {
  return convertUnit(new Decimal(text), from, to).toFixed();
}

/**
 * The unit in which a deviation reads best: µg below 1 mg, mg below 1 g, g above.
 * @param deviation grams
 * @param expandedUncertainty grams; the larger of the two decides
 */
export function deviationUnit(deviation: string, expandedUncertainty?: string | null): 'g' | 'mg' | 'ug' {
  const size = Decimal.max(new Decimal(deviation).abs(), new Decimal(expandedUncertainty ?? 0).abs());
  if (size.lt('0.001')) return 'ug';
  return size.lt(1) ? 'mg' : 'g';
}

/**
 * Sets plain digits in groups of three on both sides of the decimal sign (SI Brochure, 9th edition, 5.4.4),
 * with the minus sign proper. A text that is no plain decimal is returned as it is.
 */
export function groupDigits(plain: string, mark: DecimalMark = '.'): string {
  const match = /^([+-]?)(\d+)(?:\.(\d*))?$/.exec(plain);
  if (match === null) return plain;
  const [, sign = '', whole = '', fraction = ''] = match;
  const left = whole.replace(/\B(?=(\d{3})+$)/g, THIN_SPACE);
  const right = fraction === '' ? '' : mark + fraction.replace(/(\d{3})(?=\d)/g, `$1${THIN_SPACE}`);
  return (sign === '-' ? MINUS_SIGN : sign) + left + right;
}

/** A plain decimal with the sign it is shown with: zero has none, a plus only where `isSigned`. */
export function withSign(plain: string, isSigned: boolean): string {
  const bare = plain.replace(/^[+-]/, '');
  if (new Decimal(bare).isZero()) return bare;
  if (plain.startsWith('-')) return plain;
  return isSigned ? `+${bare}` : bare;
}

/**
 * A number of the wire as it is read, where nothing is known about its uncertainty.
 * @param text canonical decimal text
 */
export function formatDecimal(
  text: string,
  options: { decimalMark?: DecimalMark; isSigned?: boolean; decimals?: number } = {},
): string {
  const value = new Decimal(text);
  const plain = options.decimals === undefined ? value.toFixed() : value.toFixed(options.decimals);
  return groupDigits(withSign(plain, options.isSigned ?? false), options.decimalMark);
}

/**
 * Splits a plain decimal where its digits are no longer known: a digit is known while one unit of its place is
 * larger than the standard uncertainty. The sign stays with the known part.
 * @param standardUncertainty in the unit of the value; zero means that every digit is known
 */
export function splitAtUncertainty(
  plain: string,
  standardUncertainty: number,
  mark: DecimalMark = '.',
): DigitParts {
  const grouped = groupDigits(plain, mark);
  if (!(standardUncertainty > 0)) return { known: grouped, beyond: '' };
  const wholeDigits = plain.replace(/^[+-]/, '').split('.')[0]?.length ?? 0;
  const firstUnknownPlace = new Decimal(standardUncertainty).e;
  const knownDigits = Math.max(0, wholeDigits - firstUnknownPlace - 1);
  const cut = indexOfDigit(grouped, knownDigits);
  return { known: grouped.slice(0, cut), beyond: grouped.slice(cut) };
}

/** Where the digit after `count` digits stands in a grouped text; its end when there are no more. */
function indexOfDigit(grouped: string, count: number): number {
  let seen = 0;
  for (let index = 0; index < grouped.length; index += 1) {
    if (!/\d/.test(grouped.charAt(index))) continue;
    if (seen === count) return index;
    seen += 1;
  }
  return grouped.length;
}

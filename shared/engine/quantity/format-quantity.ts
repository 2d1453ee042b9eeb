import type { Decimal } from '#shared/decimal.ts';
import { requireChoice, requireDecimal, requireNumber } from './domain.ts';
import type { DecimalMark } from './read-number.ts';
import { roundResult, type Rounding } from './round-result.ts';
import { UNIT_DEFINITIONS, UNITS, type Unit } from './units.ts';

/** Between groups of three digits and before a unit (SI Brochure, 9th edition, 5.4.3 and 5.4.4). */
export const THIN_SPACE = '\u2009';

/** The minus sign of print; a hyphen is shorter than the plus sign above it. */
export const MINUS_SIGN = '\u2212';

/** A quantity in the pieces a screen sets: each piece ready to print, in this order. */
export interface QuantityParts {
  /** Empty, U+2212 or, where asked for, a plus sign. */
  sign: string;
  /** The value without its sign, grouped. */
  value: string;
  /** The expanded uncertainty, grouped, or null when there is none. */
  uncertainty: string | null;
  /** Symbol of the unit. */
  unit: string;
  /** Everything in one line: `(100.021 47 ± 0.000 79) g`. */
  text: string;
}

/** Groups the digits on both sides of the decimal sign in threes. */
function group(plain: string, mark: DecimalMark): string {
  const [whole = '', fraction] = plain.split('.');
  const groupedWhole = whole.replace(/\B(?=(\d{3})+$)/g, THIN_SPACE);
  if (fraction === undefined) return groupedWhole;
  return `${groupedWhole}${mark}${fraction.replace(/(\d{3})(?=\d)/g, `$1${THIN_SPACE}`)}`;
}

/** Whether a plain text is zero; to read it as a decimal again would cost as much as all else here. */
function isZero(plain: string): boolean {
  return !/[1-9]/.test(plain);
}

function signOf(plain: string, showPlus: boolean): string {
  if (plain.startsWith('-')) return MINUS_SIGN;
  return showPlus && !isZero(plain) ? '+' : '';
}

function lineOf(sign: string, value: string, uncertainty: string | null, unit: string): string {
  return uncertainty === null
    ? `${sign}${value}${THIN_SPACE}${unit}`
    : `(${sign}${value} ± ${uncertainty})${THIN_SPACE}${unit}`;
}

/**
 * The pieces of a quantity for the screen, by the one rounding rule where an uncertainty is given.
 *
 * @param a.value the value in `unit`
 * @param a.unit unit of the value and its uncertainty
 * @param a.expandedUncertainty in `unit`; left out or null when there is none
 * @param a.decimals decimals shown when there is no uncertainty; every digit held when left out
 * @param a.decimalMark point unless given
 * @param a.showPlus whether a positive value wears a plus sign, as a deviation does
 * @param a.rounding rounding of the uncertainty
 * @throws EngineError `not-finite`, `out-of-range` or `unknown-choice`, naming the argument
 */
export function formatQuantity(a: {
  value: Decimal;
  unit: Unit;
  expandedUncertainty?: number | null;
  decimals?: number;
  decimalMark?: DecimalMark;
  showPlus?: boolean;
  rounding?: Rounding;
}): QuantityParts {
  const value = requireDecimal(a.value, 'value');
  const unit = UNIT_DEFINITIONS[requireChoice(a.unit, 'unit', UNITS)].symbol;
  const mark = a.decimalMark ?? '.';
  const given = a.expandedUncertainty ?? null;
  const rounded =
    given === null ? null : roundResult({ value, expandedUncertainty: given, rounding: a.rounding });
  const plain = rounded?.value ?? unsignedZero(value, a.decimals);
  const sign = signOf(plain, a.showPlus ?? false);
  const digits = group(plain.replace('-', ''), mark);
  const uncertainty = rounded === null ? null : group(rounded.expandedUncertainty, mark);
  return { sign, value: digits, uncertainty, unit, text: lineOf(sign, digits, uncertainty, unit) };
}

/** Plain text with the decimals asked for; a value that rounds to zero has no sign. */
function unsignedZero(value: Decimal, decimals: number | undefined): string {
  const places =
    decimals === undefined ? undefined : requireNumber(decimals, 'decimals', { min: 0, max: 40 });
  const text = places === undefined ? value.toFixed() : value.toFixed(Math.floor(places));
  return isZero(text) ? text.replace('-', '') : text;
}

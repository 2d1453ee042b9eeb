import type { Decimal as DecimalBase } from 'decimal.js';
import { Decimal } from '#shared/decimal.ts';
import { requireChoice, requireDecimal, requireNumber } from './domain.ts';

/** How the uncertainty is rounded; the value always rounds half to even. */
export const ROUNDINGS = ['half-even', 'up'] as const;

/** Rounding of an uncertainty: to the nearest, half to even, or away from zero where a certificate asks for it. */
export type Rounding = (typeof ROUNDINGS)[number];

/** Significant digits of every uncertainty the product shows (JCGM 100:2008, 7.2.6: at most two). */
const SIGNIFICANT_DIGITS = 2;

/**
 * A double carries 15 to 17 digits, of which the last are noise of the arithmetic. Cutting to 14 first keeps
 * 0.12000000000000001 from being rounded up to 0.13.
 */
const DOUBLE_DIGITS = 14;

/** The exponent of the last significant digit shown: -4 for 0.00079, 2 for 1200. */
function lastPlace(uncertainty: Decimal): number {
  return uncertainty.e - (SIGNIFICANT_DIGITS - 1);
}

/** Rounds to a multiple of 10 to the power `place`. */
function toPlace(value: Decimal, place: number, mode: DecimalBase.Rounding): Decimal {
  if (place <= 0) return value.toDecimalPlaces(-place, mode);
  return value.toNearest(new Decimal(10).pow(place), mode);
}

/** Plain notation at the given place, without a sign on zero. */
function textAtPlace(value: Decimal, place: number): string {
  return (value.isZero() ? new Decimal(0) : value).toFixed(Math.max(0, -place));
}

/**
 * An uncertainty rounded to two significant digits, with the place of its last digit.
 *
 * @param uncertainty any unit, more than zero
 * @param rounding half to even, or up
 */
function roundUncertainty(uncertainty: number, rounding: Rounding): { rounded: Decimal; place: number } {
  const mode = rounding === 'up' ? Decimal.ROUND_UP : Decimal.ROUND_HALF_EVEN;
  const held = new Decimal(uncertainty).toSignificantDigits(DOUBLE_DIGITS);
  const rounded = toPlace(held, lastPlace(held), mode);
  // 0.0996 becomes 0.100: its two digits are then 0.10, one place further left.
  return { rounded, place: lastPlace(rounded) };
}

/**
 * The one rounding rule of the product, for the screen, the report and the export only: the uncertainty to two
 * significant digits, the value to the same place. Rounding a rounded result changes nothing. An uncertainty of
 * exactly zero (a value that is exact by definition) leaves the value as it is.
 *
 * Source: JCGM 100:2008, 7.2.6; EA-4/02 M:2022, 6.3 asks for rounding up where rounding to the nearest would take
 * more than 5 % off (clause from memory).
 *
 * @param a.value the value, half to even always
 * @param a.expandedUncertainty in the unit of the value, not negative
 * @param a.rounding rounding of the uncertainty, `half-even` unless given
 * @returns both as plain decimal text
 * @throws EngineError `not-finite`, `out-of-range` or `unknown-choice`, naming the argument
 */
export function roundResult(a: { value: Decimal; expandedUncertainty: number; rounding?: Rounding }): {
  value: string;
  expandedUncertainty: string;
} {
  const value = requireDecimal(a.value, 'value');
  const uncertainty = requireNumber(a.expandedUncertainty, 'expandedUncertainty', { min: 0 });
  const rounding = requireChoice(a.rounding ?? 'half-even', 'rounding', ROUNDINGS);
  if (uncertainty === 0) {
    return { value: textAtPlace(value, -value.decimalPlaces()), expandedUncertainty: '0' };
  }
  const { rounded, place } = roundUncertainty(uncertainty, rounding);
  return {
    value: textAtPlace(toPlace(value, place, Decimal.ROUND_HALF_EVEN), place),
    expandedUncertainty: textAtPlace(rounded, place),
  };
}

import { Decimal } from '#shared/decimal.ts';
import { THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';
import type { DecimalMark } from '#shared/engine/quantity/read-number.ts';
import { roundResult } from '#shared/engine/quantity/round-result.ts';
import { UNIT_DEFINITIONS, UNITS, type Unit } from '#shared/engine/quantity/units.ts';
import {
  convertText,
  deviationUnit,
  groupDigits,
  splitAtUncertainty,
  withSign,
  type DigitParts,
} from './format-decimal.ts';

/** How a person likes an uncertainty written: `1.217 ± 0.022 mg`, or `1.217(11) mg` (JCGM 100:2008, 7.2.2). */
export type UncertaintyStyle = 'plus-minus' | 'concise';

/** How numbers are written for this reader. */
export interface NumberStyle {
  decimalMark: DecimalMark;
  uncertainty: UncertaintyStyle;
}

/** A number with what is known about it, as it comes over the wire. */
export interface QuantityInput {
  /** Canonical decimal text, in `unit`. */
  value: string;
  /** Expanded uncertainty U in `unit`; it decides how many digits of the value are shown. */
  expandedUncertainty?: string | number | null;
  /** Coverage factor k of U; 2 when left out. */
  coverageFactor?: string | number | null;
  /** Unit code of `value` and U (`g` when left out), or any symbol; exponents as `m^3` or `m³`. */
  unit?: Unit | (string & {});
  /** Unit to show a mass in; `auto` takes g, mg or µg by size. */
  shownIn?: Unit | 'auto';
  /** `deviation` always shows its sign; `uncertainty` says that `value` is itself a U. */
  kind?: 'value' | 'deviation' | 'uncertainty';
  /** Decimals shown where no U decides. */
  decimals?: number;
  /** Mantissa and power of ten, for numbers far from one. */
  isScientific?: boolean;
}

/** A number ready to be drawn, character by character. */
export interface QuantityText {
  value: DigitParts;
  /** The U after the plus-minus sign; null where there is none or the concise form is wanted. */
  uncertainty: DigitParts | null;
  /** The bracketed digits of the concise form: the standard uncertainty in the value's last places. */
  bracket: string | null;
  /** Power of ten of the scientific form. */
  exponent: number | null;
  /** Symbol of the unit, exponents as raised digits. */
  unit: string;
}

interface Stated {
  value: Decimal;
  expanded: Decimal | null;
}

/** Works out every character of a number to be drawn; `Quantity` only sets them in ink. */
export function quantityText(input: QuantityInput, style: NumberStyle): QuantityText {
  const { stated, unit } = inShownUnit(input);
  const exponent = input.isScientific ? stated.value.e : null;
  const power = new Decimal(10).pow(exponent ?? 0);
  const scaled = { value: stated.value.div(power), expanded: stated.expanded?.div(power) ?? null };
  return { ...digits(scaled, input, style), exponent, unit: unitSymbol(unit) };
}

/** The whole number in one line of text, for labels, titles and drawings. */
export function quantityLine(text: QuantityText): string {
  const body = join(text.value) + (text.bracket === null ? '' : `(${text.bracket})`);
  const spread = text.uncertainty === null ? '' : ` ± ${join(text.uncertainty)}`;
  const power = text.exponent === null ? '' : ` × 10${raised(String(text.exponent))}`;
  const number = power !== '' && spread !== '' ? `(${body}${spread})${power}` : body + spread + power;
  return text.unit === '' ? number : number + THIN_SPACE + text.unit;
}

/** The printed symbol of a unit code, or of a symbol written with carets. */
export function unitSymbol(unit: string): string {
  if (isUnit(unit)) return UNIT_DEFINITIONS[unit].symbol;
  return unit.replace(/\^(-?\d+)/g, (_, power: string) => raised(power));
}

function join(parts: DigitParts): string {
  return parts.known + parts.beyond;
}

function isUnit(unit: string): unit is Unit {
  return (UNITS as readonly string[]).includes(unit);
}

function inShownUnit(input: QuantityInput): { stated: Stated; unit: string } {
  const unit = input.unit ?? 'g';
  const given = input.kind === 'uncertainty' ? input.value : (input.expandedUncertainty ?? null);
  const expanded = given === null ? null : new Decimal(given).toFixed();
  if (input.shownIn === undefined || !isUnit(unit)) {
    return {
      stated: { value: new Decimal(input.value), expanded: expanded === null ? null : new Decimal(expanded) },
      unit,
    };
  }
  const grams = (text: string): string => convertText(text, unit, 'g');
  const shownIn =
    input.shownIn === 'auto' ? deviationUnit(grams(input.value), expanded && grams(expanded)) : input.shownIn;
  const shown = (text: string): Decimal => new Decimal(convertText(text, unit, shownIn));
  return {
    stated: { value: shown(input.value), expanded: expanded === null ? null : shown(expanded) },
    unit: shownIn,
  };
}

function digits(
  { value, expanded }: Stated,
  input: QuantityInput,
  style: NumberStyle,
): Pick<QuantityText, 'value' | 'uncertainty' | 'bracket'> {
  const isSigned = input.kind === 'deviation';
  if (expanded === null || !expanded.gt(0)) {
    const plain = input.decimals === undefined ? value.toFixed() : value.toFixed(input.decimals);
    const known = groupDigits(withSign(plain, isSigned), style.decimalMark);
    return { value: { known, beyond: '' }, uncertainty: null, bracket: null };
  }
  const standard = expanded.div(input.coverageFactor ?? 2).toNumber();
  const isConcise = style.uncertainty === 'concise' && input.kind !== 'uncertainty';
  const shown = isConcise ? standard : expanded.toNumber();
  const printed = roundResult({ value, expandedUncertainty: shown });
  const split = (plain: string): DigitParts => splitAtUncertainty(plain, standard, style.decimalMark);
  const hasSpread = !isConcise && input.kind !== 'uncertainty';
  return {
    value: split(withSign(printed.value, isSigned)),
    uncertainty: hasSpread ? split(printed.expandedUncertainty) : null,
    bracket: isConcise ? bracketDigits(printed.expandedUncertainty) : null,
  };
}

/** Digits in brackets count in units of the last place shown; left of the decimal sign they stand for themselves. */
function bracketDigits(uncertainty: string): string {
  const decimals = uncertainty.split('.')[1]?.length ?? 0;
  return new Decimal(uncertainty).times(new Decimal(10).pow(decimals)).toFixed(0);
}

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';

function raised(power: string): string {
  return power.replace('-', '⁻').replace(/\d/g, (digit) => RAISED.charAt(Number(digit)));
}

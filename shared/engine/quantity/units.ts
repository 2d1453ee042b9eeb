import { Decimal } from '#shared/decimal.ts';
import { EngineError } from '../errors.ts';
import { requireChoice, requireDecimal, requireWhole } from './domain.ts';

/** Codes of the units the product keeps, as they are stored and sent. */
export const UNITS = ['kg', 'g', 'mg', 'ug', 'kg/m3', 'cm3', 'hPa', 'Pa', 'degC', '%'] as const;

/** Code of a unit. */
export type Unit = (typeof UNITS)[number];

/** What a unit measures; only units of one dimension convert into each other. */
export type Dimension = 'mass' | 'density' | 'volume' | 'pressure' | 'temperature' | 'ratio';

/** One unit: its dimension, its size as a power of ten of the dimension's base unit, and its symbol. */
export interface UnitDefinition {
  /** What it measures. */
  dimension: Dimension;
  /** Power of ten: one of this unit is 10 to this power of the base unit (g, kg/m3, cm3, Pa, degC, %). */
  exponent: number;
  /** Symbol as printed (SI Brochure, 9th edition, 5.2; micro as U+00B5). */
  symbol: string;
}

/** The units by code. Every factor is a power of ten, so a conversion is exact. */
export const UNIT_DEFINITIONS: Readonly<Record<Unit, UnitDefinition>> = {
  kg: { dimension: 'mass', exponent: 3, symbol: 'kg' },
  g: { dimension: 'mass', exponent: 0, symbol: 'g' },
  mg: { dimension: 'mass', exponent: -3, symbol: 'mg' },
  ug: { dimension: 'mass', exponent: -6, symbol: 'µg' },
  'kg/m3': { dimension: 'density', exponent: 0, symbol: 'kg/m³' },
  cm3: { dimension: 'volume', exponent: 0, symbol: 'cm³' },
  hPa: { dimension: 'pressure', exponent: 2, symbol: 'hPa' },
  Pa: { dimension: 'pressure', exponent: 0, symbol: 'Pa' },
  degC: { dimension: 'temperature', exponent: 0, symbol: '°C' },
  '%': { dimension: 'ratio', exponent: 0, symbol: '%' },
};

/**
 * How people write each unit. Upper and lower case count: Mg is a tonne and mg is not, so `MG` is nobody's
 * guess to make.
 */
const SPELLINGS: ReadonlyMap<string, Unit> = new Map<string, Unit>([
  ...UNITS.map((unit): [string, Unit] => [unit, unit]),
  ['µg', 'ug'], // U+00B5 micro sign
  ['μg', 'ug'], // U+03BC Greek small mu
  ['kg/m³', 'kg/m3'],
  ['kg/m^3', 'kg/m3'],
  ['kg·m⁻³', 'kg/m3'],
  ['kg m⁻³', 'kg/m3'],
  ['kg m-3', 'kg/m3'],
  ['cm³', 'cm3'],
  ['cm^3', 'cm3'],
  ['°C', 'degC'],
  ['℃', 'degC'],
]);

/**
 * The unit a piece of text names, or null when it names none; never throws.
 *
 * Source: SI Brochure, 9th edition, 5.2, for the symbols; other spellings are common practice, no source.
 *
 * @param text the unit as written, without spaces around it
 */
export function unitOfText(text: string): Unit | null {
  return SPELLINGS.get(text) ?? null;
}

/** How many places the decimal sign moves to the right from one unit to the other; checks both. */
function shiftBetween(from: Unit, to: Unit): number {
  const source = UNIT_DEFINITIONS[requireChoice(from, 'from', UNITS)];
  const target = UNIT_DEFINITIONS[requireChoice(to, 'to', UNITS)];
  if (source.dimension !== target.dimension) {
    throw new EngineError(
      'unit-mismatch',
      'to',
      to,
      `A unit of ${source.dimension} is expected, as ${from} is one; ${to} is one of ${target.dimension}.`,
    );
  }
  return source.exponent - target.exponent;
}

/**
 * Converts a value exactly; no digit is added or lost.
 *
 * @param value the value in the unit `from`
 * @param from unit of the value
 * @param to unit wanted, of the same dimension
 * @throws EngineError `not-finite`, `unknown-choice`, or `unit-mismatch` when the dimensions differ
 */
export function convertUnit(value: Decimal, from: Unit, to: Unit): Decimal {
  return requireDecimal(value, 'value').times(new Decimal(10).pow(shiftBetween(from, to)));
}

/**
 * How many decimals a value reported with `decimals` decimals has after a change of unit: 0.012 mg is 12 ug.
 * Zero is the least; the places before the decimal sign that were not reported are not shown by this number.
 *
 * @throws EngineError `not-whole`, `out-of-range`, `unknown-choice` or `unit-mismatch`
 */
export function convertDecimals(decimals: number, from: Unit, to: Unit): number {
  return Math.max(0, requireWhole(decimals, 'decimals', { min: 0 }) - shiftBetween(from, to));
}

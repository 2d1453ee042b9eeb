import { Decimal, decimalText } from '#shared/decimal.ts';
import { EngineError } from '#shared/engine/errors.ts';
import { parseQuantity } from '#shared/engine/quantity/parse-quantity.ts';
import type { DecimalMark } from '#shared/engine/quantity/read-number.ts';
import { convertUnit } from '#shared/engine/quantity/units.ts';
import type { Shape } from '#shared/contracts/standards.ts';
import { nominalUnit } from '#shared/numbers/nominal.ts';

/** What became of a nominal as typed: nothing there, grams as canonical text, or why it cannot be read. */
export type ReadNominal =
  { kind: 'empty' } | { kind: 'nominal'; grams: string } | { kind: 'unreadable'; why: string };

/**
 * Reads a nominal with its unit, as it stands on a weight: "1 kg", "500 mg". A bare number is not taken: 500 of
 * what is not ours to guess.
 */
export function readNominal(typed: string, decimalMark: DecimalMark): ReadNominal {
  if (typed.trim() === '') return { kind: 'empty' };
  try {
    const parsed = parseQuantity(typed, { field: 'nominal', units: ['kg', 'g', 'mg', 'ug'], decimalMark });
    if (parsed.uncertainty !== null || parsed.unit === null) return unreadable(EXPECTED, typed);
    if (!parsed.value.gt(0)) return unreadable('A nominal is above zero', typed);
    return { kind: 'nominal', grams: decimalText(convertUnit(parsed.value, parsed.unit, 'g')) };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    if (error.code === 'not-a-number' || error.code === 'unknown-unit') return unreadable(EXPECTED, typed);
    return { kind: 'unreadable', why: error.message.replace(/^[^:]*: r/, 'R') };
  }
}

const EXPECTED = 'Write a number and its unit, such as 1 kg or 500 mg';

function unreadable(what: string, typed: string): ReadNominal {
  return { kind: 'unreadable', why: `${what}; received "${typed.trim()}".` };
}

/**
 * What a form holds of an entry: grams once it can be read, else the text as typed. A bare number would pass for
 * grams there, so it is held with the question it leaves open.
 */
export function nominalEntry(typed: string, decimalMark: DecimalMark): string {
  const read = readNominal(typed, decimalMark);
  if (read.kind === 'nominal') return read.grams;
  const text = typed.trim();
  return isGrams(text) ? `${text} ?` : text;
}

/** Whether an entry holds a nominal in grams, and not something still being written. */
export function isGrams(entry: string): boolean {
  return /^\d+(\.\d+)?$/.test(entry) && Number(entry) > 0;
}

/** A nominal as it is engraved and typed, with a plain space: the first proposal for a marking. */
export function nominalMarking(grams: string): string {
  const unit = nominalUnit(grams);
  return `${decimalText(convertUnit(new Decimal(grams), 'g', unit))} ${unit}`;
}

/** Knobs from 1 g up, wires or sheets below (common practice after OIML R 111-1:2004, 6). */
export function usualShape(grams: string, below1g: Extract<Shape, 'wire' | 'sheet'> = 'wire'): Shape {
  return new Decimal(grams).gte(1) ? 'knob' : below1g;
}

/** From here on a weight is lifted with care, and the forms say so. Common practice, no source. */
export function isHeavy(grams: string): boolean {
  return new Decimal(grams).gte(10_000);
}

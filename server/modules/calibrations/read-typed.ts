import { decimalText, Decimal } from '#shared/decimal.ts';
import type { OpenPoint } from '#shared/contracts/drafts.ts';
import { CoverageFactor, CoverageProbability, type MassUnit } from '#shared/contracts/common.ts';
import { EngineError } from '#shared/engine/errors.ts';
import { parseQuantity } from '#shared/engine/quantity/parse-quantity.ts';
import { readNumber } from '#shared/engine/quantity/read-number.ts';

/** What a field was read as, or the point that keeps it from being read. */
export type Reading<T> = { value: T } | { point: OpenPoint };

export interface TypedMass {
  value: Decimal;
  unit: MassUnit;
  /** As typed, trailing zeros included. */
  decimals: number;
}

const MASS_UNITS = ['kg', 'g', 'mg', 'ug'] as const;

/** Reads a mass as people type it; a unit written beside the number wins over the one chosen. */
export function readMass(
  text: string,
  unit: MassUnit,
  field: string,
  ask: string,
  clause: string | null = null,
): Reading<TypedMass> {
  const expected = `a number in ${unit}, such as 0.012`;
  if (text.trim() === '') {
    return { point: { field, message: ask, received: null, expected, clause, kind: 'missing' } };
  }
  const quantity = reading(field, text, expected, () =>
    parseQuantity(text, { field, units: MASS_UNITS, defaultUnit: unit }),
  );
  if ('point' in quantity) return quantity;
  const { value, decimals, uncertainty } = quantity.value;
  if (uncertainty === null) return { value: { value, unit: quantity.value.unit as MassUnit, decimals } };
  const message = 'Write the uncertainty in its own field.';
  return { point: { field, message, received: text, expected, clause: null, kind: 'wrong' } };
}

/** A coverage factor, or a sensitivity (which may be negative and has no other limits here). */
export function readFactor(
  text: string,
  field: string,
  what: 'coverage factor' | 'sensitivity' = 'coverage factor',
): Reading<string> {
  const expected =
    what === 'coverage factor' ? 'k as printed, from 1 to 20, usually 2' : 'a number such as 1 or 0.5';
  if (text.trim() === '') {
    const message = 'An expanded uncertainty needs its coverage factor.';
    return {
      point: { field, message, received: null, expected, clause: 'JCGM 100:2008, 7.2.3', kind: 'missing' },
    };
  }
  const number = reading(field, text, expected, () => plainNumber(text, field));
  if ('point' in number || what === 'sensitivity') return number;
  if (CoverageFactor.safeParse(number.value).success) return number;
  const message = 'This is no coverage factor.';
  return { point: { field, message, received: text, expected, clause: null, kind: 'wrong' } };
}

/** A coverage probability as a fraction or in per cent; empty where the certificate states none. */
export function readCoverage(text: string, field: string): Reading<string | null> {
  if (text.trim() === '') return { value: null };
  const expected = 'a probability such as 0.9545 or 95.45 %';
  const percent = /^(.*)%\s*$/s.exec(text.trim());
  const number = reading(field, text, expected, () => plainNumber(percent?.[1] ?? text, field));
  if ('point' in number) return number;
  const value = percent ? decimalText(new Decimal(number.value).div(100)) : number.value;
  if (CoverageProbability.safeParse(value).success) return { value };
  const message = 'This is no coverage probability.';
  return { point: { field, message, received: text, expected, clause: null, kind: 'wrong' } };
}

function plainNumber(text: string, field: string): string {
  const plain = text.replace(/[\u00a0\u2000-\u200a\u202f\u205f]/g, ' ').trim();
  const isNegative = /^[-\u2212]/.test(plain);
  const { value } = readNumber(plain.replace(/^[-+\u2212] ?/, ''), field, text, null);
  return decimalText(isNegative ? value.negated() : value);
}

/** An engine's refusal as a point, which has places of its own for the field and for what was received. */
function reading<T>(field: string, received: string, expected: string, read: () => T): Reading<T> {
  try {
    return { value: read() };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    // The engine's own example is a mass with its uncertainty; what is expected here fits the field.
    const message = error.code === 'not-a-number' ? 'This cannot be read as a number.' : error.expected;
    return { point: { field, message, received, expected, clause: null, kind: 'wrong' } };
  }
}

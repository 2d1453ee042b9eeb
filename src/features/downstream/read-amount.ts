import { decimalText } from '#shared/decimal.ts';
import { EngineError } from '#shared/engine/errors.ts';
import { parseQuantity } from '#shared/engine/quantity/parse-quantity.ts';
import type { DecimalMark } from '#shared/engine/quantity/read-number.ts';
import { convertUnit, type Unit } from '#shared/engine/quantity/units.ts';

/** A mass as it was typed: canonical text in grams, or why it cannot be taken. */
export type ReadAmount =
  | { kind: 'empty' }
  | { kind: 'amount'; grams: string; shown: { value: string; unit: Unit } }
  | { kind: 'unreadable'; why: string };

const UNITS: readonly Unit[] = ['ug', 'mg', 'g', 'kg'];

/**
 * Reads a mass with its unit, such as "20 µg" or "-0.02 mg"; a unit is never guessed.
 * @param preferred the reader's decimal sign; the other one is taken where it leaves no doubt
 */
export function readAmount(typed: string, preferred: DecimalMark): ReadAmount {
  if (typed.trim() === '') return { kind: 'empty' };
  const hasOnlyOther = typed.includes(preferred === '.' ? ',' : '.') && !typed.includes(preferred);
  try {
    const read = parseQuantity(typed, {
      field: 'amount',
      units: UNITS,
      decimalMark: hasOnlyOther ? undefined : preferred,
    });
    if (read.uncertainty !== null)
      return {
        kind: 'unreadable',
        why: `One amount belongs here, without an uncertainty; received "${typed.trim()}".`,
      };
    if (read.unit === null)
      return {
        kind: 'unreadable',
        why: `Write the unit after the number: µg, mg, g or kg; received "${typed.trim()}".`,
      };
    if (read.value.isZero()) return { kind: 'unreadable', why: 'Write an amount other than zero.' };
    return {
      kind: 'amount',
      grams: decimalText(convertUnit(read.value, read.unit, 'g')),
      shown: { value: read.value.toFixed(read.decimals), unit: read.unit },
    };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    return { kind: 'unreadable', why: whyUnread(typed.trim(), error) };
  }
}

/** No uncertainty belongs beside an amount, and an exponent is no unit: the advice says neither. */
function whyUnread(typed: string, error: EngineError): string {
  const isExponent = /\d[eE][-+\u2212]?\d/.test(typed);
  if (isExponent) return `Write the number without an exponent, such as 20 µg; received "${typed}".`;
  if (error.code === 'not-a-number')
    return `Write a number and its unit, such as 20 µg; received "${typed}".`;
  return error.message.replace(/^[^:]*: r/, 'R');
}

/** An amount for the address: its number and the code of its unit, whoever reads it. */
export function amountText({ value, unit }: { value: string; unit: Unit }): string {
  return `${value} ${unit}`;
}

/** Why an amount cannot be supposed; undefined where it can. */
export function amountProblem(read: ReadAmount, suppose: 'shift' | 'raise'): string | undefined {
  if (read.kind === 'unreadable') return read.why;
  if (read.kind === 'empty') return 'Write an amount with its unit, such as 20 µg.';
  if (suppose === 'raise' && read.grams.startsWith('-'))
    return 'An uncertainty can only be added: write an amount above zero.';
  return undefined;
}

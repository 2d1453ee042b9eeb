import { Decimal } from '#shared/decimal.ts';
import { EngineError, type EngineErrorCode } from '../errors.ts';

/** The sign between the whole number and its decimals. */
export type DecimalMark = '.' | ',';

/** A number as somebody wrote it: its exact value and how many decimals were written. */
export interface WrittenNumber {
  /** The exact value. */
  value: Decimal;
  /** Decimals as written, trailing zeros included. */
  decimals: number;
}

/** Digits the product keeps exactly; also the limit of a decimal column and of a decimal on the wire. */
const MAXIMUM_DIGITS = 40;

/** Digits grouped by single spaces in threes, or not grouped at all. */
const WHOLE = /^(\d+|\d{1,3}( \d{3})+)$/;
const FRACTION = /^(\d+|(\d{3} )+\d{1,3})$/;

/** One to three digits, a comma, exactly three digits: a decimal comma or the thousands of another country. */
const THOUSANDS_OR_DECIMAL = /^[1-9]\d{0,2},\d{3}$/;

function refuse(code: EngineErrorCode, field: string, received: string, why: string): never {
  throw new EngineError(code, field, `"${received}"`, why);
}

/**
 * The decimal mark that a piece of text uses without doubt, or null when it does not show one.
 *
 * @param text one number, without sign
 */
export function evidentDecimalMark(text: string): DecimalMark | null {
  if (text.includes('.')) return '.';
  if (text.includes(',') && !THOUSANDS_OR_DECIMAL.test(text)) return ',';
  return null;
}

function checkMarks(text: string, field: string, received: string, mark: DecimalMark | null): void {
  const points = text.split('.').length - 1;
  const commas = text.split(',').length - 1;
  if (points > 0 && commas > 0) {
    const why =
      'A comma and a point stand in one number. Write one decimal sign, and group digits with spaces.';
    refuse('mixed-separators', field, received, why);
  }
  if (points + commas > 1) {
    const why = 'There is more than one decimal sign. Group digits with spaces, not with commas or points.';
    refuse('repeated-separator', field, received, why);
  }
  if (commas === 1 && mark === '.') {
    refuse(
      'mixed-separators',
      field,
      received,
      'The decimal sign is a point here. Write a point, not a comma.',
    );
  }
  if (points === 1 && mark === ',') {
    refuse(
      'mixed-separators',
      field,
      received,
      'The decimal sign is a comma here. Write a comma, not a point.',
    );
  }
  if (mark === null && THOUSANDS_OR_DECIMAL.test(text)) {
    const [whole, rest] = text.split(',');
    const why = `It can be read in two ways. Write ${whole}.${rest} for the decimal or ${whole} ${rest} for the thousands.`;
    refuse('ambiguous-comma', field, received, why);
  }
}

/**
 * Reads one number without a sign, exactly as written.
 *
 * @param text digits, single spaces between groups of three, at most one decimal sign
 * @param field path of the argument, for messages
 * @param received the whole text somebody typed, for messages
 * @param mark the decimal mark in force, or null when the text itself is to show it
 * @throws EngineError `not-a-number`, `mixed-separators`, `repeated-separator`, `ambiguous-comma`,
 *   `irregular-grouping` or `too-many-digits`
 */
export function readNumber(
  text: string,
  field: string,
  received: string,
  mark: DecimalMark | null,
): WrittenNumber {
  if (!/^[\d., ]*\d$/.test(text)) {
    refuse('not-a-number', field, received, 'Write a plain decimal number such as 0.000 212 or 0,000 212.');
  }
  checkMarks(text, field, received, mark);
  const [whole = '', fraction] = text.split(/[.,]/);
  if ((whole !== '' && !WHOLE.test(whole)) || (fraction !== undefined && !FRACTION.test(fraction))) {
    const why = 'The spaces do not stand between groups of three digits: a digit may be missing.';
    refuse('irregular-grouping', field, received, why);
  }
  const digits = `${whole === '' ? '0' : whole}.${fraction ?? ''}`.replaceAll(' ', '').replace(/\.$/, '');
  if (digits.replace('.', '').length > MAXIMUM_DIGITS) {
    refuse('too-many-digits', field, received, `At most ${MAXIMUM_DIGITS} digits are kept.`);
  }
  return { value: new Decimal(digits), decimals: fraction?.replaceAll(' ', '').length ?? 0 };
}

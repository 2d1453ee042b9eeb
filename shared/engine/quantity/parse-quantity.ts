import { Decimal } from '#shared/decimal.ts';
import { EngineError, type EngineErrorCode } from '../errors.ts';
import { evidentDecimalMark, readNumber, type DecimalMark, type WrittenNumber } from './read-number.ts';
import { UNIT_DEFINITIONS, UNITS, unitOfText, type Unit } from './units.ts';

/** An uncertainty as it was written beside a value. */
export interface ParsedUncertainty extends WrittenNumber {
  /** Unit of the uncertainty, which may differ from the value's; null when none was written. */
  unit: Unit | null;
  /**
   * How it was written. By JCGM 100:2008, 7.2.2 digits in brackets are a standard uncertainty, and by 7.2.4 a
   * number after the plus-minus sign is an expanded one.
   */
  form: 'brackets' | 'plus-minus';
}

/** A quantity exactly as somebody wrote it. */
export interface ParsedQuantity extends WrittenNumber {
  /** Unit written, the default unit when none was, or null. */
  unit: Unit | null;
  /** The uncertainty, when one was written. */
  uncertainty: ParsedUncertainty | null;
}

/** How a field is to be read. */
export interface ParseOptions {
  /** Path of the field, named in every message. */
  field: string;
  /** Units the field takes; every unit when left out. */
  units?: readonly Unit[];
  /** Unit assumed when none is written. */
  defaultUnit?: Unit;
  /** Settles texts such as 1,234 that read in two ways. */
  decimalMark?: DecimalMark;
}

const LONGEST_TEXT = 160;

/** Every kind of space people and programs put between digits: no-break, figure, thin, hair, narrow, tab, ... */
const SPACES = /\s/g;
const MINUS_SIGNS = /^[-\u2212]/;
const PLUS_MINUS = /\u00b1|\+\/-|\+\/\u2212/;

/** Number without a sign, then its uncertainty in brackets, then whatever is left as unit. */
const NUMBER_AND_UNIT = /^([\d.,][\d., ]*?)(?: ?\(([^()]*)\))?(?: ?([^\d.,\s()].*))?$/;

function refuse(code: EngineErrorCode, options: ParseOptions, received: string, why: string): never {
  throw new EngineError(code, options.field, `"${received}"`, why);
}

/** The pieces of one side of a plus-minus sign, still as text. */
interface Side {
  negative: boolean;
  number: string;
  brackets: string | undefined;
  unit: Unit | null;
}

function readUnit(text: string | undefined, options: ParseOptions, received: string): Unit | null {
  if (text === undefined) return null;
  const known = options.units ?? UNITS;
  const unit = unitOfText(text);
  if (unit === null || !known.includes(unit)) {
    const list = known.map((one) => UNIT_DEFINITIONS[one].symbol).join(', ');
    refuse('unknown-unit', options, received, `"${text}" is no unit this field takes. It takes ${list}.`);
  }
  return unit;
}

function readSide(text: string, options: ParseOptions, received: string): Side {
  const negative = MINUS_SIGNS.test(text);
  const unsigned = text.replace(/^[-+\u2212] ?/, '');
  const match = NUMBER_AND_UNIT.exec(unsigned);
  if (match === null) {
    const why = 'Write a number, its uncertainty if there is one, and its unit: 100.021 47(35) g.';
    refuse('not-a-number', options, received, why);
  }
  const [, number = '', brackets, unit] = match;
  return { negative, number, brackets, unit: readUnit(unit, options, received) };
}

function signed(side: Side, written: WrittenNumber): WrittenNumber {
  return { value: side.negative ? written.value.negated() : written.value, decimals: written.decimals };
}

/** Digits in brackets count in the last place of the value; a number with a decimal sign stands for itself. */
function readBrackets(
  text: string,
  value: WrittenNumber,
  options: ParseOptions,
  received: string,
  mark: DecimalMark | null,
): WrittenNumber {
  const inner = text.trim();
  if (/^\d{1,4}$/.test(inner)) {
    const scale = new Decimal(10).pow(-value.decimals);
    return { value: new Decimal(inner).times(scale), decimals: value.decimals };
  }
  if (!/[.,]/.test(inner)) {
    const why = 'Put one to four digits in brackets, in the last places of the value: 100.021 47(35) g.';
    refuse('unreadable-brackets', options, received, why);
  }
  return readNumber(inner, options.field, received, mark);
}

/** Whole text in brackets before a unit, `(100.021 47 ± 0.000 79) g`, with the brackets taken off. */
function unwrap(text: string): { body: string; outerUnit: string | undefined } {
  const match = /^\(([^()]*)\)(?: ?(\S.*))?$/.exec(text);
  return match === null
    ? { body: text, outerUnit: undefined }
    : { body: (match[1] ?? '').trim(), outerUnit: match[2] };
}

/**
 * Settles the units of both sides. One unit after the pair belongs to both; a unit after the value alone leaves
 * the uncertainty without one, which is refused rather than guessed.
 */
function settleUnits(
  value: Side,
  uncertainty: Side,
  outer: Unit | null,
  options: ParseOptions,
  received: string,
): { value: Unit | null; uncertainty: Unit | null } {
  if (outer !== null) {
    if (value.unit !== null || uncertainty.unit !== null) {
      refuse(
        'repeated-unit',
        options,
        received,
        'A unit stands inside and outside the brackets. Write it once.',
      );
    }
    return { value: outer, uncertainty: outer };
  }
  if (value.unit !== null && uncertainty.unit === null) {
    refuse('missing-unit', options, received, 'The uncertainty has no unit. Write one after it as well.');
  }
  const own = value.unit ?? uncertainty.unit ?? options.defaultUnit ?? null;
  const other = uncertainty.unit ?? own;
  if (own !== null && other !== null && !sameDimension(own, other)) {
    refuse(
      'unit-mismatch',
      options,
      received,
      `The uncertainty in ${other} does not go with a value in ${own}.`,
    );
  }
  return { value: own, uncertainty: other };
}

function sameDimension(a: Unit, b: Unit): boolean {
  return UNIT_DEFINITIONS[a].dimension === UNIT_DEFINITIONS[b].dimension;
}

/** The decimal mark in force for the whole text: the declared one, else the one its numbers show. */
function settleMark(numbers: string[], options: ParseOptions, received: string): DecimalMark | null {
  if (options.decimalMark !== undefined) return options.decimalMark;
  const [mark = null, another] = new Set(numbers.map(evidentDecimalMark).filter((shown) => shown !== null));
  if (another !== undefined) {
    refuse(
      'mixed-separators',
      options,
      received,
      'One number has a comma and the other a point. Use one sign.',
    );
  }
  return mark;
}

function parsePair(
  parts: string[],
  outer: Unit | null,
  options: ParseOptions,
  received: string,
): ParsedQuantity {
  const [left = '', right = ''] = parts.map((part) => part.trim());
  if (parts.length > 2 || MINUS_SIGNS.test(right) || right.startsWith('+')) {
    refuse('unreadable-uncertainty', options, received, 'Write one uncertainty without a sign after the ±.');
  }
  const value = readSide(left, options, received);
  const uncertainty = readSide(right, options, received);
  if (value.brackets !== undefined || uncertainty.brackets !== undefined) {
    refuse(
      'repeated-uncertainty',
      options,
      received,
      'There are brackets as well as ±. Write one uncertainty.',
    );
  }
  const units = settleUnits(value, uncertainty, outer, options, received);
  const mark = settleMark([value.number, uncertainty.number], options, received);
  return {
    ...signed(value, readNumber(value.number, options.field, received, mark)),
    unit: units.value,
    uncertainty: {
      ...readNumber(uncertainty.number, options.field, received, mark),
      unit: units.uncertainty,
      form: 'plus-minus',
    },
  };
}

function parseSingle(
  body: string,
  outer: Unit | null,
  options: ParseOptions,
  received: string,
): ParsedQuantity {
  const side = readSide(body, options, received);
  if (outer !== null && side.unit !== null) {
    refuse(
      'repeated-unit',
      options,
      received,
      'A unit stands inside and outside the brackets. Write it once.',
    );
  }
  const unit = side.unit ?? outer ?? options.defaultUnit ?? null;
  const mark = settleMark([side.number, side.brackets?.trim() ?? ''], options, received);
  const value = readNumber(side.number, options.field, received, mark);
  if (side.brackets === undefined) return { ...signed(side, value), unit, uncertainty: null };
  const uncertainty = readBrackets(side.brackets, value, options, received, mark);
  return { ...signed(side, value), unit, uncertainty: { ...uncertainty, unit, form: 'brackets' } };
}

/**
 * Reads a quantity as people type it, and keeps the digits as reported. Takes a decimal point or comma, spaces of
 * any width between groups of three digits, a hyphen or the minus sign U+2212, an uncertainty in brackets
 * (`1 000.000 012 3(15) g`) or after ±, and micro as U+00B5, U+03BC or u. Nothing ambiguous is guessed.
 *
 * Forms: JCGM 100:2008, 7.2.2 and 7.2.4; SI Brochure, 9th edition, 5.4.
 *
 * @param text what was typed
 * @param options the field, the units it takes, and what is assumed when nothing is written
 * @throws EngineError naming the field and what was received: `empty`, `too-long`, `not-a-number`,
 *   `mixed-separators`, `repeated-separator`, `ambiguous-comma`, `irregular-grouping`, `too-many-digits`,
 *   `unknown-unit`, `missing-unit`, `repeated-unit`, `unit-mismatch`, `unreadable-brackets`,
 *   `unreadable-uncertainty` or `repeated-uncertainty`
 */
export function parseQuantity(text: string, options: ParseOptions): ParsedQuantity {
  const received = text.length > LONGEST_TEXT ? `${text.slice(0, LONGEST_TEXT)}...` : text;
  if (text.length > LONGEST_TEXT) {
    refuse('too-long', options, received, `A quantity has at most ${LONGEST_TEXT} characters.`);
  }
  const plain = text.replace(SPACES, ' ').trim();
  if (plain === '') refuse('empty', options, received, 'Write a number.');
  const { body, outerUnit } = unwrap(plain);
  const outer = readUnit(outerUnit, options, received);
  const parts = body.split(PLUS_MINUS);
  return parts.length > 1
    ? parsePair(parts, outer, options, received)
    : parseSingle(body, outer, options, received);
}

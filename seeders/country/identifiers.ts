import { instantOf } from './days.ts';
import { mixed, PURPOSE } from './draws.ts';

/** Kinds of rows that have an identifier. */
const KINDS = [
  'laboratory',
  'account',
  'membership',
  'recognition',
  'scope line',
  'authorisation',
  'scale version',
  'policy version',
  'standard',
  'set',
  'epoch',
  'fact',
  'programme',
  'source',
  'property',
  'calibration',
  'revision',
  'value',
] as const;
export type IdentifierKind = (typeof KINDS)[number];

const KIND_NUMBERS = new Map(KINDS.map((kind, at) => [kind, at]));
const times = new Map<number, string>();

/**
 * The UUID version 7 of a row: the day it was recorded, its kind and number, and mixed bits. The same row has the
 * same identifier in every register of one seed.
 */
export function identifier(seed: number, kind: IdentifierKind, index: number, day: number): string {
  const kindNumber = KIND_NUMBERS.get(kind)!;
  const bits = mixed(seed, PURPOSE.identifier + kindNumber * 64, index);
  const number = index.toString(16).padStart(8, '0');
  const kindText = kindNumber.toString(16).padStart(3, '0');
  return `${timeText(day)}-7${kindText}-8${number.slice(0, 3)}-${number.slice(3)}${hex(bits)}`.slice(0, 36);
}

function timeText(day: number): string {
  const known = times.get(day);
  if (known !== undefined) return known;
  const digits = instantOf(day).toString(16).padStart(12, '0');
  const text = `${digits.slice(0, 8)}-${digits.slice(8)}`;
  times.set(day, text);
  return text;
}

/** Seven digits of mixed bits. */
function hex(bits: number): string {
  return (bits >>> 4).toString(16).padStart(7, '0');
}

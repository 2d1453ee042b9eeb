import { EngineError } from '#shared/engine/errors.ts';
import { parseQuantity } from '#shared/engine/quantity/parse-quantity.ts';
import type { DecimalMark } from '#shared/engine/quantity/read-number.ts';

/** What became of an entry: nothing there, a plain decimal with its zeros as typed, or why it cannot be read. */
export type ReadDecimal =
  { kind: 'empty' } | { kind: 'number'; value: string } | { kind: 'unreadable'; why: string };

/**
 * Reads one number as people type it. A point or a comma is taken as the decimal sign where the entry leaves no
 * doubt; where it does, the reader's own sign decides.
 */
export function readDecimal(typed: string, preferred: DecimalMark): ReadDecimal {
  if (typed.trim() === '') return { kind: 'empty' };
  try {
    const parsed = parseNumber(typed, preferred);
    if (parsed.unit !== null || parsed.uncertainty !== null) {
      return { kind: 'unreadable', why: notBare(typed) };
    }
    return { kind: 'number', value: parsed.value.toFixed(parsed.decimals) };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    return { kind: 'unreadable', why: whyUnread(typed, error) };
  }
}

/** A field for a bare number has no units to offer, and no place for an uncertainty: its advice says neither. */
const NOT_BARE = ['not-a-number', 'unknown-unit', 'unreadable-brackets', 'unreadable-uncertainty'];

function whyUnread(typed: string, error: EngineError): string {
  return NOT_BARE.includes(error.code) ? notBare(typed) : error.message.replace(/^[^:]*: r/, 'R');
}

function notBare(typed: string): string {
  return `Write a plain decimal number, such as 10 or 0.5; received "${typed.trim()}".`;
}

function parseNumber(typed: string, preferred: DecimalMark): ReturnType<typeof parseQuantity> {
  const other = preferred === '.' ? ',' : '.';
  const hasOnlyOther = typed.includes(other) && !typed.includes(preferred);
  // With a comma where a point is usual the text itself has to be free of doubt: 1,234 is refused, 0,234 is not.
  return parseQuantity(typed, { field: 'entry', decimalMark: hasOnlyOther ? undefined : preferred });
}

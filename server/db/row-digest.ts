import { createHash } from 'node:crypto';
import { canonicalJson } from '#shared/canonical-json.ts';
import { Decimal } from '#shared/decimal.ts';

/** What the digest needs to know of a column to give one spelling to what was written and what is read back. */
export interface ColumnShape {
  name: string;
  /** SQL type in lower case: `decimal`, `double`, `bigint`, `char`, `date`, `datetime`, `json`, ... */
  type: string;
  /** Decimal places of a DECIMAL column. */
  scale: number | null;
}

const NUMBERS = new Set(['double', 'float', 'bigint', 'int', 'integer', 'smallint', 'tinyint', 'boolean']);

/**
 * SHA-256 of one row in canonical form, equal before the row is written and after it is read. Empty columns
 * are left out, and so is a numeric `id`, which the database gives: the row's `uid` stands for it.
 */
export function rowSha256(columns: readonly ColumnShape[], row: Record<string, unknown>): string {
  const members: Record<string, unknown> = {};
  for (const column of columns) {
    const value = row[column.name];
    const isGivenNumber = column.name === 'id' && column.type === 'bigint';
    if (value !== null && value !== undefined && !isGivenNumber)
      members[column.name] = spelling(column, value);
  }
  return createHash('sha256').update(canonicalJson(members), 'utf8').digest('hex');
}

/** SHA-256 over the rows of one table in one act; the order in which they were written does not matter. */
export function rowsSha256(rowHashes: readonly string[]): string {
  return createHash('sha256')
    .update([...rowHashes].sort().join('\n'), 'utf8')
    .digest('hex');
}

function spelling(column: ColumnShape, value: unknown): unknown {
  if (column.type === 'decimal') {
    // The column rounds as MariaDB does: half away from zero.
    return new Decimal(String(value)).toDecimalPlaces(column.scale ?? 0, Decimal.ROUND_HALF_UP).toFixed();
  }
  if (NUMBERS.has(column.type)) return Number(value);
  if (column.type === 'date') return value instanceof Date ? value.toISOString().slice(0, 10) : String(value);
  if (value instanceof Date || typeof value === 'object') return value;
  return String(value);
}

import type { Country } from './country.ts';

/** Rows of one table, worked out one after the other: a million rows are never held. */
export interface CountryTable {
  table: string;
  columns: readonly string[];
  rows(country: Country): Iterable<string>;
}

/** What the database reads as NULL. */
export const NULL = '\\N';

/** One row as the database's bulk load reads it. No text of the country holds a tab or a line break. */
export function line(...parts: (string | number)[]): string {
  return `${parts.join('\t')}\n`;
}

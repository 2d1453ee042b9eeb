import type { Sequelize } from 'sequelize';
import { readRow } from './read.ts';

/** Beyond this a list says "more than": nobody reads so far, and counting a million takes its time. */
const COUNTED = 10_000;
/** Seconds that counting may take before a list does without. */
const PATIENCE = 1;
/** MariaDB's number for a statement that outlived `max_statement_time`. */
const STATEMENT_TIMEOUT = 1969;

export interface BoundedCount {
  count: number;
  /** False where there are more, or where counting was given up. */
  isCountExact: boolean;
}

/**
 * Counts what a list would show, up to 10 000 and for a second at most: a filter that must look at every
 * standard of a country may not keep the page waiting.
 * @param from table and conditions, `FROM ... WHERE ...`
 * @param atLeast rows already seen: the count where counting was given up
 */
export async function boundedCount(
  database: Sequelize,
  from: string,
  replacements: Parameters<typeof readRow>[2],
  atLeast: number,
): Promise<BoundedCount> {
  try {
    const counted = await readRow<{ count: number }>(
      database,
      `SET STATEMENT max_statement_time = ${PATIENCE} FOR
       SELECT COUNT(*) AS count FROM (SELECT 1 ${from} LIMIT ${COUNTED + 1}) counted`,
      replacements,
    );
    const count = counted?.count ?? 0;
    return { count: Math.min(count, COUNTED), isCountExact: count <= COUNTED };
  } catch (error) {
    if ((error as { parent?: { errno?: number } }).parent?.errno !== STATEMENT_TIMEOUT) throw error;
    return { count: atLeast, isCountExact: false };
  }
}

import { QueryTypes, type Sequelize } from 'sequelize';

type Scalar = string | number | boolean | Date | null;

/**
 * Runs a SELECT and gives plain rows: DECIMAL as exact text, BIGINT as a safe number, DATE as text.
 * Named replacements only (`:name`); a list replaces into `IN (:ids)`.
 */
export async function readRows<Row extends object>(
  database: Sequelize,
  sql: string,
  replacements: Record<string, Scalar | readonly Scalar[]> = {},
): Promise<Row[]> {
  return database.query<Row>(sql, {
    type: QueryTypes.SELECT,
    replacements: replacements as Record<string, unknown>,
  });
}

/** The first row, or null. */
export async function readRow<Row extends object>(
  database: Sequelize,
  sql: string,
  replacements: Record<string, Scalar | readonly Scalar[]> = {},
): Promise<Row | null> {
  const rows = await readRows<Row>(database, sql, replacements);
  return rows[0] ?? null;
}

import { QueryTypes, type Sequelize } from 'sequelize';
import { openDatabase } from '#server/db/sequelize.ts';

/** The register as a journey reads it: plain SQL as the application, past everything the product computes. */
export class Register {
  readonly #database: Sequelize;

  constructor() {
    const url = process.env.DATABASE_URL;
    if (!url) throw new Error('DATABASE_URL is not set: run "npm test -- journeys".');
    this.#database = openDatabase(url, 2);
  }

  async rows<Row extends object>(
    sql: string,
    replacements: Record<string, string | number | (string | number)[]> = {},
  ): Promise<Row[]> {
    return this.#database.query<Row>(sql, { type: QueryTypes.SELECT, replacements });
  }

  /** The one row. */
  async row<Row extends object>(
    sql: string,
    replacements: Record<string, string | number | (string | number)[]> = {},
  ): Promise<Row> {
    const [first] = await this.rows<Row>(sql, replacements);
    if (!first) throw new Error(`The register holds nothing for: ${sql}`);
    return first;
  }

  async close(): Promise<void> {
    await this.#database.close();
  }
}

/** A registry number that no weight has, of the given letters. */
export async function freeRegistryNo(register: Register, letters: string): Promise<string> {
  const { last } = await register.row<{ last: number | null }>(
    `SELECT MAX(CAST(SUBSTRING(registry_no, :from, 4) AS UNSIGNED)) AS last
     FROM standard WHERE registry_no LIKE :pattern`,
    { from: letters.length + 2, pattern: `${letters} %` },
  );
  return `${letters} ${String((last ?? 0) + 1).padStart(4, '0')}`;
}

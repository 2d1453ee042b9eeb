import { createWriteStream } from 'node:fs';
import { chmod, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import mariadb from 'mariadb';
import type { Country } from './country.ts';
import type { CountryTable } from './table.ts';

/** Characters written at a time. */
const CHUNK = 1 << 18;

/**
 * Loads tables into an empty register: each is written to a file row by row, and the database reads the file in one
 * statement, which for an empty table it does many times faster than by inserts. Keys are checked by nobody meanwhile:
 * what is loaded has to be right.
 * @param url an account that owns the tables and may let the database read files (FILE), on this machine
 */
export async function bulkLoad(
  url: string,
  country: Country,
  tables: readonly CountryTable[],
  say: (line: string) => void,
): Promise<void> {
  const { hostname, port, username, password, pathname } = new URL(url);
  const connection = await mariadb.createConnection({
    host: hostname,
    port: Number(port || 3306),
    user: decodeURIComponent(username),
    password: decodeURIComponent(password),
    database: pathname.slice(1),
  });
  const folder = await mkdtemp(path.join(tmpdir(), 'country-'));
  try {
    // The database may run as another user.
    await chmod(folder, 0o755);
    await connection.query('SET SESSION foreign_key_checks = 0, unique_checks = 0');
    for (const table of tables) {
      const begin = performance.now();
      const file = path.join(folder, table.table);
      await pipeline(Readable.from(chunks(table.rows(country))), createWriteStream(file, { mode: 0o644 }));
      const columns = table.columns.map((name) => `\`${name}\``).join(', ');
      const { affectedRows } = await connection.query<{ affectedRows: number }>(
        `LOAD DATA INFILE ? INTO TABLE ${table.table} CHARACTER SET utf8mb4 (${columns})`,
        [file],
      );
      await rm(file);
      const seconds = ((performance.now() - begin) / 1000).toFixed(1);
      say(`  ${table.table.padEnd(18)} ${String(affectedRows).padStart(9)} rows ${seconds.padStart(6)} s`);
    }
  } finally {
    await connection.end();
    await rm(folder, { recursive: true });
  }
}

function* chunks(rows: Iterable<string>): Iterable<string> {
  let text = '';
  for (const row of rows) {
    text += row;
    if (text.length < CHUNK) continue;
    yield text;
    text = '';
  }
  if (text !== '') yield text;
}

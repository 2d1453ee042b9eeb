import type { Sequelize } from 'sequelize';
import { readRow, readRows } from '#server/db/read.ts';
import { quantile } from './chain-rounds.ts';

/** Requests of one signed-in person; the whole reply is read. */
export type Request = (path: string, body?: object) => Promise<Timed>;
interface Timed {
  milliseconds: number;
  bytes: number;
  reply: unknown;
}

/** Several times of one thing, milliseconds, sorted. */
export interface Times {
  name: string;
  milliseconds: number[];
  /** What was found, for who reads the table. */
  found: string;
}

/** A signed-in person's requests. Whatever is refused ends the bench. */
export function requester(baseUrl: string, cookie: string): Request {
  return async (path, body) => {
    const begin = performance.now();
    const reply = await fetch(baseUrl + path, {
      headers: { cookie, 'X-Requested-With': 'exagium', 'Content-Type': 'application/json' },
      ...(body ? { method: 'POST', body: JSON.stringify(body) } : {}),
    });
    const bytes = Buffer.from(await reply.arrayBuffer());
    const milliseconds = performance.now() - begin;
    if (!reply.ok) throw new Error(`${path} gave ${reply.status}: ${bytes.toString('utf8')}`);
    return { milliseconds, bytes: bytes.byteLength, reply: JSON.parse(bytes.toString('utf8')) };
  };
}

/** Runs something several times, one after the other. */
export async function timed<Result>(
  name: string,
  runs: number,
  work: () => Promise<Result>,
  found: (result: Result) => string = () => '',
): Promise<Times> {
  const milliseconds: number[] = [];
  let result: Result;
  for (let run = 0; run < runs; run += 1) {
    const begin = performance.now();
    result = await work();
    milliseconds.push(performance.now() - begin);
  }
  return { name, milliseconds: milliseconds.sort((a, b) => a - b), found: found(result!) };
}

/** Median, and the longest where there are several. */
export function timesInWords({ name, milliseconds, found }: Times): string {
  const median = quantile(milliseconds, 0.5).toFixed(1).padStart(9);
  const longest = milliseconds.at(-1)!.toFixed(1).padStart(9);
  return `${name.padEnd(58)} ${median} ms ${longest} ms  ${found}`;
}

const WIDE = 'SET STATEMENT tmp_memory_table_size = 268435456, max_heap_table_size = 268435456 FOR';

/** How many values stand above (or below) a value, by a plain recursive query. */
export async function countByQuery(
  database: Sequelize,
  uid: string,
  way: 'above' | 'below',
): Promise<number> {
  const [from, to] = way === 'above' ? ['child_id', 'parent_id'] : ['parent_id', 'child_id'];
  const row = await readRow<{ count: number }>(
    database,
    `${WIDE} WITH RECURSIVE met (id) AS (
       SELECT CAST(v.id AS UNSIGNED) FROM assigned_value v WHERE v.uid = :uid
       UNION
       SELECT l.${to} FROM met m JOIN value_link l ON l.${from} = m.id)
     SELECT COUNT(*) - 1 AS count FROM met`,
    { uid },
  );
  return row!.count;
}

/** Values drawn at random: the same for the same seed and register. */
export async function randomValues(database: Sequelize, count: number, seed: number): Promise<string[]> {
  const rows = await readRows<{ uid: string }>(
    database,
    'SELECT uid FROM assigned_value ORDER BY MD5(CONCAT(uid, :seed)) LIMIT :count',
    { seed, count },
  );
  return rows.map((row) => row.uid);
}

/** The laboratory whose number of values, held or issued, is nearest to a number, with it. */
export async function laboratoryWith(
  database: Sequelize,
  values: number,
): Promise<{ id: string; code: string; values: number }> {
  const row = await readRow<{ id: string; code: string; values: number }>(
    database,
    `SELECT l.id, l.code, CAST(SUM(x.n) AS SIGNED) AS \`values\` FROM laboratory l JOIN (
       SELECT holder_id AS id, COUNT(*) AS n FROM assigned_value GROUP BY holder_id
       UNION ALL SELECT issuer_id, COUNT(*) FROM assigned_value WHERE holder_id <> issuer_id GROUP BY issuer_id
     ) x ON x.id = l.id
     GROUP BY l.id, l.code ORDER BY ABS(SUM(x.n) - :values) LIMIT 1`,
    { values },
  );
  return row!;
}

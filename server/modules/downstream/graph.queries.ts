import type { Sequelize } from 'sequelize';
import { readRow, readRows } from '#server/db/read.ts';
import type { GraphEndRow, GraphLinkRow, GraphValueRow } from './graph-arrays.ts';
import { LINK_COLUMNS, unpackLink, unpackValue, VALUE_COLUMNS, type Packed } from './packed-rows.ts';

const VALUES = `SELECT ${VALUE_COLUMNS} FROM assigned_value v JOIN revision r ON r.id = v.revision_id`;

const ENDS = `
  SELECT x.value_id AS valueId, TO_DAYS(x.effective_on) AS effectiveDay, TO_DAYS(x.recorded_at) AS recordedDay
  FROM value_end x`;

/** Values and all that leans on them through references; UNION removes the repeats that shared references bring. */
const BELOW = `
  WITH RECURSIVE below (id) AS (
    SELECT CAST(v.id AS UNSIGNED) FROM assigned_value v WHERE v.id IN (:ids)
    UNION
    SELECT l.child_id FROM below b JOIN value_link l ON l.parent_id = b.id AND l.role = 'reference')`;

/** Room in memory for one statement: at the default a million descendants go through the disk. */
const WIDE = 'SET STATEMENT tmp_memory_table_size = 268435456, max_heap_table_size = 268435456 FOR';

type Replacements = Parameters<typeof readRows>[2];

async function valueRows(
  database: Sequelize,
  sql: string,
  replacements: Replacements,
): Promise<GraphValueRow[]> {
  return (await readRows<Packed>(database, sql, replacements)).map(unpackValue);
}

async function linkRows(
  database: Sequelize,
  sql: string,
  replacements: Replacements,
): Promise<GraphLinkRow[]> {
  return (await readRows<Packed>(database, sql, replacements)).map(unpackLink);
}

/** The newest act, and how many values and links there are to make room for. */
export async function registerSize(
  database: Sequelize,
): Promise<{ seq: number; values: number; links: number; lastId: number }> {
  const row = await readRow<{ seq: number | null; values: number; links: number; lastId: number | null }>(
    database,
    `SELECT (SELECT MAX(seq) FROM act) AS seq, (SELECT COUNT(*) FROM assigned_value) AS \`values\`,
       (SELECT COUNT(*) FROM value_link) AS links, (SELECT MAX(id) FROM assigned_value) AS lastId`,
  );
  return { seq: row?.seq ?? 0, values: row?.values ?? 0, links: row?.links ?? 0, lastId: row?.lastId ?? 0 };
}

/** The newest act. */
export async function newestAct(database: Sequelize): Promise<number> {
  const row = await readRow<{ seq: number | null }>(database, 'SELECT MAX(seq) AS seq FROM act');
  return row?.seq ?? 0;
}

/** A page of all values recorded by act `seq`, by id. */
export async function valuePage(
  database: Sequelize,
  seq: number,
  afterId: number,
  limit: number,
): Promise<GraphValueRow[]> {
  return valueRows(
    database,
    `${VALUES} WHERE v.id > :afterId AND v.act_seq <= :seq ORDER BY v.id LIMIT ${limit}`,
    { afterId, seq },
  );
}

/** The links of children with ids in a range, both ends in. */
export async function linkPage(database: Sequelize, from: number, to: number): Promise<GraphLinkRow[]> {
  return linkRows(
    database,
    `SELECT ${LINK_COLUMNS} FROM value_link l WHERE l.child_id BETWEEN :from AND :to AND l.role = 'reference'`,
    { from, to },
  );
}

/** What acts after `after` and up to `seq` recorded. A value's links are recorded in the same act. */
export async function recordedSince(
  database: Sequelize,
  after: number,
  seq: number,
): Promise<{ values: GraphValueRow[]; links: GraphLinkRow[]; ends: GraphEndRow[] }> {
  const range = { after, seq };
  const [values, links, ends] = await Promise.all([
    valueRows(database, `${VALUES} WHERE v.act_seq > :after AND v.act_seq <= :seq ORDER BY v.id`, range),
    linkRows(
      database,
      `SELECT ${LINK_COLUMNS} FROM assigned_value v JOIN value_link l ON l.child_id = v.id AND l.role = 'reference'
       WHERE v.act_seq > :after AND v.act_seq <= :seq`,
      range,
    ),
    endsSince(database, after, seq),
  ]);
  return { values, links, ends };
}

/** Ends that acts after `after` and up to `seq` recorded. */
export async function endsSince(database: Sequelize, after: number, seq: number): Promise<GraphEndRow[]> {
  return readRows(database, `${ENDS} WHERE x.act_seq > :after AND x.act_seq <= :seq`, { after, seq });
}

/** For standards, one value of each that was recorded by act `seq`. */
export async function anyValueOf(
  database: Sequelize,
  standardIds: readonly string[],
  seq: number,
): Promise<{ standardId: string; valueId: number }[]> {
  if (standardIds.length === 0) return [];
  return readRows(
    database,
    `SELECT standard_id AS standardId, MIN(id) AS valueId FROM assigned_value
     WHERE standard_id IN (:standardIds) AND act_seq <= :seq GROUP BY standard_id`,
    { standardIds, seq },
  );
}

/**
 * Whether no more than `most` values are these or below them. They are followed level by level, so that a wide part is
 * given up early; a recursive query would walk it to its end first.
 */
export async function isPartSmall(
  database: Sequelize,
  ids: readonly number[],
  most: number,
): Promise<boolean> {
  const met = new Set<number>(ids);
  let level = [...met];
  while (level.length > 0 && met.size <= most) {
    const rows = await readRows<{ id: number }>(
      database,
      `SELECT DISTINCT child_id AS id FROM value_link WHERE parent_id IN (:level) AND role = 'reference' LIMIT ${most + 1}`,
      { level },
    );
    level = rows.map((row) => row.id).filter((id) => !met.has(id));
    for (const id of level) met.add(id);
  }
  return met.size <= most;
}

/** Values and everything below them, read from the database alone. */
export async function partBelow(
  database: Sequelize,
  ids: readonly number[],
): Promise<{ values: GraphValueRow[]; links: GraphLinkRow[]; ends: GraphEndRow[] }> {
  if (ids.length === 0) return { values: [], links: [], ends: [] };
  const [values, links, ends] = await Promise.all([
    valueRows(
      database,
      `${WIDE} ${BELOW} SELECT ${VALUE_COLUMNS} FROM below b JOIN assigned_value v ON v.id = b.id
       JOIN revision r ON r.id = v.revision_id`,
      { ids },
    ),
    linkRows(
      database,
      `${WIDE} ${BELOW} SELECT ${LINK_COLUMNS} FROM below b JOIN value_link l ON l.child_id = b.id AND l.role = 'reference'`,
      { ids },
    ),
    readRows<GraphEndRow>(database, `${WIDE} ${BELOW} ${ENDS} JOIN below b ON b.id = x.value_id`, { ids }),
  ]);
  return { values, links, ends };
}

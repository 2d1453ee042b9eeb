import type { Sequelize } from 'sequelize';
import type { StandardListQuery } from '#shared/contracts/standards.ts';
import { IN_FORCE, knownAt } from '#server/db/in-force.ts';
import { boundedCount } from '#server/db/bounded-count.ts';
import { readRows } from '#server/db/read.ts';
import { cursorAfter, placeOf, type Place } from '#server/http/cursor.ts';
import { factOnDay } from './standard-laboratory.queries.ts';
import { standardRows, type StandardRecord } from './standard-rows.queries.ts';

export interface StandardList {
  standards: StandardRecord[];
  nextCursor: string | null;
  count: number;
  isCountExact: boolean;
}

/** Numbers compare byte by byte in their columns; people search them in either case. */
const ANY_CASE = 'COLLATE utf8mb4_uca1400_ai_ci';

const OWNER = `COALESCE(${factOnDay('owner', 's.id')}, s.laboratory_id)`;
const LAST_CALIBRATED = `
  COALESCE((SELECT MAX(v.performed_end) FROM assigned_value v WHERE v.standard_id = s.id AND ${IN_FORCE}), '0001-01-01')`;

/** By the owner's own programme: the last calibration and its interval; null without either. */
const DUE_ON = `
  (SELECT DATE_ADD(MAX(v.performed_end), INTERVAL (
     SELECT p.interval_months FROM programme p
     WHERE p.standard_id = s.id AND p.laboratory_id = ${OWNER}
       AND p.valid_from <= :day AND (p.valid_to IS NULL OR p.valid_to >= :day)
     ORDER BY p.act_seq DESC, p.id DESC LIMIT 1) MONTH)
   FROM assigned_value v WHERE v.standard_id = s.id AND ${IN_FORCE})`;

const STANDINGS = {
  overdue: `${DUE_ON} < :day`,
  due: `${DUE_ON} BETWEEN :day AND DATE_ADD(:day, INTERVAL 60 DAY)`,
  'no value': `NOT EXISTS (SELECT 1 FROM assigned_value v WHERE v.standard_id = s.id AND ${IN_FORCE})`,
} as const;

const SORTS = {
  registryNo: { key: 's.registry_no', hasTies: false },
  nominal: { key: 's.nominal', hasTies: true },
  calibrated: { key: LAST_CALIBRATED, hasTies: true },
} as const;

/**
 * One page of standards, narrowed to the laboratories this person reads in full, by a place in the order and
 * not by counting rows. The page's ids are found first, over indexes alone; then each row is completed.
 * @param laboratoryIds null for all
 * @throws AppError `malformed` on cursor
 */
export async function standardList(
  database: Sequelize,
  query: StandardListQuery,
  laboratoryIds: readonly string[] | null,
  day: string,
): Promise<StandardList> {
  const place = placeOf(query.cursor, query.sort);
  const owners = ownersOf(query, laboratoryIds);
  if (owners?.length === 0) return { standards: [], nextCursor: null, count: 0, isCountExact: true };
  const { conditions, replacements } = filtersOf(query, owners, day);
  const page = await pageOf(database, query, { conditions, replacements, place });
  const shown = page.slice(0, query.limit);
  const last = page.length > query.limit ? shown.at(-1) : undefined;
  return {
    standards: await standardRows(
      database,
      shown.map((row) => row.id),
      day,
    ),
    nextCursor: last ? cursorAfter(query.sort, { value: last.sortKey, id: last.id }) : null,
    ...(await boundedCount(database, `FROM standard s WHERE ${conditions}`, replacements, page.length)),
  };
}

/** The owners to show: those readable, and of them the one asked for. Null: every laboratory. */
function ownersOf(
  query: StandardListQuery,
  laboratoryIds: readonly string[] | null,
): readonly string[] | null {
  if (query.laboratory === undefined) return laboratoryIds;
  const isOpen = laboratoryIds === null || laboratoryIds.includes(query.laboratory);
  return isOpen ? [query.laboratory] : [];
}

interface Filters {
  conditions: string;
  replacements: Record<string, string | readonly string[]>;
}

function filtersOf(query: StandardListQuery, owners: readonly string[] | null, day: string): Filters {
  const conditions = ['TRUE'];
  const replacements: Filters['replacements'] = { day, knownAt: knownAt(day) };
  const add = (condition: string, values: Filters['replacements'] = {}) => {
    conditions.push(condition);
    Object.assign(replacements, values);
  };
  if (owners) {
    // The first condition finds candidates by index; the second says who owns them today.
    add(
      `s.id IN (SELECT f.standard_id FROM standard_fact f WHERE f.laboratory_id IN (:owners) AND f.kind = 'owner')
       AND ${OWNER} IN (:owners)`,
      { owners },
    );
  }
  if (query.kind) add('s.kind = :kind', { kind: query.kind });
  if (query.class) add(`${factOnDay('class', 's.id')} = :class`, { class: query.class });
  if (query.nominalFrom) add('s.nominal >= :nominalFrom', { nominalFrom: query.nominalFrom });
  if (query.nominalTo) add('s.nominal <= :nominalTo', { nominalTo: query.nominalTo });
  if (query.standing) add(STANDINGS[query.standing]);
  if (query.q) {
    add(
      `(s.registry_no ${ANY_CASE} LIKE :part OR s.marking LIKE :part OR s.serial LIKE :part OR s.id IN (
         SELECT v.standard_id FROM calibration c JOIN revision r ON r.calibration_id = c.id
         JOIN assigned_value v ON v.revision_id = r.id WHERE c.certificate_no ${ANY_CASE} LIKE :part))`,
      { part: `%${query.q.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%` },
    );
  }
  return { conditions: conditions.join(' AND '), replacements };
}

async function pageOf(
  database: Sequelize,
  query: StandardListQuery,
  { conditions, replacements, place }: Filters & { place: Place | null },
): Promise<{ id: string; sortKey: string }[]> {
  const isDescending = query.sort.startsWith('-');
  const { key, hasTies } = SORTS[query.sort.replace('-', '') as keyof typeof SORTS];
  const [order, beyond] = isDescending ? ['DESC', '<'] : ['ASC', '>'];
  const isComputed = key === LAST_CALIBRATED;
  const column = isComputed ? 'sortKey' : key;
  const after = hasTies
    ? `(${column} ${beyond} :placeValue OR (${column} = :placeValue AND s.id ${beyond} :placeId))`
    : `${column} ${beyond} :placeValue`;
  // A computed key can only be compared after it was computed, in HAVING; a column's stands where its index helps.
  const [where, having] = !place ? ['', ''] : isComputed ? ['', `HAVING ${after}`] : [`AND ${after}`, ''];
  return readRows<{ id: string; sortKey: string }>(
    database,
    `SELECT s.id, ${key} AS sortKey FROM standard s WHERE ${conditions} ${where} ${having}
     ORDER BY ${column} ${order}${hasTies ? `, s.id ${order}` : ''} LIMIT ${query.limit + 1}`,
    { ...replacements, placeValue: place?.value ?? '', placeId: place?.id ?? '' },
  );
}

import type { Sequelize } from 'sequelize';
import type { CalibrationListQuery, CalibrationListResponse } from '#shared/contracts/calibrations.ts';
import { knownAt } from '#server/db/in-force.ts';
import { boundedCount } from '#server/db/bounded-count.ts';
import { readRows } from '#server/db/read.ts';
import { STATE_ON_DAY } from '#server/db/value-state.ts';
import { cursorAfter, placeOf, type Place } from '#server/http/cursor.ts';

type Calibration = CalibrationListResponse['calibrations'][number];

export interface CalibrationList {
  calibrations: Calibration[];
  nextCursor: string | null;
  count: number;
  isCountExact: boolean;
}

/** Numbers compare byte by byte in their columns; people search them in either case. */
const ANY_CASE = 'COLLATE utf8mb4_uca1400_ai_ci';

/** Revisions that concern some laboratories: theirs to issue, theirs entered, or of weights they hold. */
const CONCERNING = `
  (SELECT r.id FROM calibration c JOIN revision r ON r.calibration_id = c.id WHERE c.laboratory_id IN (:mine)
   UNION SELECT r.id FROM calibration c JOIN revision r ON r.calibration_id = c.id
   WHERE c.registered_by_id IN (:mine)
   UNION SELECT v.revision_id FROM assigned_value v WHERE v.holder_id IN (:mine)) mine
  JOIN revision r ON r.id = mine.id`;

/** A revision stands as its first line does: lines of one certificate end together. */
const STATE = `(SELECT ${STATE_ON_DAY} FROM assigned_value v WHERE v.revision_id = r.id AND v.line = 1)`;
const IS_LATEST =
  'NOT EXISTS (SELECT 1 FROM revision x WHERE x.calibration_id = r.calibration_id AND x.n > r.n)';

const SORTS = { issuedOn: 'r.issued_on', certificateNo: 'c.certificate_no' } as const;

/** The columns of a row, for the list and the sheet: `r` revision, `c` calibration, `l` its issuer. */
export const CALIBRATION_ROW = `
  r.id AS revisionId, c.id AS calibrationId, c.certificate_no AS certificateNo, r.n AS revisionN,
  l.id AS issuerId, l.code AS issuerCode, l.name AS issuerName, r.issued_on AS issuedOn,
  r.performed_begin AS performedBegin, r.performed_end AS performedEnd, r.date_precision AS datePrecision,
  (SELECT COUNT(DISTINCT v.standard_id) FROM assigned_value v WHERE v.revision_id = r.id) AS weights,
  (SELECT s.registry_no FROM assigned_value v JOIN standard s ON s.id = v.standard_id
   WHERE v.revision_id = r.id AND v.line = 1) AS firstRegistryNo,
  ${STATE} AS state`;

export type CalibrationRecord = Omit<Calibration, 'issuer'> & {
  issuerId: string;
  issuerCode: string;
  issuerName: string;
};

/**
 * One page of issued calibrations, narrowed to those that concern the laboratories this person reads in full.
 * Without a state asked for, the latest revision of each.
 * @param laboratoryIds null for all
 * @throws AppError `malformed` on cursor
 */
export async function calibrationList(
  database: Sequelize,
  query: CalibrationListQuery,
  laboratoryIds: readonly string[] | null,
  day: string,
): Promise<CalibrationList> {
  const place = placeOf(query.cursor, query.sort);
  if (laboratoryIds?.length === 0)
    return { calibrations: [], nextCursor: null, count: 0, isCountExact: true };
  const { from, conditions, replacements } = filtersOf(query, laboratoryIds, day);
  const page = await pageOf(database, query, { from, conditions, replacements, place });
  const shown = page.slice(0, query.limit);
  const last = page.length > query.limit ? shown.at(-1) : undefined;
  return {
    calibrations: await rowsOf(
      database,
      shown.map((row) => row.id),
      day,
    ),
    nextCursor: last ? cursorAfter(query.sort, { value: last.sortKey, id: last.id }) : null,
    ...(await boundedCount(database, `FROM ${from} WHERE ${conditions}`, replacements, page.length)),
  };
}

interface Filters {
  from: string;
  conditions: string;
  replacements: Record<string, string | readonly string[]>;
}

function filtersOf(
  query: CalibrationListQuery,
  laboratoryIds: readonly string[] | null,
  day: string,
): Filters {
  const conditions = ['TRUE'];
  const replacements: Filters['replacements'] = { day, knownAt: knownAt(day) };
  const add = (condition: string, values: Filters['replacements'] = {}) => {
    conditions.push(condition);
    Object.assign(replacements, values);
  };
  const mine = laboratoryIds ?? (query.laboratory ? [query.laboratory] : null);
  if (mine) Object.assign(replacements, { mine });
  if (laboratoryIds && query.laboratory) {
    add(
      `(:laboratory IN (c.laboratory_id, c.registered_by_id) OR EXISTS (
         SELECT 1 FROM assigned_value v WHERE v.revision_id = r.id AND v.holder_id = :laboratory))`,
      { laboratory: query.laboratory },
    );
  }
  if (query.issuedFrom) add('r.issued_on >= :issuedFrom', { issuedFrom: query.issuedFrom });
  if (query.issuedTo) add('r.issued_on <= :issuedTo', { issuedTo: query.issuedTo });
  if (query.state) add(`${STATE} = :state`, { state: query.state });
  else add(IS_LATEST);
  if (query.q) {
    add(
      `(c.certificate_no ${ANY_CASE} LIKE :part OR r.id IN (
         SELECT v.revision_id FROM standard s JOIN assigned_value v ON v.standard_id = s.id
         WHERE s.registry_no ${ANY_CASE} LIKE :part))`,
      { part: `%${query.q.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%` },
    );
  }
  const from = `${mine ? CONCERNING : 'revision r'} JOIN calibration c ON c.id = r.calibration_id`;
  return { from, conditions: conditions.join(' AND '), replacements };
}

async function pageOf(
  database: Sequelize,
  query: CalibrationListQuery,
  { from, conditions, replacements, place }: Filters & { place: Place | null },
): Promise<{ id: string; sortKey: string }[]> {
  const [order, beyond] = query.sort.startsWith('-') ? ['DESC', '<'] : ['ASC', '>'];
  const key = SORTS[query.sort.replace('-', '') as keyof typeof SORTS];
  const after = place
    ? `AND (${key} ${beyond} :placeValue OR (${key} = :placeValue AND r.id ${beyond} :placeId))`
    : '';
  return readRows<{ id: string; sortKey: string }>(
    database,
    `SELECT r.id, ${key} AS sortKey FROM ${from} WHERE ${conditions} ${after}
     ORDER BY ${key} ${order}, r.id ${order} LIMIT ${query.limit + 1}`,
    { ...replacements, placeValue: place?.value ?? '', placeId: place?.id ?? '' },
  );
}

async function rowsOf(database: Sequelize, ids: readonly string[], day: string): Promise<Calibration[]> {
  if (ids.length === 0) return [];
  const rows = await readRows<CalibrationRecord>(
    database,
    `SELECT ${CALIBRATION_ROW} FROM revision r JOIN calibration c ON c.id = r.calibration_id
     JOIN laboratory l ON l.id = c.laboratory_id WHERE r.id IN (:ids)`,
    { ids, day, knownAt: knownAt(day) },
  );
  const byId = new Map(rows.map((row) => [row.revisionId, presentCalibrationRow(row)]));
  return ids.flatMap((id) => byId.get(id) ?? []);
}

/** A row with its issuer as one name. */
export function presentCalibrationRow(record: CalibrationRecord): Calibration {
  const { issuerId, issuerCode, issuerName, ...row } = record;
  return { ...row, issuer: { id: issuerId, code: issuerCode, name: issuerName } };
}

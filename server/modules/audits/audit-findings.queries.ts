import type { Sequelize } from 'sequelize';
import type { AuditFindingGroup, AuditFindingsQuery } from '#shared/contracts/audits.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { cursorAfter, placeOf } from '#server/http/cursor.ts';
import type { FindingRow } from './audits.model.ts';

/** A value as a finding names it, with what decides how much of it is seen. */
export interface NamedValue {
  uid: string;
  registryNo: string;
  certificateNo: string;
  standardId: string;
  revisionId: string;
  holderId: string;
  issuerId: string;
  issuerCode: string;
  issuerName: string;
}

/** A finding with the names of its values. */
export interface NamedFinding {
  row: FindingRow;
  value: NamedValue;
  reference: NamedValue | null;
  laboratory: { id: string; code: string; name: string };
}

const PAGE = 100;

export type FindingFilter = Omit<AuditFindingsQuery, 'cursor' | 'whose'>;

/** Whose results are wanted: of some laboratories, or of all others. */
export interface Whose {
  laboratoryIds: readonly string[];
  isOwn: boolean;
}

/** A page of findings in their order, with how many there are in all. */
export async function findingPage(
  database: Sequelize,
  runId: string,
  filter: FindingFilter,
  whose: Whose | null,
  cursor: string | undefined,
): Promise<{
  groups: AuditFindingGroup[] | null;
  findings: NamedFinding[];
  nextCursor: string | null;
  total: number;
}> {
  const { where, replacements } = conditions(runId, filter, whose);
  const place = placeOf(cursor, 'n');
  const [groups, rows, total] = await Promise.all([
    place ? null : findingGroups(database, runId, { ...filter, rule: undefined }, whose),
    findingRows(database, where, { ...replacements, after: place ? Number(place.value) : -1 }, PAGE + 1),
    readRow<{ count: number }>(
      database,
      `SELECT COUNT(*) AS count FROM audit_finding f WHERE ${where}`,
      replacements,
    ),
  ]);
  const shown = rows.slice(0, PAGE);
  const last = rows.length > PAGE ? shown.at(-1)! : null;
  return {
    groups,
    findings: await named(database, shown),
    nextCursor: last && cursorAfter('n', { value: String(last.n), id: '' }),
    total: total!.count,
  };
}

function findingGroups(
  database: Sequelize,
  runId: string,
  filter: FindingFilter,
  whose: Whose | null,
): Promise<AuditFindingGroup[]> {
  const { where, replacements } = conditions(runId, filter, whose);
  return readRows<AuditFindingGroup>(
    database,
    `SELECT f.rule, f.outcome, f.severity, COUNT(*) AS count FROM audit_finding f WHERE ${where}
     GROUP BY f.rule, f.outcome, f.severity ORDER BY f.rule, f.outcome, f.severity`,
    replacements,
  );
}

/** Every finding that is wanted, with its names, a page after another. */
export async function* allFindings(
  database: Sequelize,
  runId: string,
  filter: FindingFilter,
  whose: Whose | null,
): AsyncGenerator<NamedFinding[]> {
  for await (const rows of storedFindings(database, runId, filter, whose)) yield named(database, rows);
}

/** Every finding of a run as it is stored, a page after another. */
export async function* storedFindings(
  database: Sequelize,
  runId: string,
  filter: FindingFilter = {},
  whose: Whose | null = null,
): AsyncGenerator<FindingRow[]> {
  const { where, replacements } = conditions(runId, filter, whose);
  for (let after = -1; ;) {
    const rows = await findingRows(database, where, { ...replacements, after }, 2_000);
    if (rows.length > 0) yield rows;
    if (rows.length < 2_000) return;
    after = rows.at(-1)!.n;
  }
}

/** One finding; null where the run has none of this number. */
export async function oneFinding(
  database: Sequelize,
  runId: string,
  n: number,
): Promise<NamedFinding | null> {
  const rows = await findingRows(database, 'f.run_id = :runId AND f.n = :n', { runId, n, after: -1 }, 1);
  return (await named(database, rows))[0] ?? null;
}

type Replacements = Record<string, string | number | readonly string[]>;

function findingRows(
  database: Sequelize,
  where: string,
  replacements: Replacements,
  limit: number,
): Promise<FindingRow[]> {
  return readRows<FindingRow>(
    database,
    `SELECT f.run_id, f.n, f.rule, f.verdict, f.outcome, f.severity, f.subject, f.value_uid, f.parent_uid, f.focus_uid,
       f.laboratory_id, f.sentence, f.parameters, f.facts_n
     FROM audit_finding f WHERE ${where} AND f.n > :after ORDER BY f.n LIMIT ${limit}`,
    replacements,
  );
}

function conditions(
  runId: string,
  filter: FindingFilter,
  whose: Whose | null,
): { where: string; replacements: Replacements } {
  const wanted = Object.entries(filter).filter((entry): entry is [string, string] => entry[1] !== undefined);
  const parts = ['f.run_id = :runId', ...wanted.map(([name]) => `f.${name} = :${name}`)];
  if (whose) parts.push(`f.laboratory_id ${whose.isOwn ? 'IN' : 'NOT IN'} (:whose)`);
  return {
    where: parts.join(' AND '),
    replacements: {
      runId,
      ...Object.fromEntries(wanted),
      ...(whose && { whose: whose.laboratoryIds.length > 0 ? whose.laboratoryIds : [''] }),
    },
  };
}

async function named(database: Sequelize, rows: readonly FindingRow[]): Promise<NamedFinding[]> {
  if (rows.length === 0) return [];
  const uids = new Set(rows.flatMap((row) => [row.value_uid, row.parent_uid ?? row.value_uid]));
  const [values, laboratories] = await Promise.all([
    readRows<NamedValue>(
      database,
      `SELECT v.uid, s.registry_no AS registryNo, c.certificate_no AS certificateNo, v.standard_id AS standardId,
         v.revision_id AS revisionId, v.holder_id AS holderId, v.issuer_id AS issuerId,
         i.code AS issuerCode, i.name AS issuerName
       FROM assigned_value v
       JOIN laboratory i ON i.id = v.issuer_id
       JOIN standard s ON s.id = v.standard_id
       JOIN revision r ON r.id = v.revision_id
       JOIN calibration c ON c.id = r.calibration_id
       WHERE v.uid IN (:uids)`,
      { uids: [...uids] },
    ),
    readRows<NamedFinding['laboratory']>(
      database,
      'SELECT id, code, name FROM laboratory WHERE id IN (:ids)',
      { ids: [...new Set(rows.map((row) => row.laboratory_id))] },
    ),
  ]);
  const valueOf = new Map(values.map((value) => [value.uid, value]));
  const laboratoryOf = new Map(laboratories.map((laboratory) => [laboratory.id, laboratory]));
  return rows.map((row) => ({
    row,
    value: valueOf.get(row.value_uid)!,
    reference: row.parent_uid === null ? null : valueOf.get(row.parent_uid)!,
    laboratory: laboratoryOf.get(row.laboratory_id)!,
  }));
}

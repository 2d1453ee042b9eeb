import type { Sequelize } from 'sequelize';
import { decimalText } from '#shared/decimal.ts';
import { readRows } from '#server/db/read.ts';
import { rowsOf, type JsonList } from './json-list.ts';
import { plainDecimals } from './plain-decimals.ts';
import { GroupCovariance } from './group-covariance.ts';
import { readInParts } from './read-in-parts.ts';
import type { StoredGroup, StoredSource, StoredValue } from './stored.ts';

/** Instants as the pure functions compare them: ISO 8601, UTC, microseconds. */
const INSTANT = (column: string) => `DATE_FORMAT(${column}, '%Y-%m-%dT%H:%i:%s.%fZ')`;

/** Ids of the values and of everything they lean on; UNION removes the repeats that shared references bring. */
const ANCESTORS = `
  WITH RECURSIVE closure (id) AS (
    SELECT CAST(v.id AS UNSIGNED) FROM assigned_value v WHERE v.id IN (:ids)
    UNION
    SELECT l.parent_id FROM closure c JOIN value_link l ON l.child_id = c.id)
  SELECT id FROM closure`;

const VALUES = `
  SELECT v.id, v.uid, r.calibration_id AS calibrationId, v.revision_id AS revisionId, r.n AS revisionN, c.certificate_no AS certificateNo, v.line,
    v.issuer_id AS issuerId, v.holder_id AS holderId, c.registered_by_id AS registeredById,
    v.standard_id AS standardId, s.registry_no AS registryNo, s.marking, s.kind AS standardKind,
    (SELECT m.set_id FROM set_member m WHERE m.standard_id = s.id ORDER BY m.act_seq DESC LIMIT 1) AS setId,
    e.n AS epochN, e.begins_on AS epochBeginsOn, v.quantity, v.medium, v.stage, v.nominal, v.deviation,
    v.reported_unit AS reportedUnit, v.reported_decimals AS reportedDecimals, v.expanded_u AS expandedU,
    v.reported_u_decimals AS reportedUDecimals, v.k, v.coverage, v.nu_eff AS nuEff, v.u AS uStated,
    v.local_u AS localU, v.local_origin AS localOrigin, v.local_degrees_of_freedom AS localDegreesOfFreedom,
    v.local_estimate AS localEstimate, v.root_kind AS rootKind, sv.name AS scaleVersion, v.class,
    v.under_accreditation AS underAccreditation, v.unit_confirmed AS unitConfirmed, v.changed,
    r.decision_rule AS decisionRule, r.signatory_id AS signatoryId, r.reason AS amendmentReason, r.method, r.performed_begin AS performedBegin,
    v.performed_end AS performedEnd, v.date_precision AS datePrecision, v.effective_from AS issuedOn,
    ${INSTANT('v.recorded_at')} AS recordedAt,
    (SELECT COUNT(*) FROM assigned_value o WHERE o.revision_id = v.revision_id AND o.id <> v.id
     AND EXISTS (SELECT 1 FROM value_link l WHERE l.child_id = o.id)) AS siblingLinesWithReferences,
    (SELECT JSON_ARRAYAGG(JSON_OBJECT('parentId', parent_id, 'role', role, 'sensitivity', sensitivity,
        'usedBegin', used_begin, 'usedEnd', used_end, 'usedAs', used_as,
        'usedDeviation', CAST(used_deviation AS CHAR), 'usedExpandedU', CAST(used_expanded_u AS CHAR),
        'usedK', CAST(used_k AS CHAR)) ORDER BY parent_id, role)
     FROM value_link WHERE child_id = v.id) AS parents,
    (SELECT JSON_ARRAYAGG(JSON_OBJECT('sourceId', source_id, 'sensitivity', sensitivity) ORDER BY source_id)
     FROM source_link WHERE child_id = v.id) AS sources,
    (SELECT JSON_ARRAYAGG(name ORDER BY n) FROM component WHERE value_id = v.id) AS components,
    (SELECT group_id FROM group_covariance WHERE row_id = v.id AND column_id = v.id LIMIT 1) AS groupId
  FROM assigned_value v
  JOIN revision r ON r.id = v.revision_id
  JOIN calibration c ON c.id = r.calibration_id
  JOIN standard s ON s.id = v.standard_id
  JOIN epoch e ON e.id = v.epoch_id
  LEFT JOIN scale_version sv ON sv.id = v.scale_version_id
  WHERE v.id IN (:ids)`;

const SOURCES = `
  SELECT o.id, o.uid, o.kind, o.name, o.u, o.unit, o.degrees_of_freedom AS degreesOfFreedom, o.estimate,
    o.standard_id AS standardId, s.registry_no AS registryNo, o.laboratory_id AS laboratoryId,
    o.determined_on AS determinedOn
  FROM source o LEFT JOIN standard s ON s.id = o.standard_id WHERE o.id IN (:ids)`;

/** One text a group: read as rows, hundreds of numbers a design cost more than everything else of a chain. */
const GROUPS = `
  SET STATEMENT group_concat_max_len = 268435456 FOR
  SELECT g.id, g.degrees_of_freedom AS degreesOfFreedom, g.estimate,
    GROUP_CONCAT(k.row_id, ' ', k.column_id, ' ', k.covariance ORDER BY k.row_id, k.column_id) AS cells
  FROM value_group g JOIN group_covariance k ON k.group_id = g.id WHERE g.id IN (:ids)
  GROUP BY g.id`;

/** Ids of `ids` and all they lean on. */
export async function ancestorIds(database: Sequelize, ids: readonly number[]): Promise<number[]> {
  const rows = await readRows<{ id: number }>(database, ANCESTORS, { ids });
  return rows.map((row) => row.id);
}

/** The values with their links; every id is expected to exist. */
export async function storedValues(database: Sequelize, ids: number[]): Promise<StoredValue[]> {
  if (ids.length === 0) return [];
  type Listed = 'parents' | 'sources' | 'components';
  type Row = Omit<StoredValue, Listed> & { [List in Listed]: JsonList<StoredValue[List][number]> };
  const rows = await readInParts<Row, number>(database, VALUES, ids);
  const budgets = new Map<string, readonly string[]>([['[]', NO_BUDGET]]);
  return rows.map((row) => ({
    ...row,
    ...plainDecimals(row),
    nominal: decimalText(row.nominal),
    underAccreditation: Boolean(row.underAccreditation),
    unitConfirmed: Boolean(row.unitConfirmed),
    parents: rowsOf(row.parents),
    sources: rowsOf(row.sources),
    components: keptOnce(budgets, rowsOf(row.components)),
  }));
}

const NO_BUDGET: readonly string[] = [];

/** Budgets of one laboratory have the same names again and again: each list is kept once. */
function keptOnce(lists: Map<string, readonly string[]>, names: readonly string[]): readonly string[] {
  const key = JSON.stringify(names);
  const list = lists.get(key) ?? names;
  lists.set(key, list);
  return list;
}

/** Shared effects by id. */
export async function storedSources(database: Sequelize, ids: number[]): Promise<StoredSource[]> {
  return ids.length === 0 ? [] : readRows<StoredSource>(database, SOURCES, { ids });
}

/** Covariances of local parts by group. */
export async function storedGroups(database: Sequelize, ids: number[]): Promise<StoredGroup[]> {
  if (ids.length === 0) return [];
  type Row = Omit<StoredGroup, 'covariance'> & { cells: string };
  const rows = await readRows<Row>(database, GROUPS, { ids });
  return rows.map(({ cells, ...group }) => ({ ...group, covariance: new GroupCovariance(cells) }));
}

import type { Sequelize } from 'sequelize';
import { groupBy } from '#shared/group-by.ts';
import { readRows } from '#server/db/read.ts';
import { rowsOf, type JsonList } from './json-list.ts';
import { plainDecimals } from './plain-decimals.ts';
import { readInParts } from './read-in-parts.ts';
import type {
  LaboratoryDossier,
  StandardDossier,
  StoredAuthorisation,
  StoredEnd,
  StoredHistoryValue,
  StoredRecognition,
  StoredScopeLine,
} from './stored.ts';

/** The instant of recording within a JSON object. */
const RECORDED_JSON = `'recordedAt', DATE_FORMAT(recorded_at, '%Y-%m-%dT%H:%i:%s.%fZ')`;
const ASSERTED = `valid_from AS validFrom, valid_to AS validTo, act_seq AS actSeq,
  DATE_FORMAT(recorded_at, '%Y-%m-%dT%H:%i:%s.%fZ') AS recordedAt`;

/** The same within a JSON object. */
const ASSERTED_JSON = `'validFrom', valid_from, 'validTo', valid_to, 'actSeq', act_seq, ${RECORDED_JSON}`;

/**
 * Standards with all that was asserted of them. Audits digest rows as they stand here: lists have a fixed order, and
 * epochs and programmes name their standard, as they always did. Of drifts rates only: a drift given in grams for one
 * interval says nothing of another.
 */
const STANDARDS = `
  SELECT s.id AS standardId, s.registry_no AS registryNo, s.marking, s.nominal, s.kind, s.serial, s.shape,
    EXISTS (SELECT 1 FROM set_member m WHERE m.standard_id = s.id) AS isInSet,
    (SELECT JSON_ARRAYAGG(JSON_OBJECT('value', value, ${ASSERTED_JSON}) ORDER BY recorded_at, id)
     FROM standard_fact WHERE standard_id = s.id AND kind = 'class' AND value IS NOT NULL) AS classes,
    (SELECT JSON_ARRAYAGG(JSON_OBJECT('u', u, 'determinedOn', determined_on, ${RECORDED_JSON}) ORDER BY id)
     FROM source WHERE standard_id = s.id AND kind = 'drift' AND unit = 'g/a') AS driftRates,
    (SELECT JSON_ARRAYAGG(JSON_OBJECT('standardId', standard_id, 'n', n, 'reason', reason, 'beginsOn', begins_on,
        'lastGoodOn', last_good_on, ${RECORDED_JSON}) ORDER BY n)
     FROM epoch WHERE standard_id = s.id) AS epochs,
    (SELECT JSON_ARRAYAGG(JSON_OBJECT('standardId', standard_id, 'laboratoryId', laboratory_id,
        'intervalMonths', interval_months, 'method', method, 'justification', justification, ${ASSERTED_JSON})
       ORDER BY laboratory_id, recorded_at, id)
     FROM programme WHERE standard_id = s.id) AS programmes,
    (SELECT JSON_ARRAYAGG(JSON_OBJECT('kind', kind, 'value', CAST(value AS CHAR),
        'expandedU', CAST(expanded_u AS CHAR), 'k', CAST(k AS CHAR), 'origin', origin, 'sourceId', source_id,
        ${ASSERTED_JSON}) ORDER BY kind, recorded_at, id)
     FROM property WHERE standard_id = s.id) AS properties
  FROM standard s WHERE s.id IN (:ids)`;

const HISTORY = `
  SELECT v.standard_id AS standardId, v.id, v.uid, r.calibration_id AS calibrationId, v.revision_id AS revisionId,
    c.certificate_no AS certificateNo, r.n AS revisionN,
    v.quantity, v.medium, v.stage, e.n AS epochN, v.deviation, v.reported_unit AS reportedUnit,
    v.reported_decimals AS reportedDecimals, v.expanded_u AS expandedU,
    v.reported_u_decimals AS reportedUDecimals, v.k, r.performed_begin AS performedBegin,
    v.performed_end AS performedEnd, v.date_precision AS datePrecision, v.effective_from AS issuedOn,
    DATE_FORMAT(v.recorded_at, '%Y-%m-%dT%H:%i:%s.%fZ') AS recordedAt, v.changed
  FROM assigned_value v
  JOIN revision r ON r.id = v.revision_id
  JOIN calibration c ON c.id = r.calibration_id
  JOIN epoch e ON e.id = v.epoch_id
  WHERE v.standard_id IN (:ids)
  ORDER BY v.performed_end, v.effective_from, v.id`;

const ENDS = `
  SELECT x.value_id AS valueId, x.kind, x.effective_on AS effectiveOn, x.made_known_on AS madeKnownOn,
    DATE_FORMAT(x.recorded_at, '%Y-%m-%dT%H:%i:%s.%fZ') AS recordedAt, x.changed, x.reason,
    x.replaced_by AS replacedById, c.certificate_no AS replacedByCertificate
  FROM value_end x
  JOIN assigned_value v ON v.id = x.value_id
  LEFT JOIN assigned_value n ON n.id = x.replaced_by
  LEFT JOIN revision r ON r.id = n.revision_id
  LEFT JOIN calibration c ON c.id = r.calibration_id
  WHERE v.standard_id IN (:ids)`;

const DUPLICATES = `
  SELECT m.standard_id AS standardId, o.standard_id AS duplicateId
  FROM set_member m
  JOIN set_member o ON o.set_id = m.set_id AND o.standard_id <> m.standard_id
  JOIN standard s ON s.id = m.standard_id
  JOIN standard t ON t.id = o.standard_id AND t.nominal = s.nominal
  WHERE m.standard_id IN (:ids)`;

const LABORATORIES = 'SELECT id, code, name, kind FROM laboratory WHERE id IN (:ids)';

const SCOPE = `
  SELECT laboratory_id AS laboratoryId, line, quantity, nominal_from AS nominalFrom, nominal_to AS nominalTo,
    method, best_u_constant AS bestUConstant, best_u_relative AS bestURelative, k, coverage, state, ${ASSERTED}
  FROM scope_line WHERE laboratory_id IN (:ids)`;

const RECOGNITIONS = `
  SELECT laboratory_id AS laboratoryId, kind, body, number, arrangement, state, ${ASSERTED}
  FROM recognition WHERE laboratory_id IN (:ids)`;

const AUTHORISATIONS = `
  SELECT laboratory_id AS laboratoryId, account_id AS accountId, state, ${ASSERTED}
  FROM authorisation WHERE laboratory_id IN (:ids) AND what = 'sign calibrations'`;

/** A row of `standard`; MariaDB gives the answer of EXISTS as 0 or 1. */
type StandardRow = Pick<
  StandardDossier,
  'standardId' | 'registryNo' | 'marking' | 'nominal' | 'kind' | 'serial' | 'shape'
> & { isInSet: number } & { [List in AssertedList]: JsonList<StandardDossier[List][number]> };

type AssertedList = 'classes' | 'driftRates' | 'epochs' | 'programmes' | 'properties';

/** Two standards of one nominal in one set. */
interface Duplicate {
  standardId: string;
  duplicateId: string;
}

type Of<T, Key extends string> = T & Record<Key, string>;

/** What later acts may have added to these standards: history with its ends, programmes, properties, classes, drifts, duplicates. */
export async function standardDossiers(database: Sequelize, ids: string[]): Promise<StandardDossier[]> {
  if (ids.length === 0) return [];
  const [standards, history, ends, duplicates] = await Promise.all([
    readInParts<StandardRow, string>(database, STANDARDS, ids),
    readInParts<Of<Omit<StoredHistoryValue, 'ends'>, 'standardId'>, string>(database, HISTORY, ids),
    readRows<StoredEnd & { valueId: number }>(database, ENDS, { ids }),
    readRows<Duplicate>(database, DUPLICATES, { ids }),
  ]);
  const endsByValue = groupBy(ends, (end) => end.valueId);
  const historyOf = groupBy(history, (row) => row.standardId);
  const twins = groupBy(duplicates, (row) => row.standardId);
  return standards.map((standard) => ({
    ...standard,
    isInSet: Boolean(standard.isInSet),
    classes: rowsOf(standard.classes),
    driftRates: rowsOf(standard.driftRates),
    history: (historyOf.get(standard.standardId) ?? []).map((row) => ({
      ...row,
      ...plainDecimals(row),
      ends: endsByValue.get(row.id) ?? [],
    })),
    epochs: rowsOf(standard.epochs),
    programmes: rowsOf(standard.programmes),
    properties: rowsOf(standard.properties),
    duplicateIds: [...new Set((twins.get(standard.standardId) ?? []).map((row) => row.duplicateId))],
  }));
}

/** The other members of the same sets at the same nominal as these standards. */
export async function duplicatesOf(database: Sequelize, ids: string[]): Promise<string[]> {
  if (ids.length === 0) return [];
  const rows = await readRows<Duplicate>(database, DUPLICATES, { ids });
  return rows.map((row) => row.duplicateId);
}

/** What later acts may have added to these laboratories: scope lines, recognitions and authorisations. */
export async function laboratoryDossiers(database: Sequelize, ids: string[]): Promise<LaboratoryDossier[]> {
  if (ids.length === 0) return [];
  const [laboratories, scope, recognitions, authorisations] = await Promise.all([
    readRows<Pick<LaboratoryDossier, 'id' | 'code' | 'name' | 'kind'>>(database, LABORATORIES, { ids }),
    readRows<Of<StoredScopeLine, 'laboratoryId'>>(database, SCOPE, { ids }),
    readRows<Of<StoredRecognition, 'laboratoryId'>>(database, RECOGNITIONS, { ids }),
    readRows<Of<StoredAuthorisation, 'laboratoryId'>>(database, AUTHORISATIONS, { ids }),
  ]);
  const scopeOf = groupBy(scope, (row) => row.laboratoryId);
  const recognitionsOf = groupBy(recognitions, (row) => row.laboratoryId);
  const authorisationsOf = groupBy(authorisations, (row) => row.laboratoryId);
  return laboratories.map((laboratory) => ({
    ...laboratory,
    scope: scopeOf.get(laboratory.id) ?? [],
    recognitions: recognitionsOf.get(laboratory.id) ?? [],
    authorisations: authorisationsOf.get(laboratory.id) ?? [],
  }));
}

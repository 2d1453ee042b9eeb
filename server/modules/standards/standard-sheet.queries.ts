import type { Sequelize } from 'sequelize';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { knownAt } from '#server/db/in-force.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { notFound } from '#server/http/app-error.ts';
import { STATE_ON_DAY, STATE_SINCE } from '#server/db/value-state.ts';
import { standardRows, type StandardRecord } from './standard-rows.queries.ts';

type HistoryValue = StandardResponse['history'][number];

/** A value of the history before its change is worked out. */
export interface HistoryRecord extends Omit<HistoryValue, 'change' | 'issuer'> {
  calibrationId: string;
  issuerId: string;
  issuerCode: string;
  issuerName: string;
}

export interface StandardSheet {
  standard: StandardRecord;
  epochs: StandardResponse['epochs'];
  properties: StandardResponse['properties'];
  programme: Omit<NonNullable<StandardResponse['programme']>, 'dueOn' | 'laboratory'> | null;
  history: HistoryRecord[];
  leansOnThis: StandardResponse['leansOnThis'];
}

const HISTORY = `
  SELECT v.uid, v.revision_id AS revisionId, r.calibration_id AS calibrationId,
    c.certificate_no AS certificateNo, r.n AS revisionN, l.id AS issuerId, l.code AS issuerCode,
    l.name AS issuerName, v.quantity, v.medium, v.stage, e.n AS epochN, v.deviation, v.expanded_u AS expandedU,
    v.k, v.performed_end AS performedEnd, v.date_precision AS datePrecision, v.effective_from AS issuedOn,
    ${STATE_ON_DAY} AS state, ${STATE_SINCE} AS stateSince
  FROM assigned_value v
  JOIN revision r ON r.id = v.revision_id
  JOIN calibration c ON c.id = r.calibration_id
  JOIN laboratory l ON l.id = v.issuer_id
  JOIN epoch e ON e.id = v.epoch_id
  WHERE v.standard_id = :standardId AND v.recorded_at <= :knownAt
  ORDER BY v.performed_end, v.id`;

/** Of each kind of property, the assertion about the day that was recorded last. */
const PROPERTIES = `
  SELECT p.kind, p.value, p.expanded_u AS expandedU, p.k, p.origin, p.valid_from AS validFrom
  FROM property p
  WHERE p.standard_id = :standardId AND p.valid_from <= :day AND (p.valid_to IS NULL OR p.valid_to >= :day)
    AND NOT EXISTS (
      SELECT 1 FROM property x
      WHERE x.standard_id = p.standard_id AND x.kind = p.kind AND x.act_seq > p.act_seq
        AND x.valid_from <= :day AND (x.valid_to IS NULL OR x.valid_to >= :day))
  ORDER BY p.kind`;

const PROGRAMME = `
  SELECT p.interval_months AS intervalMonths, p.method, p.justification FROM programme p
  WHERE p.standard_id = :standardId AND p.laboratory_id = :holderId
    AND p.valid_from <= :day AND (p.valid_to IS NULL OR p.valid_to >= :day)
  ORDER BY p.act_seq DESC, p.id DESC LIMIT 1`;

/** Weights calibrated with this one: one step down, so that the count costs nothing on the top of a country. */
const LEANS_ON_THIS = `
  SELECT COUNT(DISTINCT c.standard_id) AS weights, COUNT(DISTINCT c.holder_id) AS laboratories,
    MAX(l.used_end) AS newestUse
  FROM assigned_value p
  JOIN value_link l ON l.parent_id = p.id AND l.role = 'reference'
  JOIN assigned_value c ON c.id = l.child_id
  WHERE p.standard_id = :standardId AND c.standard_id <> p.standard_id`;

/**
 * Everything on a standard's page, as it stands on the day.
 * @throws AppError `not-found`
 */
export async function standardSheet(
  database: Sequelize,
  standardId: string,
  day: string,
): Promise<StandardSheet> {
  const [standard] = await standardRows(database, [standardId], day);
  if (!standard) throw notFound('This standard');
  const asked = { standardId, day, knownAt: knownAt(day) };
  const [epochs, properties, programme, history, leansOnThis] = await Promise.all([
    readRows<StandardResponse['epochs'][number]>(
      database,
      `SELECT n, reason, begins_on AS beginsOn, last_good_on AS lastGoodOn, note FROM epoch
       WHERE standard_id = :standardId ORDER BY n`,
      asked,
    ),
    readRows<StandardResponse['properties'][number]>(database, PROPERTIES, asked),
    readRow<NonNullable<StandardSheet['programme']>>(database, PROGRAMME, {
      ...asked,
      holderId: standard.holder.id,
    }),
    readRows<HistoryRecord>(database, HISTORY, asked),
    readRow<StandardSheet['leansOnThis']>(database, LEANS_ON_THIS, asked),
  ]);
  return {
    standard,
    epochs,
    properties,
    programme,
    history,
    leansOnThis: leansOnThis ?? { weights: 0, laboratories: 0, newestUse: null },
  };
}

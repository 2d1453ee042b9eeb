import type { Sequelize } from 'sequelize';
import type { StandardRow } from '#shared/contracts/standards.ts';
import { IN_FORCE, knownAt } from '#server/db/in-force.ts';
import { readRows } from '#server/db/read.ts';
import { factOnDay } from './standard-laboratory.queries.ts';

/** A standard as lists and its own page show it. Decimals as the columns give them. */
export interface StandardRecord extends StandardRow {
  serial: string | null;
  manufacturer: string | null;
  shape: string;
  material: string;
  inServiceFrom: string | null;
  state: string;
}

const ROWS = `
  SELECT b.*, h.id AS holderId, h.code AS holderCode, h.name AS holderName, w.id AS setId,
    w.registry_no AS setRegistryNo, v.uid, v.revision_id AS revisionId, v.quantity, v.deviation,
    v.expanded_u AS expandedU, v.k, v.performed_end AS performedEnd, v.date_precision AS datePrecision,
    c.certificate_no AS certificateNo, DATE_ADD(v.performed_end, INTERVAL (
      SELECT p.interval_months FROM programme p
      WHERE p.standard_id = b.id AND p.laboratory_id = b.ownerId
        AND p.valid_from <= :day AND (p.valid_to IS NULL OR p.valid_to >= :day)
      ORDER BY p.act_seq DESC, p.id DESC LIMIT 1) MONTH) AS dueOn
  FROM (
    SELECT s.id, s.registry_no AS registryNo, s.kind, s.nominal, s.marking, s.serial, s.manufacturer, s.shape,
      s.material, s.in_service_from AS inServiceFrom,
      COALESCE(${factOnDay('owner', 's.id')}, s.laboratory_id) AS ownerId,
      ${factOnDay('class', 's.id')} AS class,
      COALESCE(${factOnDay('state', 's.id')}, 'in service') AS state,
      (SELECT m.set_id FROM set_member m
       WHERE m.standard_id = s.id AND m.valid_from <= :day AND (m.valid_to IS NULL OR m.valid_to >= :day)
       ORDER BY m.act_seq DESC LIMIT 1) AS memberOf,
      (SELECT v.id FROM assigned_value v WHERE v.standard_id = s.id AND ${IN_FORCE}
       ORDER BY v.performed_end DESC, v.quantity = 'conventional mass' DESC, v.id DESC LIMIT 1) AS valueId
    FROM standard s WHERE s.id IN (:ids)) b
  JOIN laboratory h ON h.id = b.ownerId
  LEFT JOIN weight_set w ON w.id = b.memberOf
  LEFT JOIN assigned_value v ON v.id = b.valueId
  LEFT JOIN revision r ON r.id = v.revision_id
  LEFT JOIN calibration c ON c.id = r.calibration_id`;

type Value = NonNullable<StandardRow['value']>;

interface Row extends Omit<StandardRecord, 'holder' | 'set' | 'value'> {
  holderId: string;
  holderCode: string;
  holderName: string;
  setId: string | null;
  setRegistryNo: string | null;
  uid: string | null;
  revisionId: string;
  quantity: Value['quantity'];
  deviation: string;
  expandedU: string | null;
  k: string | null;
  performedEnd: string;
  datePrecision: Value['datePrecision'];
  certificateNo: string;
}

/** The standards with these ids, in this order, with the value in force on the day and when the next is due. */
export async function standardRows(
  database: Sequelize,
  ids: readonly string[],
  day: string,
): Promise<StandardRecord[]> {
  if (ids.length === 0) return [];
  const rows = await readRows<Row>(database, ROWS, { ids, day, knownAt: knownAt(day) });
  const byId = new Map(rows.map((row) => [row.id, recordOf(row)]));
  return ids.flatMap((id) => byId.get(id) ?? []);
}

function recordOf(row: Row): StandardRecord {
  return {
    id: row.id,
    registryNo: row.registryNo,
    kind: row.kind,
    nominal: row.nominal,
    marking: row.marking,
    serial: row.serial,
    manufacturer: row.manufacturer,
    shape: row.shape,
    material: row.material,
    inServiceFrom: row.inServiceFrom,
    state: row.state,
    class: row.class,
    holder: { id: row.holderId, code: row.holderCode, name: row.holderName },
    set: row.setId && row.setRegistryNo ? { id: row.setId, registryNo: row.setRegistryNo } : null,
    value: row.uid === null ? null : valueOf(row, row.uid),
    dueOn: row.dueOn,
  };
}

function valueOf(row: Row, uid: string): Value {
  const { revisionId, quantity, deviation, expandedU, k, performedEnd, datePrecision, certificateNo } = row;
  return { uid, revisionId, quantity, deviation, expandedU, k, performedEnd, datePrecision, certificateNo };
}

import type { Sequelize } from 'sequelize';
import { readRows } from '#server/db/read.ts';

/** What the graph does not hold of a value and a page of rows needs. */
export interface RowDetails {
  id: number;
  uid: string;
  standardId: string;
  revisionId: string;
  registryNo: string;
  marking: string;
  nominal: string;
  class: string | null;
  holderId: string;
  issuerId: string;
  certificateNo: string;
  quantity: 'mass' | 'conventional mass';
  deviation: string;
  expandedU: string | null;
  k: string | null;
  performedEnd: string;
  datePrecision: 'day' | 'month' | 'year';
  issuedOn: string;
}

/** A laboratory as rows and groups name it. */
export interface NamedLaboratory {
  id: string;
  code: string;
  name: string;
}

/** Details by value id. */
export async function rowDetails(
  database: Sequelize,
  ids: readonly number[],
): Promise<Map<number, RowDetails>> {
  if (ids.length === 0) return new Map();
  const rows = await readRows<RowDetails>(
    database,
    `SELECT v.id, v.uid, v.standard_id AS standardId, v.revision_id AS revisionId, s.registry_no AS registryNo,
       s.marking, v.nominal, v.class, v.holder_id AS holderId, v.issuer_id AS issuerId,
       c.certificate_no AS certificateNo, v.quantity, v.deviation, v.expanded_u AS expandedU, v.k,
       v.performed_end AS performedEnd, v.date_precision AS datePrecision, v.effective_from AS issuedOn
     FROM assigned_value v
     JOIN standard s ON s.id = v.standard_id
     JOIN revision r ON r.id = v.revision_id
     JOIN calibration c ON c.id = r.calibration_id
     WHERE v.id IN (:ids)`,
    { ids },
  );
  return new Map(rows.map((row) => [row.id, row]));
}

/** Laboratories by id. */
export async function laboratoriesById(
  database: Sequelize,
  ids: Iterable<string>,
): Promise<Map<string, NamedLaboratory>> {
  const wanted = [...new Set(ids)];
  if (wanted.length === 0) return new Map();
  const rows = await readRows<NamedLaboratory>(
    database,
    'SELECT id, code, name FROM laboratory WHERE id IN (:wanted)',
    { wanted },
  );
  return new Map(rows.map((row) => [row.id, row]));
}

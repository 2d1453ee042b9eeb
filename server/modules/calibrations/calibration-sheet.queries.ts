import type { CalibrationResponse } from '#shared/contracts/calibrations.ts';
import type { z } from 'zod';
import type { Sequelize } from 'sequelize';
import { knownAt } from '#server/db/in-force.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { STATE_ON_DAY, STATE_REASON, STATE_SINCE } from '#server/db/value-state.ts';
import { notFound } from '#server/http/app-error.ts';
import { CALIBRATION_ROW, type CalibrationRecord } from './calibration-list.queries.ts';

type Response = z.infer<typeof CalibrationResponse>;
type Line = Response['lines'][number];

export interface SheetHead extends CalibrationRecord {
  method: string;
  decisionRule: Response['calibration']['decisionRule'];
  registeredById: string;
  registeredByCode: string;
  registeredByName: string;
  signatory: string | null;
  reason: string | null;
  documentId: string | null;
  documentName: string | null;
  documentSize: number | null;
  contentSha256: string;
  recordedAt: Date;
}

export interface SheetLine extends Omit<
  Line,
  'standard' | 'holder' | 'references' | 'components' | 'underAccreditation' | 'newer'
> {
  id: number;
  standardId: string;
  registryNo: string;
  marking: string;
  nominal: string;
  holderId: string;
  holderCode: string;
  holderName: string;
  underAccreditation: number;
}

export type SheetReference = Line['references'][number] & { childId: number };
export type SheetComponent = NonNullable<Line['components']>[number] & { valueId: number };

/** A later certificate in force beside a line of this one. */
export interface SheetNewer {
  lineId: number;
  revisionId: string;
  certificateNo: string;
}

export interface CalibrationSheet {
  head: SheetHead;
  revisions: Response['revisions'];
  lines: SheetLine[];
  references: SheetReference[];
  components: SheetComponent[];
  /** In the order of determination. */
  newer: SheetNewer[];
}

const HEAD = `
  SELECT ${CALIBRATION_ROW}, r.method, r.decision_rule AS decisionRule, r.reason,
    g.id AS registeredById, g.code AS registeredByCode, g.name AS registeredByName, a.name AS signatory,
    d.id AS documentId, d.name AS documentName, d.size AS documentSize, r.content_sha256 AS contentSha256,
    r.recorded_at AS recordedAt
  FROM revision r
  JOIN calibration c ON c.id = r.calibration_id
  JOIN laboratory l ON l.id = c.laboratory_id
  JOIN laboratory g ON g.id = c.registered_by_id
  LEFT JOIN account a ON a.id = r.signatory_id
  LEFT JOIN document d ON d.id = r.document_id
  WHERE r.id = :revisionId`;

const LINES = `
  SELECT v.id, v.uid, v.line, s.id AS standardId, s.registry_no AS registryNo, s.marking, v.nominal,
    h.id AS holderId, h.code AS holderCode, h.name AS holderName, v.quantity, v.medium, v.stage, v.deviation,
    v.reported_unit AS reportedUnit, v.reported_decimals AS reportedDecimals,
    v.reported_u_decimals AS reportedUDecimals, v.expanded_u AS expandedU, v.k,
    v.coverage, v.class, v.under_accreditation AS underAccreditation,
    ${STATE_ON_DAY} AS state, ${STATE_SINCE} AS stateSince,
    ${STATE_REASON} AS stateReason
  FROM assigned_value v
  JOIN standard s ON s.id = v.standard_id
  JOIN laboratory h ON h.id = v.holder_id
  WHERE v.revision_id = :revisionId ORDER BY v.line`;

const REFERENCES = `
  SELECT k.child_id AS childId, v.uid AS valueUid, s.registry_no AS registryNo,
    c.certificate_no AS certificateNo, k.used_as AS usedAs, k.sensitivity, k.used_begin AS usedBegin,
    k.used_end AS usedEnd, ${STATE_ON_DAY} AS state
  FROM assigned_value o
  JOIN value_link k ON k.child_id = o.id
  JOIN assigned_value v ON v.id = k.parent_id
  JOIN standard s ON s.id = v.standard_id
  JOIN revision r ON r.id = v.revision_id
  JOIN calibration c ON c.id = r.calibration_id
  WHERE o.revision_id = :revisionId ORDER BY k.child_id, k.role, k.parent_id`;

const COMPONENTS = `
  SELECT m.value_id AS valueId, m.name, m.evaluation, m.u AS standardUncertainty, m.sensitivity
  FROM assigned_value o JOIN component m ON m.value_id = o.id
  WHERE o.revision_id = :revisionId ORDER BY m.value_id, m.n`;

const NEWER = `
  SELECT o.id AS lineId, v.revision_id AS revisionId, c.certificate_no AS certificateNo, ${STATE_ON_DAY} AS state
  FROM assigned_value o
  JOIN assigned_value v ON v.standard_id = o.standard_id AND v.quantity = o.quantity
    AND v.performed_end > o.performed_end
  JOIN revision r ON r.id = v.revision_id
  JOIN calibration c ON c.id = r.calibration_id
  WHERE o.revision_id = :revisionId AND v.recorded_at <= :knownAt
  HAVING state = 'in force' ORDER BY v.performed_end, v.id`;

/**
 * Everything on the sheet of one revision, as it stands on the day.
 * @throws AppError `not-found`
 */
export async function calibrationSheet(
  database: Sequelize,
  revisionId: string,
  day: string,
): Promise<CalibrationSheet> {
  const asked = { revisionId, day, knownAt: knownAt(day) };
  const head = await readRow<SheetHead>(database, HEAD, asked);
  if (!head) throw notFound('This calibration');
  const [revisions, lines, references, components, newer] = await Promise.all([
    readRows<Response['revisions'][number]>(
      database,
      `SELECT id AS revisionId, n, issued_on AS issuedOn, reason FROM revision
       WHERE calibration_id = :calibrationId ORDER BY n`,
      { calibrationId: head.calibrationId },
    ),
    readRows<SheetLine>(database, LINES, asked),
    readRows<SheetReference>(database, REFERENCES, asked),
    readRows<SheetComponent>(database, COMPONENTS, asked),
    readRows<SheetNewer>(database, NEWER, asked),
  ]);
  return { head, revisions, lines, references, components, newer };
}

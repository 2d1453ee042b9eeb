import type { AuditCount, AuditFigures, AuditSummary } from '#shared/contracts/audits.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { cursorAfter, placeOf } from '#server/http/cursor.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { readableLaboratoryIds } from '#server/policy/user.ts';

const PAGE = 50;

/** A summary as it is read: the names beside the ids. */
interface SummaryRow {
  id: string;
  scope: 'value' | 'laboratory' | 'network';
  valueUid: string | null;
  registryNo: string | null;
  certificateNo: string | null;
  laboratoryId: string | null;
  laboratoryCode: string | null;
  laboratoryName: string | null;
  day: string;
  known: string;
  askedBy: string;
  askedAt: string;
  state: AuditSummary['state'];
  done: number;
  total: number | null;
  counts: string | null;
}

const SUMMARY = `
  SELECT j.id, j.scope, j.value_uid AS valueUid, s.registry_no AS registryNo, c.certificate_no AS certificateNo,
    j.laboratory_id AS laboratoryId, l.code AS laboratoryCode, l.name AS laboratoryName, j.day, j.known,
    a.name AS askedBy, DATE_FORMAT(j.asked_at, '%Y-%m-%dT%H:%i:%s.%fZ') AS askedAt, j.state, j.done, j.total, r.counts
  FROM audit_job j
  JOIN account a ON a.id = j.asked_by
  LEFT JOIN audit_run r ON r.id = j.id
  LEFT JOIN laboratory l ON l.id = j.laboratory_id
  LEFT JOIN assigned_value v ON v.uid = j.value_uid
  LEFT JOIN standard s ON s.id = v.standard_id
  LEFT JOIN revision x ON x.id = v.revision_id
  LEFT JOIN calibration c ON c.id = x.calibration_id`;

/**
 * The audits in a person's reach, newest first: of laboratories they read in full, of chains they asked about, and for
 * the registrar all.
 */
export async function auditList(
  context: SignedInContext,
  cursor: string | undefined,
): Promise<{ audits: AuditSummary[]; nextCursor: string | null }> {
  const laboratoryIds = readableLaboratoryIds(context.user);
  const place = placeOf(cursor, 'asked');
  const reach =
    laboratoryIds === null
      ? 'TRUE'
      : `((j.scope = 'laboratory' AND j.laboratory_id IN (:laboratoryIds))
          OR (j.scope = 'value' AND j.asked_by = :accountId))`;
  const after = place ? 'AND (j.asked_at, j.id) < (:askedAt, :id)' : '';
  const rows = await readRows<SummaryRow>(
    context.database,
    `${SUMMARY} WHERE ${reach} ${after} ORDER BY j.asked_at DESC, j.id DESC LIMIT ${PAGE + 1}`,
    {
      laboratoryIds: laboratoryIds?.length ? laboratoryIds : [''],
      accountId: context.user.accountId,
      askedAt: place?.value ?? '',
      id: place?.id ?? '',
    },
  );
  const shown = rows.slice(0, PAGE);
  const last = rows.length > PAGE ? shown.at(-1)! : null;
  return {
    audits: shown.map(summaryOf),
    nextCursor: last && cursorAfter('asked', { value: sqlInstant(last.askedAt), id: last.id }),
  };
}

/** One audit in the same words. */
export async function auditSummary({ database }: SignedInContext, id: string): Promise<AuditSummary> {
  return summaryOf((await readRow<SummaryRow>(database, `${SUMMARY} WHERE j.id = :id`, { id }))!);
}

/** Laboratories that a person may have audited. */
export async function auditableLaboratories(
  context: SignedInContext,
): Promise<{ id: string; code: string; name: string }[]> {
  const ids = readableLaboratoryIds(context.user);
  if (ids?.length === 0) return [];
  return readRows(
    context.database,
    `SELECT id, code, name FROM laboratory ${ids ? 'WHERE id IN (:ids)' : ''} ORDER BY name`,
    { ids: ids ?? [] },
  );
}

/** Failing findings by severity, and those that cannot be judged. */
export function figuresOf(counts: readonly AuditCount[]): AuditFigures {
  const figures = { block: 0, critical: 0, major: 0, minor: 0, information: 0, notJudged: 0 };
  for (const { outcome, severity, count } of counts) {
    if (outcome === 'fails') figures[severity] += count;
    if (outcome === 'cannot be judged') figures.notJudged += count;
  }
  return figures;
}

function summaryOf(row: SummaryRow): AuditSummary {
  const { id, day, known, askedBy, askedAt, state, done, total, counts } = row;
  const figures = counts === null ? null : figuresOf(JSON.parse(counts) as AuditCount[]);
  return { id, subject: subjectOf(row), day, known, askedBy, askedAt, state, done, total, figures };
}

function subjectOf(row: SummaryRow): AuditSummary['subject'] {
  if (row.scope === 'network') return { scope: 'network' };
  if (row.scope === 'value') {
    return {
      scope: 'value',
      valueUid: row.valueUid!,
      registryNo: row.registryNo!,
      certificateNo: row.certificateNo!,
    };
  }
  const laboratory = { id: row.laboratoryId!, code: row.laboratoryCode!, name: row.laboratoryName! };
  return { scope: 'laboratory', laboratory };
}

function sqlInstant(instant: string): string {
  return instant.replace('T', ' ').replace('Z', '');
}

import type { Sequelize } from 'sequelize';
import type { AuditCount, AuditFigures } from '#shared/contracts/audits.ts';
import { readRows } from '#server/db/read.ts';
import { figuresOf } from './audit-list.queries.ts';

/** The newest finished audit of a laboratory, or of the network. */
export interface NewestAudit {
  id: string;
  /** Null: the whole network. */
  laboratory: { id: string; code: string; name: string } | null;
  day: string;
  endedAt: string;
  figures: AuditFigures;
}

/** The newest finished audit of each of some laboratories, and of the network where it is wanted. */
export async function newestAudits(
  database: Sequelize,
  laboratoryIds: readonly string[],
  withNetwork: boolean,
): Promise<NewestAudit[]> {
  const rows = await readRows<{
    id: string;
    laboratoryId: string | null;
    code: string;
    name: string;
    day: string;
    endedAt: string;
    counts: string;
  }>(
    database,
    `SELECT r.id, l.id AS laboratoryId, l.code, l.name, r.day, r.counts,
       DATE_FORMAT(r.ended_at, '%Y-%m-%dT%H:%i:%s.%fZ') AS endedAt
     FROM (
       SELECT MAX(act_seq) AS act_seq FROM audit_run
       WHERE laboratory_id IN (:laboratoryIds) AND scope = 'laboratory' GROUP BY laboratory_id
       UNION SELECT MAX(act_seq) FROM audit_run WHERE scope = 'network' AND :withNetwork) newest
     JOIN audit_run r ON r.act_seq = newest.act_seq
     LEFT JOIN laboratory l ON l.id = r.laboratory_id
     ORDER BY l.name`,
    { laboratoryIds: laboratoryIds.length > 0 ? laboratoryIds : [''], withNetwork },
  );
  return rows.map(({ id, laboratoryId, code, name, day, endedAt, counts }) => ({
    id,
    laboratory: laboratoryId === null ? null : { id: laboratoryId, code, name },
    day,
    endedAt,
    figures: figuresOf(JSON.parse(counts) as AuditCount[]),
  }));
}

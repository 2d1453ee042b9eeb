import type { z } from 'zod';
import type { DraftSummary } from '#shared/contracts/drafts.ts';
import type { Sequelize } from 'sequelize';
import { readRows } from '#server/db/read.ts';

const SHOWN = 50;

type Summary = z.infer<typeof DraftSummary>;

interface Row extends Omit<Summary, 'laboratory' | 'updatedAt'> {
  laboratoryId: string;
  laboratoryCode: string;
  laboratoryName: string;
  updatedAt: Date;
}

/** Drafts of these laboratories that are still open or wait for a signature, newest first. */
export async function openDrafts(
  database: Sequelize,
  laboratoryIds: readonly string[],
  states: readonly ('open' | 'sent to sign')[] = ['open', 'sent to sign'],
): Promise<Summary[]> {
  if (laboratoryIds.length === 0) return [];
  const rows = await readRows<Row>(
    database,
    `SELECT d.id, d.state, d.updated_at AS updatedAt, a.name AS updatedBy, l.id AS laboratoryId,
       l.code AS laboratoryCode, l.name AS laboratoryName, i.name AS issuerName,
       COALESCE(JSON_VALUE(d.content, '$.certificateNo'), '') AS certificateNo,
       COALESCE(JSON_LENGTH(d.content, '$.lines'), 0) AS \`lines\`
     FROM calibration_draft d
     JOIN laboratory l ON l.id = d.laboratory_id
     JOIN account a ON a.id = d.updated_by
     LEFT JOIN laboratory i ON i.id = JSON_VALUE(d.content, '$.issuerId')
     WHERE d.laboratory_id IN (:laboratoryIds) AND d.state IN (:states)
     ORDER BY d.updated_at DESC, d.id DESC LIMIT ${SHOWN}`,
    { laboratoryIds, states },
  );
  return rows.map(({ laboratoryId, laboratoryCode, laboratoryName, updatedAt, ...row }) => ({
    ...row,
    laboratory: { id: laboratoryId, code: laboratoryCode, name: laboratoryName },
    updatedAt: updatedAt.toISOString(),
  }));
}

import type { DeskResponse } from '#shared/contracts/desk.ts';
import type { Sequelize } from 'sequelize';
import { readRows } from '#server/db/read.ts';

type Draft = DeskResponse['drafts'][number];

/** Rows shown of one list; the list's own page has the rest. */
const SHOWN = 50;

/** Drafts of some laboratories in one state, newest first. */
export async function deskDrafts(
  database: Sequelize,
  laboratoryIds: readonly string[],
  state: 'open' | 'sent to sign',
): Promise<Draft[]> {
  if (laboratoryIds.length === 0) return [];
  const rows = await readRows<Omit<Draft, 'laboratory' | 'updatedAt'> & DraftColumns>(
    database,
    `SELECT d.id, d.state, d.updated_at AS changedAt, a.name AS updatedBy, i.name AS issuerName,
            l.id AS laboratoryId, l.code AS laboratoryCode, l.name AS laboratoryName,
            COALESCE(JSON_VALUE(d.content, '$.certificateNo'), '') AS certificateNo,
            COALESCE(JSON_LENGTH(d.content, '$.lines'), 0) AS \`lines\`
     FROM calibration_draft d
     JOIN laboratory l ON l.id = d.laboratory_id
     JOIN account a ON a.id = d.updated_by
     LEFT JOIN laboratory i ON i.id = JSON_VALUE(d.content, '$.issuerId')
     WHERE d.laboratory_id IN (:laboratoryIds) AND d.state = :state
     ORDER BY d.updated_at DESC LIMIT ${SHOWN}`,
    { laboratoryIds, state },
  );
  return rows.map(({ laboratoryId, laboratoryCode, laboratoryName, changedAt, ...draft }) => ({
    ...draft,
    laboratory: { id: laboratoryId, code: laboratoryCode, name: laboratoryName },
    updatedAt: changedAt.toISOString(),
  }));
}

interface DraftColumns {
  changedAt: Date;
  laboratoryId: string;
  laboratoryCode: string;
  laboratoryName: string;
}

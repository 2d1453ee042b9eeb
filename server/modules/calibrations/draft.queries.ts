import type { Sequelize } from 'sequelize';
import { DraftContent } from '#shared/contracts/drafts.ts';
import { readRow } from '#server/db/read.ts';

export type DraftState = 'open' | 'sent to sign' | 'issued' | 'discarded';

export interface DraftRow {
  id: string;
  version: number;
  state: DraftState;
  laboratory: { id: string; code: string; name: string };
  content: DraftContent;
  revisionId: string | null;
  updatedAt: string;
  updatedBy: string;
}

interface StoredDraft extends Omit<DraftRow, 'content' | 'laboratory' | 'updatedAt'> {
  laboratoryId: string;
  laboratoryCode: string;
  laboratoryName: string;
  content: unknown;
  updatedAt: Date;
}

/** A draft as it stands; null where there is none. With `isLocked` nobody else writes it before the transaction ends. */
export async function draftById(
  database: Sequelize,
  id: string,
  { isLocked = false } = {},
): Promise<DraftRow | null> {
  if (isLocked) {
    await readRow(database, 'SELECT id FROM calibration_draft WHERE id = :id FOR UPDATE', { id });
  }
  const row = await readRow<StoredDraft>(
    database,
    `SELECT d.id, d.version, d.state, d.laboratory_id AS laboratoryId, l.code AS laboratoryCode,
       l.name AS laboratoryName, d.content, d.revision_id AS revisionId, d.updated_at AS updatedAt,
       a.name AS updatedBy
     FROM calibration_draft d
     JOIN laboratory l ON l.id = d.laboratory_id
     JOIN account a ON a.id = d.updated_by
     WHERE d.id = :id`,
    { id },
  );
  if (!row) return null;
  const { laboratoryId, laboratoryCode, laboratoryName, content, updatedAt, ...rest } = row;
  return {
    ...rest,
    laboratory: { id: laboratoryId, code: laboratoryCode, name: laboratoryName },
    // The connector parses JSON columns by their metadata; text is what remains where a server sends none.
    content: DraftContent.parse(typeof content === 'string' ? JSON.parse(content) : content),
    updatedAt: updatedAt.toISOString(),
  };
}

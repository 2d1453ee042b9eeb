import type { Sequelize } from 'sequelize';
import { readRow, readRows } from '#server/db/read.ts';
import type { DocumentRow } from './document.model.ts';

const COLUMNS = 'id, sha256, media_type AS mediaType, size, name, laboratory_id AS laboratoryId';

/** A document by its identifier; null where there is none. */
export function documentById(database: Sequelize, id: string): Promise<DocumentRow | null> {
  return readRow<DocumentRow>(database, `SELECT ${COLUMNS} FROM document WHERE id = :id`, { id });
}

/** The document of a laboratory that has this content. */
export function documentByContent(
  database: Sequelize,
  sha256: string,
  laboratoryId: string,
): Promise<DocumentRow | null> {
  return readRow<DocumentRow>(
    database,
    `SELECT ${COLUMNS} FROM document WHERE sha256 = :sha256 AND laboratory_id = :laboratoryId`,
    { sha256, laboratoryId },
  );
}

/** The laboratories whose document it is: who keeps it, and of a certificate its issuer and who registered it. */
export async function laboratoriesOfDocument(database: Sequelize, document: DocumentRow): Promise<string[]> {
  const rows = await readRows<{ issuerId: string; registeredById: string }>(
    database,
    `SELECT DISTINCT c.laboratory_id AS issuerId, c.registered_by_id AS registeredById
     FROM revision r JOIN calibration c ON c.id = r.calibration_id
     WHERE r.document_id = :id`,
    { id: document.id },
  );
  return [...new Set([document.laboratoryId, ...rows.flatMap((row) => [row.issuerId, row.registeredById])])];
}

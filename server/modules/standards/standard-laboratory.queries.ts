import type { Sequelize } from 'sequelize';
import { readRow } from '#server/db/read.ts';
import { notFound } from '#server/http/app-error.ts';

/** The fact of one kind that holds on `:day`: of the assertions that cover it, the one recorded last. */
export function factOnDay(kind: 'owner' | 'custodian' | 'class' | 'state', standard: string): string {
  const column = kind === 'owner' || kind === 'custodian' ? 'laboratory_id' : 'value';
  return `(SELECT f.${column} FROM standard_fact f
    WHERE f.standard_id = ${standard} AND f.kind = '${kind}'
      AND f.valid_from <= :day AND (f.valid_to IS NULL OR f.valid_to >= :day)
    ORDER BY f.act_seq DESC LIMIT 1)`;
}

/** What policies ask about a standard. */
export interface StandardSubject {
  standardId: string;
  registryNo: string;
  nominal: string;
  /** Owner on the day; the registering laboratory where nothing else is asserted. */
  ownerId: string;
  custodianId: string;
}

/**
 * Whose standard it is on a day.
 * @throws AppError `not-found`
 */
export async function standardSubject(
  database: Sequelize,
  standardId: string,
  day: string,
): Promise<StandardSubject> {
  const row = await readRow<StandardSubject>(
    database,
    `SELECT s.id AS standardId, s.registry_no AS registryNo, s.nominal,
            COALESCE(${factOnDay('owner', 's.id')}, s.laboratory_id) AS ownerId,
            COALESCE(${factOnDay('custodian', 's.id')}, s.laboratory_id) AS custodianId
     FROM standard s WHERE s.id = :standardId`,
    { standardId, day },
  );
  if (!row) throw notFound('This standard');
  return row;
}

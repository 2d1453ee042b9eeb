import type { Sequelize } from 'sequelize';
import { readRow } from '#server/db/read.ts';

/** Addresses in the demo network that screens are looked at with. */
export interface DemoPlaces {
  laboratoryId: string;
  setMemberId: string;
  /** A weight with the longest history of the laboratory. */
  standardId: string;
  revisionId: string;
  /** The value of the laboratory that leans on the most steps below it being in force. */
  valueUid: string;
  /** The notice in force. */
  noticeId: string;
}

/** The laboratory whose people look: Port Alder Calibration. */
export const LOOKING_LABORATORY = 'PA';
export const LOOKING_METROLOGIST = 'metrologist@portalder.example';

/** Chooses the same places of the same register every time. */
export async function demoPlaces(database: Sequelize): Promise<DemoPlaces> {
  const laboratory = await row<{ id: string }>(
    database,
    'SELECT id FROM laboratory WHERE code = :code',
    LOOKING_LABORATORY,
  );
  const standard = await row<{ id: string }>(
    database,
    `SELECT s.id FROM standard s JOIN assigned_value v ON v.standard_id = s.id JOIN laboratory l ON l.id = v.holder_id
     WHERE l.code = :code GROUP BY s.id, s.registry_no ORDER BY COUNT(*) DESC, s.registry_no LIMIT 1`,
    LOOKING_LABORATORY,
  );
  const member = await row<{ id: string }>(
    database,
    `SELECT s.id FROM set_member m JOIN standard s ON s.id = m.standard_id JOIN assigned_value v ON v.standard_id = s.id
     JOIN laboratory l ON l.id = v.holder_id WHERE l.code = :code ORDER BY s.registry_no LIMIT 1`,
    LOOKING_LABORATORY,
  );
  const value = await row<{ uid: string; revisionId: string }>(
    database,
    `SELECT v.uid, v.revision_id AS revisionId FROM assigned_value v JOIN laboratory l ON l.id = v.holder_id
     WHERE l.code = :code AND NOT EXISTS (SELECT 1 FROM value_end e WHERE e.value_id = v.id)
     ORDER BY (SELECT COUNT(*) FROM value_link k WHERE k.child_id = v.id) DESC, v.effective_from DESC, v.id LIMIT 1`,
    LOOKING_LABORATORY,
  );
  const notice = await row<{ id: string }>(
    database,
    'SELECT id FROM notice WHERE effective_on <= CURRENT_DATE ORDER BY effective_on LIMIT 1',
    LOOKING_LABORATORY,
  );
  return {
    laboratoryId: laboratory.id,
    standardId: standard.id,
    setMemberId: member.id,
    revisionId: value.revisionId,
    valueUid: value.uid,
    noticeId: notice.id,
  };
}

async function row<Row extends object>(database: Sequelize, sql: string, code: string): Promise<Row> {
  const found = await readRow<Row>(database, sql, { code });
  if (!found) throw new Error(`The demo network holds nothing for: ${sql}`);
  return found;
}

import type { DeskResponse } from '#shared/contracts/desk.ts';
import type { Sequelize } from 'sequelize';
import { IN_FORCE } from '#server/db/in-force.ts';
import { readRows } from '#server/db/read.ts';
import { factOnDay } from '#server/modules/standards/index.ts';

type Due = DeskResponse['due'][number];

const DAYS_AHEAD = 60;
const SHOWN = 50;

/** The programme of `l` for `s` on the day: of the assertions that cover it, the one recorded last. */
const IS_LATEST = `
  NOT EXISTS (
    SELECT 1 FROM programme later
    WHERE later.laboratory_id = p.laboratory_id AND later.standard_id = p.standard_id
      AND (later.act_seq > p.act_seq OR (later.act_seq = p.act_seq AND later.id > p.id))
      AND later.valid_from <= :day AND (later.valid_to IS NULL OR later.valid_to >= :day))`;

/**
 * Standards in service of some laboratories whose calibration is due within 60 days or overdue, by the
 * laboratory's own programme, the longest overdue first. A standard without a value in force has no due day.
 */
export async function deskDue(
  database: Sequelize,
  laboratoryIds: readonly string[],
  day: string,
  knownAt: string,
): Promise<Due[]> {
  if (laboratoryIds.length === 0) return [];
  const rows = await readRows<
    Omit<Due, 'holder'> & { holderId: string; holderCode: string; holderName: string }
  >(
    database,
    `SELECT s.id AS standardId, s.registry_no AS registryNo, s.marking, d.lastCalibrated, d.dueOn,
            l.id AS holderId, l.code AS holderCode, l.name AS holderName
     FROM (
       SELECT p.standard_id, p.laboratory_id, MAX(v.performed_end) AS lastCalibrated,
              DATE_ADD(MAX(v.performed_end), INTERVAL p.interval_months MONTH) AS dueOn
       FROM programme p
       JOIN assigned_value v ON v.standard_id = p.standard_id AND ${IN_FORCE}
       WHERE p.laboratory_id IN (:laboratoryIds)
         AND p.valid_from <= :day AND (p.valid_to IS NULL OR p.valid_to >= :day) AND ${IS_LATEST}
       GROUP BY p.id
       HAVING dueOn <= DATE_ADD(:day, INTERVAL ${DAYS_AHEAD} DAY)) d
     JOIN standard s ON s.id = d.standard_id
     JOIN laboratory l ON l.id = d.laboratory_id
     WHERE COALESCE(${factOnDay('state', 's.id')}, 'in service') = 'in service'
       AND COALESCE(${factOnDay('custodian', 's.id')}, s.laboratory_id) = d.laboratory_id
     ORDER BY d.dueOn, s.registry_no LIMIT ${SHOWN}`,
    { laboratoryIds, day, knownAt },
  );
  return rows.map(({ holderId, holderCode, holderName, ...due }) => ({
    ...due,
    holder: { id: holderId, code: holderCode, name: holderName },
  }));
}

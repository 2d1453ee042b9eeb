import type { LaboratoryListResponse } from '#shared/contracts/network.ts';
import type { z } from 'zod';
import type { Sequelize } from 'sequelize';
import { readRows } from '#server/db/read.ts';
import { standingOn } from './standing.ts';

type Summary = z.input<typeof LaboratoryListResponse>['laboratories'][number];

/** A laboratory may stand under several recognitions; the best of them is its standing. */
const BEST_FIRST = "FIELD(state, 'granted', 'suspended', 'withdrawn')";

const SUMMARY = `
  WITH recognised AS (
    SELECT r.laboratory_id, r.state, r.body,
           ROW_NUMBER() OVER (PARTITION BY r.laboratory_id ORDER BY ${BEST_FIRST}, r.id) AS best
    FROM (${standingOn('recognition', 'a.laboratory_id, a.kind')}) r),
  scope AS (
    SELECT s.laboratory_id, COUNT(*) AS scopeLines
    FROM (${standingOn('scope_line', 'a.laboratory_id, a.line')}) s
    WHERE s.state = 'granted' GROUP BY s.laboratory_id)
  SELECT l.id, l.code, l.name, l.kind, l.country, l.place, COALESCE(r.state, 'none') AS recognition,
         r.body AS recognitionBody, COALESCE(s.scopeLines, 0) AS scopeLines
  FROM laboratory l
  LEFT JOIN recognised r ON r.laboratory_id = l.id AND r.best = 1
  LEFT JOIN scope s ON s.laboratory_id = l.id`;

/** Every laboratory with its standing on a day: the national institute first, then by name. */
export function laboratoryList(database: Sequelize, day: string): Promise<Summary[]> {
  return readRows<Summary>(
    database,
    `${SUMMARY} ORDER BY l.kind = 'national institute' DESC, l.kind = 'external institute', l.name, l.id`,
    { day },
  );
}

/** One laboratory with its standing on a day; null where there is none. */
export async function laboratorySummary(
  database: Sequelize,
  id: string,
  day: string,
): Promise<Summary | null> {
  const [row] = await readRows<Summary>(database, `${SUMMARY} WHERE l.id = :id`, { day, id });
  return row ?? null;
}

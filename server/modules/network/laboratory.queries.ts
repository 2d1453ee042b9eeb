import type { LaboratoryResponse } from '#shared/contracts/network.ts';
import type { z } from 'zod';
import type { Sequelize } from 'sequelize';
import { readRows } from '#server/db/read.ts';
import { laboratorySummary } from './laboratory-list.queries.ts';
import { standingOn } from './standing.ts';

type Response = z.input<typeof LaboratoryResponse>;
export type LaboratoryDetail = Omit<Response, 'people' | 'abilities'>;
type People = NonNullable<Response['people']>;

/** A laboratory with the recognitions and scope lines that stand on a day; null where there is none. */
export async function laboratoryDetail(
  database: Sequelize,
  id: string,
  day: string,
): Promise<LaboratoryDetail | null> {
  const laboratory = await laboratorySummary(database, id, day);
  if (!laboratory) return null;
  const [recognitions, scope] = await Promise.all([
    readRows<Response['recognitions'][number]>(
      database,
      `SELECT kind, body, number, arrangement, state, valid_from AS validFrom, valid_to AS validTo
       FROM (${standingOn('recognition', 'a.laboratory_id, a.kind')}) r
       WHERE laboratory_id = :id ORDER BY kind`,
      { day, id },
    ),
    readRows<Response['scope'][number]>(
      database,
      `SELECT line, quantity, CAST(nominal_from AS CHAR) AS nominalFrom, CAST(nominal_to AS CHAR) AS nominalTo,
              method, CAST(best_u_constant AS CHAR) AS bestUConstant, best_u_relative AS bestURelative,
              CAST(k AS CHAR) AS k, CAST(coverage AS CHAR) AS coverage, state,
              valid_from AS validFrom, valid_to AS validTo
       FROM (${standingOn('scope_line', 'a.laboratory_id, a.line')}) s
       WHERE laboratory_id = :id ORDER BY line`,
      { day, id },
    ),
  ]);
  return { laboratory, recognitions, scope };
}

/** Who holds which role in a laboratory on a day, its assessors included. */
export function laboratoryPeople(database: Sequelize, id: string, day: string): Promise<People> {
  return readRows<People[number]>(
    database,
    `SELECT m.account_id AS accountId, p.name, m.role, m.valid_from AS validFrom, m.valid_to AS validTo
     FROM (${standingOn('membership', 'a.account_id, a.role, a.laboratory_id')}) m
     JOIN account p ON p.id = m.account_id
     WHERE m.laboratory_id = :id AND m.state = 'granted' ORDER BY p.name, m.role`,
    { day, id },
  );
}

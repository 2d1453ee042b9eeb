import type { Sequelize } from 'sequelize';
import { readRow } from '#server/db/read.ts';
import type { AuditQuestion } from './audit-question.ts';

/** A finished audit as it is stored; instants as ISO text. */
export interface AuditRun extends AuditQuestion {
  id: string;
  ruleSet: string;
  engine: string;
  beganAt: string;
  endedAt: string;
  chains: number;
  values: number;
  links: number;
  findings: number;
  /** JSON text. */
  counts: string;
  /** JSON text. */
  rules: string;
  resultSha256: string;
  factsSha256: string;
  actSeq: number;
}

const INSTANT = (column: string) => `DATE_FORMAT(${column}, '%Y-%m-%dT%H:%i:%s.%fZ')`;

/** The run of an audit; null until it is done. */
export function auditRun(database: Sequelize, id: string): Promise<AuditRun | null> {
  return readRow<AuditRun>(
    database,
    `SELECT id, scope, value_uid AS valueUid, laboratory_id AS laboratoryId, day, known, as_of AS asOf,
       as_of_act AS asOfAct, rule_set AS ruleSet, engine, ${INSTANT('began_at')} AS beganAt,
       ${INSTANT('ended_at')} AS endedAt, chains, value_count AS \`values\`, link_count AS links,
       finding_count AS findings, counts, rules, result_sha256 AS resultSha256, facts_sha256 AS factsSha256,
       act_seq AS actSeq
     FROM audit_run WHERE id = :id`,
    { id },
  );
}

/** The newest audit that repeats another, whatever became of it; null: none. */
export async function newestRepeat(database: Sequelize, id: string): Promise<string | null> {
  const row = await readRow<{ id: string }>(
    database,
    'SELECT id FROM audit_job WHERE repeat_of = :id ORDER BY asked_at DESC, id DESC LIMIT 1',
    { id },
  );
  return row?.id ?? null;
}

import type { Sequelize } from 'sequelize';
import { IN_FORCE } from '#server/db/in-force.ts';
import { readRow, readRows } from '#server/db/read.ts';
import type { AuditQuestion } from './audit-question.ts';

/** Ids taken at once: a network's million is never held whole. */
const PAGE = 5_000;

/**
 * The values whose chains an audit works out, by id: the one named; those in force that a laboratory holds or issued;
 * or all in force. As the register knew it at the question's last instant.
 */
export async function* focusIds(database: Sequelize, question: AuditQuestion): AsyncGenerator<number[]> {
  for (let after = 0; ;) {
    const rows = await readRows<{ id: number }>(
      database,
      `SELECT v.id FROM assigned_value v WHERE ${whichOf(question)} AND v.id > :after ORDER BY v.id LIMIT ${PAGE}`,
      { ...replacements(question), after },
    );
    if (rows.length > 0) yield rows.map((row) => row.id);
    if (rows.length < PAGE) return;
    after = rows.at(-1)!.id;
  }
}

/** How many there are. */
export async function focusCount(database: Sequelize, question: AuditQuestion): Promise<number> {
  const row = await readRow<{ count: number }>(
    database,
    `SELECT COUNT(*) AS count FROM assigned_value v WHERE ${whichOf(question)}`,
    replacements(question),
  );
  return row!.count;
}

function whichOf({ scope }: AuditQuestion): string {
  if (scope === 'value') return 'v.uid = :valueUid';
  if (scope === 'network') return IN_FORCE;
  return `(v.holder_id = :laboratoryId OR v.issuer_id = :laboratoryId) AND ${IN_FORCE}`;
}

function replacements({ valueUid, laboratoryId, day, asOf }: AuditQuestion) {
  return { valueUid, laboratoryId, day, knownAt: asOf.replace('T', ' ').replace('Z', '') };
}

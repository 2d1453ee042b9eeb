import type { Sequelize } from 'sequelize';
import { DryRunQuestion } from '#shared/contracts/dry-runs.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { cursorAfter, placeOf } from '#server/http/cursor.ts';
import { notFound } from '#server/http/app-error.ts';

/** A saved dry run as the register holds it. */
export interface DryRunRow {
  id: string;
  name: string;
  laboratoryId: string;
  laboratoryCode: string;
  laboratoryName: string;
  savedBy: string;
  recordedAt: Date;
  actSeq: number;
  changes: number;
  isDiscarded: number;
}

export interface DryRunNote {
  kind: 'note' | 'discard';
  text: string;
  by: string;
  at: Date;
}

const ORDER = 'dry-runs newest';

const HEAD = `
  SELECT d.id, d.name, d.laboratory_id AS laboratoryId, l.code AS laboratoryCode, l.name AS laboratoryName,
    a.name AS savedBy, d.recorded_at AS recordedAt, d.act_seq AS actSeq,
    JSON_LENGTH(d.question, '$.changes') AS changes,
    EXISTS (SELECT 1 FROM dry_run_note n WHERE n.dry_run_id = d.id AND n.kind = 'discard') AS isDiscarded
  FROM dry_run d JOIN laboratory l ON l.id = d.laboratory_id JOIN account a ON a.id = d.account_id`;

/**
 * Dry runs of some laboratories, the newest first; those discarded are left out.
 * @param laboratoryIds null for all
 */
export async function dryRunList(
  database: Sequelize,
  { cursor, limit }: { cursor?: string | undefined; limit: number },
  laboratoryIds: readonly string[] | null,
): Promise<{ runs: DryRunRow[]; nextCursor: string | null }> {
  const place = placeOf(cursor, ORDER);
  if (laboratoryIds?.length === 0) return { runs: [], nextCursor: null };
  const rows = await readRows<DryRunRow>(
    database,
    `${HEAD} WHERE NOT EXISTS (SELECT 1 FROM dry_run_note n WHERE n.dry_run_id = d.id AND n.kind = 'discard')
       ${laboratoryIds ? 'AND d.laboratory_id IN (:laboratoryIds)' : ''}
       ${place ? 'AND d.act_seq < :before' : ''}
     ORDER BY d.act_seq DESC LIMIT ${limit + 1}`,
    {
      ...(laboratoryIds ? { laboratoryIds } : {}),
      ...(place ? { before: Number(place.value) || 0 } : {}),
    },
  );
  const runs = rows.slice(0, limit);
  const last = runs.at(-1);
  const isMore = rows.length > limit && last !== undefined;
  return {
    runs,
    nextCursor: isMore ? cursorAfter(ORDER, { value: String(last.actSeq), id: last.id }) : null,
  };
}

/** One dry run with its question and what was noted on it. @throws AppError `not-found` */
export async function dryRunById(
  database: Sequelize,
  id: string,
): Promise<{ run: DryRunRow; question: DryRunQuestion; notes: DryRunNote[]; actsSince: number }> {
  const [run, kept, notes] = await Promise.all([
    readRow<DryRunRow>(database, `${HEAD} WHERE d.id = :id`, { id }),
    readRow<{ question: unknown }>(database, 'SELECT question FROM dry_run WHERE id = :id', { id }),
    readRows<DryRunNote>(
      database,
      `SELECT n.kind, n.text, a.name AS \`by\`, n.recorded_at AS at
       FROM dry_run_note n JOIN account a ON a.id = n.account_id
       WHERE n.dry_run_id = :id ORDER BY n.act_seq`,
      { id },
    ),
  ]);
  if (!run || !kept) throw notFound('This dry run');
  const since = await readRow<{ n: number }>(
    database,
    `SELECT COUNT(*) AS n FROM act WHERE seq > :actSeq AND kind NOT LIKE 'dry-run.%'`,
    { actSeq: run.actSeq },
  );
  // The connector parses JSON columns by their metadata; text is what remains where a server sends none.
  const { question } = kept;
  const parsed = DryRunQuestion.parse(typeof question === 'string' ? JSON.parse(question) : question);
  return { run, question: parsed, notes, actsSince: since?.n ?? 0 };
}

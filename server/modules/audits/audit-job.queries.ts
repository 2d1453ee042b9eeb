import { QueryTypes, type Sequelize } from 'sequelize';
import { readRow } from '#server/db/read.ts';
import type { Clock, Context } from '#server/http/context.ts';
import type { AuditQuestion } from './audit-question.ts';

/** A job's question and where it stands. */
export interface AuditJob extends AuditQuestion {
  id: string;
  repeatOf: string | null;
  askedBy: string;
  state: 'waiting' | 'running' | 'done' | 'failed' | 'stopped';
  done: number;
  total: number | null;
  message: string | null;
  attempts: number;
}

/** A process that has not said anything for so long has ended, ms. */
const SILENCE = 30_000;
/** A question at which the server ended so often is not tried again. */
const MOST_ATTEMPTS = 3;

const JOB = `
  SELECT id, scope, value_uid AS valueUid, laboratory_id AS laboratoryId, day, known, as_of AS asOf,
    as_of_act AS asOfAct, repeat_of AS repeatOf, asked_by AS askedBy, state, done, total, message, attempts
  FROM audit_job`;

/** The job, or null. */
export function auditJob(database: Sequelize, id: string): Promise<AuditJob | null> {
  return readRow<AuditJob>(database, `${JOB} WHERE id = :id`, { id });
}

/** The job of the same person that asks the same of the same knowledge and is still to end; null where there is none. */
export async function sameJobUnderWay(
  database: Sequelize,
  job: Pick<AuditJob, 'repeatOf' | 'askedBy'> & AuditQuestion,
): Promise<string | null> {
  const same = await readRow<{ id: string }>(
    database,
    `SELECT id FROM audit_job
     WHERE state IN ('waiting', 'running') AND asked_by = :askedBy AND scope = :scope AND value_uid <=> :valueUid
       AND laboratory_id <=> :laboratoryId AND day = :day AND known = :known AND as_of_act = :asOfAct
       AND repeat_of <=> :repeatOf
     ORDER BY asked_at, id LIMIT 1`,
    { ...job },
  );
  return same?.id ?? null;
}

/** Puts a question in the queue. */
export async function addJob(
  { database, clock }: Pick<Context, 'database' | 'clock'>,
  job: Pick<AuditJob, 'id' | 'repeatOf' | 'askedBy'> & AuditQuestion,
): Promise<void> {
  await change(
    database,
    `INSERT INTO audit_job (id, scope, value_uid, laboratory_id, day, known, as_of, as_of_act, repeat_of, asked_by,
       asked_at, state, done, attempts)
     VALUES (:id, :scope, :valueUid, :laboratoryId, :day, :known, :asOf, :asOfAct, :repeatOf, :askedBy,
       :now, 'waiting', 0, 0)`,
    { ...job, now: clock.now() },
  );
}

/**
 * Takes the job that has waited longest, for this process alone. One whose process has ended is first put back in the
 * queue: it is worked on again from its question, or given up where that has happened too often.
 */
export async function claimJob(database: Sequelize, runner: string, clock: Clock): Promise<AuditJob | null> {
  const now = clock.now();
  const silentSince = new Date(now.getTime() - SILENCE);
  await change(
    database,
    `UPDATE audit_job SET state = 'failed', message = 'The server ended ${MOST_ATTEMPTS} times while it worked on this.'
     WHERE state = 'running' AND heartbeat < :silentSince AND attempts >= ${MOST_ATTEMPTS}`,
    { silentSince },
  );
  await change(
    database,
    `UPDATE audit_job SET state = 'waiting', done = 0, runner = NULL,
       message = 'The server ended while it worked on this; it begins again.'
     WHERE state = 'running' AND heartbeat < :silentSince`,
    { silentSince },
  );
  for (;;) {
    const next = await readRow<AuditJob>(
      database,
      `${JOB} WHERE state = 'waiting' ORDER BY asked_at, id LIMIT 1`,
    );
    if (!next) return null;
    const taken = await change(
      database,
      `UPDATE audit_job SET state = 'running', runner = :runner, heartbeat = :now, done = 0, attempts = attempts + 1
       WHERE id = :id AND state = 'waiting'`,
      { id: next.id, runner, now },
    );
    if (taken === 1) return { ...next, state: 'running' };
  }
}

/** Says how far a job is, and that its process lives. @returns false where it is no longer this process's to do */
export async function reportProgress(
  database: Sequelize,
  clock: Clock,
  { id, runner, done, total }: { id: string; runner: string; done: number; total: number },
): Promise<boolean> {
  const changed = await change(
    database,
    `UPDATE audit_job SET done = :done, total = :total, heartbeat = :now
     WHERE id = :id AND runner = :runner AND state = 'running'`,
    { id, runner, done, total, now: clock.now() },
  );
  return changed === 1;
}

/** Puts a job back in the queue, where it is still this process's to do. */
export async function handBack(database: Sequelize, id: string, runner: string): Promise<void> {
  await change(
    database,
    `UPDATE audit_job SET state = 'waiting', done = 0, runner = NULL, heartbeat = NULL, attempts = attempts - 1,
       message = 'The server was stopped while it worked on this; it begins again.'
     WHERE id = :id AND runner = :runner AND state = 'running'`,
    { id, runner },
  );
}

/** Ends a running job. @returns false where it was stopped meanwhile */
export async function closeJob(
  { database }: Pick<Context, 'database'>,
  { id }: Pick<AuditJob, 'id'>,
  state: 'done' | 'failed',
  message: string | null,
): Promise<boolean> {
  const changed = await change(
    database,
    `UPDATE audit_job SET state = :state, message = :message, runner = NULL, heartbeat = NULL
     WHERE id = :id AND state = 'running'`,
    { id, state, message },
  );
  return changed === 1;
}

/** Ends a job that waits or runs; what it found so far is not kept. @returns the state it is in then */
export async function stopJob(database: Sequelize, id: string): Promise<AuditJob['state']> {
  await change(
    database,
    `UPDATE audit_job SET state = 'stopped', message = NULL, runner = NULL, heartbeat = NULL
     WHERE id = :id AND state IN ('waiting', 'running')`,
    { id },
  );
  return (await auditJob(database, id))!.state;
}

async function change(
  database: Sequelize,
  sql: string,
  replacements: Record<string, unknown>,
): Promise<number> {
  const [, changed] = await database.query(sql, { type: QueryTypes.UPDATE, replacements });
  return changed;
}

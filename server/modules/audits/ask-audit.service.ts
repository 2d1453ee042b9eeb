import type { AuditBody } from '#shared/contracts/audits.ts';
import { endOfDay } from '#shared/state-at.ts';
import { readRow } from '#server/db/read.ts';
import { inTransaction } from '#server/db/transaction.ts';
import { fieldError } from '#server/http/app-error.ts';
import { newId, today } from '#server/http/context.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { addJob, stopJob, type AuditJob } from './audit-job.queries.ts';
import { instantText, type AuditQuestion } from './audit-question.ts';
import { auditRunnerOf } from './audit-runner.ts';

/**
 * Puts an audit in the queue, its question fixed to what the register knows now.
 * @throws AppError `unprocessable` on `known` where that day has not begun
 */
export async function askAudit(context: SignedInContext, body: AuditBody): Promise<{ id: string }> {
  const { known = today(context), day = today(context) } = body;
  if (known > today(context)) {
    throw fieldError('known', {
      message: 'Nothing is known yet of a day that has not begun.',
      received: known,
      expected: `${today(context)} or earlier`,
    });
  }
  const { asOfAct, now } = await newestKnowledge(context);
  const asOf = known < today(context) ? endOfDay(known) : now;
  return enqueue(context, {
    scope: body.scope,
    valueUid: body.scope === 'value' ? body.valueUid : null,
    laboratoryId: body.scope === 'laboratory' ? body.laboratoryId : null,
    ...{ day, known, asOf, asOfAct },
  });
}

/** Puts the same question in the queue again, with the knowledge it was asked with. */
export async function repeatAudit(context: SignedInContext, job: AuditJob): Promise<{ id: string }> {
  const { scope, valueUid, laboratoryId, day, known, asOf, asOfAct } = job;
  return enqueue(context, { scope, valueUid, laboratoryId, day, known, asOf, asOfAct }, job.id);
}

/** Stops an audit that waits or runs; one that is done stays done. */
export async function stopAudit(
  context: SignedInContext,
  id: string,
): Promise<{ id: string; state: AuditJob['state'] }> {
  return { id, state: await stopJob(context.database, id) };
}

async function enqueue(
  context: SignedInContext,
  question: AuditQuestion,
  repeatOf: string | null = null,
): Promise<{ id: string }> {
  const id = newId(context);
  await addJob(context, { ...question, id, repeatOf, askedBy: context.user.accountId });
  auditRunnerOf(context).wake();
  return { id };
}

/**
 * The newest act and the instant until which knowledge counts. Read while no act is under way: every act recorded by
 * that instant is there, and later ones carry a later time.
 */
function newestKnowledge(context: SignedInContext): Promise<{ asOfAct: number; now: string }> {
  return inTransaction(context.database, async () => {
    await readRow(context.database, 'SELECT id FROM act_lock WHERE id = 1 FOR UPDATE');
    const head = await readRow<{ seq: number | null }>(
      context.database,
      'SELECT MAX(seq) AS seq FROM act LOCK IN SHARE MODE',
    );
    return { asOfAct: head?.seq ?? 0, now: instantText(context.clock.now()) };
  });
}

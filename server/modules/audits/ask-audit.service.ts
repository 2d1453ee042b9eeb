import type { AuditBody } from '#shared/contracts/audits.ts';
import { endOfDay } from '#shared/state-at.ts';
import { readRow } from '#server/db/read.ts';
import { inTransaction } from '#server/db/transaction.ts';
import { fieldError } from '#server/http/app-error.ts';
import { newId, today } from '#server/http/context.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { refuseFarDays } from './audit-days.ts';
import { addJob, sameJobUnderWay, stopJob, type AuditJob } from './audit-job.queries.ts';
import { instantText, type AuditQuestion } from './audit-question.ts';
import { auditRunnerOf } from './audit-runner.ts';

/**
 * Puts an audit in the queue, its question fixed to what the register knows now. Who asks the same again while it waits
 * or runs is answered with the one under way.
 * @throws AppError `unprocessable` on `known` where that day has not begun, on `day` or `known` where it is far off
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
  await refuseFarDays(context, { day, known });
  return enqueue(context, ({ asOfAct, now }) => ({
    scope: body.scope,
    valueUid: body.scope === 'value' ? body.valueUid : null,
    laboratoryId: body.scope === 'laboratory' ? body.laboratoryId : null,
    ...{ day, known, asOf: known < today(context) ? endOfDay(known) : now, asOfAct },
  }));
}

/** Puts the same question in the queue again, with the knowledge it was asked with. */
export async function repeatAudit(context: SignedInContext, job: AuditJob): Promise<{ id: string }> {
  const { scope, valueUid, laboratoryId, day, known, asOf, asOfAct } = job;
  return enqueue(context, () => ({ scope, valueUid, laboratoryId, day, known, asOf, asOfAct }), job.id);
}

/** Stops an audit that waits or runs; one that is done stays done. */
export async function stopAudit(
  context: SignedInContext,
  id: string,
): Promise<{ id: string; state: AuditJob['state'] }> {
  return { id, state: await stopJob(context.database, id) };
}

/** The newest act and the instant until which knowledge counts. */
interface Knowledge {
  asOfAct: number;
  now: string;
}

/**
 * Asked under the record's lock, while no act is under way: every act recorded by that instant is there, later ones
 * carry a later time, and of two that ask the same at once the second finds the first.
 */
async function enqueue(
  context: SignedInContext,
  questionOf: (knowledge: Knowledge) => AuditQuestion,
  repeatOf: string | null = null,
): Promise<{ id: string }> {
  const id = await inTransaction(context.database, async () => {
    await readRow(context.database, 'SELECT id FROM act_lock WHERE id = 1 FOR UPDATE');
    const head = await readRow<{ seq: number | null }>(
      context.database,
      'SELECT MAX(seq) AS seq FROM act LOCK IN SHARE MODE',
    );
    const question = questionOf({ asOfAct: head?.seq ?? 0, now: instantText(context.clock.now()) });
    const job = { ...question, id: newId(context), repeatOf, askedBy: context.user.accountId };
    const underWay = await sameJobUnderWay(context.database, job);
    if (underWay) return underWay;
    await addJob(context, job);
    return job.id;
  });
  auditRunnerOf(context).wake();
  return { id };
}

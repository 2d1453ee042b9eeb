import { readRow } from '#server/db/read.ts';
import { notFound } from '#server/http/app-error.ts';
import { today } from '#server/http/context.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { readDraftPermission, type DraftSubject } from './calibrations.policy.ts';

/** Of the assertions about this person's hand in this laboratory that cover the day, the one recorded last. */
const AUTHORISATION = `
  SELECT a.state FROM authorisation a
  WHERE a.account_id = :accountId AND a.laboratory_id = :laboratoryId AND a.what = 'sign calibrations'
    AND a.valid_from <= :day AND (a.valid_to IS NULL OR a.valid_to >= :day)
  ORDER BY a.act_seq DESC, a.id DESC LIMIT 1`;

/**
 * What policies ask about a draft.
 * @throws AppError `not-found`, also for a draft of a laboratory this person does not read in full
 */
export async function draftSubject(context: SignedInContext, draftId: string): Promise<DraftSubject> {
  const { database, user } = context;
  const row = await readRow<{ laboratoryId: string }>(
    database,
    'SELECT laboratory_id AS laboratoryId FROM calibration_draft WHERE id = :draftId',
    { draftId },
  );
  if (!row) throw notFound('This draft');
  const authorisation = await readRow<{ state: string }>(database, AUTHORISATION, {
    accountId: user.accountId,
    laboratoryId: row.laboratoryId,
    day: today(context),
  });
  const subject = { draftId, ...row, isAuthorised: authorisation?.state === 'granted' };
  if (!readDraftPermission.allows(user, subject)) throw notFound('This draft');
  return subject;
}

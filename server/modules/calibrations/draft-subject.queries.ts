import { readRow } from '#server/db/read.ts';
import { notFound } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { isAuthorisedToSign } from './authorised-to-sign.queries.ts';
import { readDraftPermission, type DraftSubject } from './calibrations.policy.ts';

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
  const subject = { draftId, ...row, isAuthorised: await isAuthorisedToSign(context, row.laboratoryId) };
  if (!readDraftPermission.allows(user, subject)) throw notFound('This draft');
  return subject;
}

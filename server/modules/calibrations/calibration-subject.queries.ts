import { readRow, readRows } from '#server/db/read.ts';
import { notFound } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { readCalibration, type CalibrationSubject } from './calibrations.policy.ts';

/**
 * Whose calibration a revision belongs to.
 * @throws AppError `not-found`, also for one this person does not read
 */
export async function calibrationSubject(
  context: SignedInContext,
  revisionId: string,
): Promise<CalibrationSubject> {
  const row = await readRow<{ issuerId: string; registeredById: string }>(
    context.database,
    `SELECT c.laboratory_id AS issuerId, c.registered_by_id AS registeredById
     FROM revision r JOIN calibration c ON c.id = r.calibration_id WHERE r.id = :revisionId`,
    { revisionId },
  );
  if (!row) throw notFound('This calibration');
  const holders = await readRows<{ holderId: string }>(
    context.database,
    'SELECT DISTINCT holder_id AS holderId FROM assigned_value WHERE revision_id = :revisionId',
    { revisionId },
  );
  const subject = { revisionId, ...row, holderIds: holders.map((holder) => holder.holderId) };
  if (!readCalibration.allows(context.user, subject)) throw notFound('This calibration');
  return subject;
}

import type { OpenPoint } from '#shared/contracts/drafts.ts';
import type { FieldProblem } from '#shared/errors.ts';
import { inAct } from '#server/db/act.ts';
import { AppError } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { confirmSignature } from './confirm-signature.ts';
import { isBlocking, judgeDraft } from './draft-points.service.ts';
import { closeDraft, lockedDraft, refuseClosed } from './draft-store.ts';
import { writeCalibration, type IssuedCalibration } from './issue-calibration.service.ts';

/**
 * Issues a draft under the signatory's hand: password again, the version they read, every point settled. The
 * draft closes in the same act, so that a second click finds it closed.
 * @throws AppError `unprocessable` on password or on each open point, `stale` with `current`, `duplicate`,
 * `too-many-requests`
 */
export async function issueDraft(
  context: SignedInContext,
  { draftId, laboratoryId }: { draftId: string; laboratoryId: string },
  { version, password }: { version: number; password: string },
): Promise<IssuedCalibration> {
  await confirmSignature(context, password, 'Nothing was issued.');
  return inAct(context, { kind: 'calibration.issue', laboratoryId }, async (act) => {
    const draft = await lockedDraft(context, draftId, version);
    refuseClosed(draft);
    const { input, points } = await judgeDraft(context, draft.laboratory.id, draft.content);
    if (!input) refusePoints(points);
    const { issued, after } = await writeCalibration(context, input, context.user.accountId);
    await closeDraft(context, draft, issued.revisionId);
    act.record({
      subject: { type: 'calibration', id: issued.calibrationId },
      before: { draftId, version },
      after,
    });
    return issued;
  });
}

function refusePoints(points: readonly OpenPoint[]): never {
  const open = points.filter(isBlocking);
  const fields = open.toReversed().map(({ field, message, received, expected, clause }) => {
    const problem: FieldProblem = {
      message,
      ...(received === null ? {} : { received }),
      ...(expected === null ? {} : { expected }),
      ...(clause === null ? {} : { clause }),
    };
    return [field, problem] as const;
  });
  const count = open.length === 1 ? 'One point is' : `${open.length} points are`;
  throw new AppError('unprocessable', `${count} open. Nothing was issued.`, {
    fields: Object.fromEntries(fields),
  });
}

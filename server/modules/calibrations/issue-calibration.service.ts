import type { z } from 'zod';
import { CalibrationInput } from '#shared/contracts/calibration-input.ts';
import { inAct } from '#server/db/act.ts';
import { insertRow } from '#server/db/base-model.ts';
import { readRow } from '#server/db/read.ts';
import { AppError } from '#server/http/app-error.ts';
import { newId, today, type Context } from '#server/http/context.ts';
import { validate } from '#server/http/validate.ts';
import { calibrationModel } from './calibrations.model.ts';
import { completeNotices } from './complete-notices.ts';
import { completeSources } from './complete-sources.ts';
import { issueFacts } from './issue-facts.queries.ts';
import { issueProblems, refuseProblems } from './issue-rules.ts';
import { writeRevision } from './write-revision.ts';

export interface IssuedCalibration {
  calibrationId: string;
  revisionId: string;
  /** In the order of the lines. */
  valueUids: string[];
}

/**
 * Issues a calibration in one act: the rules of the domain first, then revision, values, links and covariances,
 * or nothing. From here on it only changes by a further revision or a withdrawal.
 * @param signatoryId who signed; the person of the context unless said otherwise
 * @throws AppError `malformed`, `unprocessable` naming every field, `duplicate` on certificateNo
 */
export async function issueCalibration(
  context: Context,
  asked: z.input<typeof CalibrationInput>,
  signatoryId: string | null = context.user?.accountId ?? null,
): Promise<IssuedCalibration> {
  const parsed = validate(CalibrationInput, asked, 'body');
  return inAct(context, { kind: 'calibration.issue', laboratoryId: parsed.registeredById }, async (act) => {
    const { issued, after } = await writeCalibration(context, parsed, signatoryId);
    act.record({ subject: { type: 'calibration', id: issued.calibrationId }, after });
    return issued;
  });
}

/**
 * The work of issuing, inside an act that is open already, and what the act's record is to say of it.
 * @throws AppError `unprocessable` naming every field, `duplicate` on certificateNo
 */
export async function writeCalibration(
  context: Context,
  parsed: CalibrationInput,
  signatoryId: string | null,
): Promise<{ issued: IssuedCalibration; after: Record<string, unknown> }> {
  await refuseKnownCertificate(context, parsed);
  const facts = await issueFacts(context.database, parsed, today(context));
  const input = await completeNotices(context, completeSources(parsed, facts), facts);
  refuseProblems(issueProblems(input, facts));
  const calibrationId = newId(context);
  const { issuerId, certificateNo, registeredById } = input;
  await insertRow(calibrationModel(context.database), {
    id: calibrationId,
    laboratoryId: issuerId,
    certificateNo,
    registeredById,
  });
  const head = { calibrationId, n: 1, reason: null, signatoryId, changed: [] };
  const { revisionId, values, content, contentSha256 } = await writeRevision(context, input, facts, head);
  const valueUids = values.map((value) => value.uid);
  return {
    issued: { calibrationId, revisionId, valueUids },
    after: { revisionId, valueUids, contentSha256, content },
  };
}

async function refuseKnownCertificate(
  context: Context,
  { issuerId, certificateNo }: CalibrationInput,
): Promise<void> {
  const known = await readRow<{ id: string }>(
    context.database,
    'SELECT id FROM calibration WHERE laboratory_id = :issuerId AND certificate_no = :certificateNo',
    { issuerId, certificateNo },
  );
  if (!known) return;
  const message =
    'This certificate of this laboratory is already in the register. Open it, or correct the number.';
  throw new AppError('duplicate', message, {
    fields: { certificateNo: { message, received: certificateNo } },
  });
}

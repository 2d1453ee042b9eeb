import type { z } from 'zod';
import type { WithdrawBody } from '#shared/contracts/calibrations.ts';
import { inAct } from '#server/db/act.ts';
import { insertRows } from '#server/db/base-model.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { AppError, fieldError, notFound } from '#server/http/app-error.ts';
import { today, type Context } from '#server/http/context.ts';
import { worksIn } from '#server/policy/user.ts';
import { valueEndModel } from './graph.model.ts';

/** Characters of a reason that the register holds. */
const LONGEST_REASON = 300;

interface Standing {
  calibrationId: string;
  issuerId: string;
  registeredById: string;
  certificateNo: string;
  issuedOn: string;
  latestId: string;
  withdrawn: number;
}

/**
 * Withdraws an issued calibration from a day on: its values end without successor, and every chain that leans
 * on them says so. It is never undone; a mistaken withdrawal is mended by a new revision.
 * @throws AppError `not-found`, `duplicate` where it is withdrawn already, `unprocessable` on effectiveOn, reason or
 * where a later revision stands
 */
export async function withdrawCalibration(
  context: Context,
  revisionId: string,
  { reason: given, effectiveOn }: z.infer<typeof WithdrawBody>,
): Promise<{ revisionId: string; valueUids: string[]; actSeq: number }> {
  const { laboratoryId, withdrawn, reason } = withdrawalOf(
    context,
    await standingOf(context, revisionId),
    given,
  );
  const description = { kind: 'calibration.withdraw', laboratoryId, reason } as const;
  return inAct(context, description, async (act) => {
    const standing = await standingOf(context, revisionId);
    refuse(standing, revisionId, effectiveOn, today(context));
    const values = await readRows<{ id: number; uid: string }>(
      context.database,
      'SELECT id, uid FROM assigned_value WHERE revision_id = :revisionId ORDER BY line',
      { revisionId },
    );
    await insertRows(
      valueEndModel(context.database),
      values.map(({ id }) => ({
        valueId: id,
        kind: 'withdrawn' as const,
        effectiveOn,
        madeKnownOn: today(context),
        replacedBy: null,
        changed: 'value' as const,
        reason,
      })),
    );
    const valueUids = values.map((value) => value.uid);
    act.record({
      subject: { type: 'calibration', id: standing.calibrationId },
      before: { revisionId, state: 'in force' },
      after: { revisionId, valueUids, state: 'withdrawn', withdrawn, effectiveOn, reason },
    });
    return { revisionId, valueUids, actSeq: act.seq };
  });
}

interface Withdrawal {
  /** In whose name it is done. */
  laboratoryId: string;
  /** The certificate itself, by who issued it, or its entry, by who only entered it. */
  withdrawn: 'certificate' | 'entry';
  /** As the chains that lean on it will read it. */
  reason: string;
}

/** What is withdrawn, in whose name, and in words that tell the two apart wherever both could be meant. */
function withdrawalOf({ user }: Context, standing: Standing, reason: string): Withdrawal {
  const { issuerId, registeredById, certificateNo } = standing;
  if (issuerId === registeredById) return { laboratoryId: issuerId, withdrawn: 'certificate', reason };
  if (user && worksIn(user, issuerId, 'signatory')) {
    return {
      laboratoryId: issuerId,
      withdrawn: 'certificate',
      reason: toldReason(`Certificate ${certificateNo} withdrawn by its issuer: `, reason),
    };
  }
  return {
    laboratoryId: registeredById,
    withdrawn: 'entry',
    reason: toldReason(
      `Entry of certificate ${certificateNo} withdrawn by the laboratory that made it: `,
      reason,
    ),
  };
}

/** @throws AppError `unprocessable` on `reason` where it and the words before it are more than the register holds */
function toldReason(words: string, reason: string): string {
  const most = LONGEST_REASON - words.length;
  if (reason.length > most) {
    throw fieldError('reason', {
      message: `It is told after the words "${words.trim()}", and together they are too long.`,
      received: reason,
      expected: `at most ${Math.max(0, most)} characters`,
    });
  }
  return words + reason;
}

async function standingOf(context: Context, revisionId: string): Promise<Standing> {
  const row = await readRow<Standing>(
    context.database,
    `SELECT c.id AS calibrationId, c.laboratory_id AS issuerId,
       c.registered_by_id AS registeredById, c.certificate_no AS certificateNo, r.issued_on AS issuedOn,
       (SELECT x.id FROM revision x WHERE x.calibration_id = c.id ORDER BY x.n DESC LIMIT 1) AS latestId,
       EXISTS (SELECT 1 FROM value_end e JOIN assigned_value v ON v.id = e.value_id
               WHERE v.revision_id = r.id AND e.kind = 'withdrawn') AS withdrawn
     FROM revision r JOIN calibration c ON c.id = r.calibration_id WHERE r.id = :revisionId`,
    { revisionId },
  );
  if (!row) throw notFound('This calibration');
  return row;
}

function refuse(standing: Standing, revisionId: string, effectiveOn: string, day: string): void {
  if (standing.withdrawn) {
    throw new AppError('duplicate', 'This calibration is withdrawn already.');
  }
  if (standing.latestId !== revisionId) {
    throw new AppError(
      'unprocessable',
      'A later revision has replaced this one. Withdraw the one that stands.',
      { members: { latestRevisionId: standing.latestId } },
    );
  }
  if (effectiveOn < standing.issuedOn || effectiveOn > day) {
    throw fieldError('effectiveOn', {
      message: 'A withdrawal takes effect between the day of issue and today.',
      received: effectiveOn,
      expected: `${standing.issuedOn} to ${day}`,
    });
  }
}

import type { z } from 'zod';
import type { WithdrawBody } from '#shared/contracts/calibrations.ts';
import { inAct } from '#server/db/act.ts';
import { insertRows } from '#server/db/base-model.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { AppError, fieldError, notFound } from '#server/http/app-error.ts';
import { today, type Context } from '#server/http/context.ts';
import { valueEndModel } from './graph.model.ts';

interface Standing {
  calibrationId: string;
  registeredById: string;
  issuedOn: string;
  latestId: string;
  withdrawn: number;
}

/**
 * Withdraws an issued calibration from a day on: its values end without successor, and every chain that leans
 * on them says so. It is never undone; a mistaken withdrawal is mended by a new revision.
 * @throws AppError `not-found`, `duplicate` where it is withdrawn already, `unprocessable` on effectiveOn or
 * where a later revision stands
 */
export async function withdrawCalibration(
  context: Context,
  revisionId: string,
  { reason, effectiveOn }: z.infer<typeof WithdrawBody>,
): Promise<{ revisionId: string; valueUids: string[]; actSeq: number }> {
  const { registeredById } = await standingOf(context, revisionId);
  const description = { kind: 'calibration.withdraw', laboratoryId: registeredById, reason } as const;
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
      after: { revisionId, valueUids, state: 'withdrawn', effectiveOn, reason },
    });
    return { revisionId, valueUids, actSeq: act.seq };
  });
}

async function standingOf(context: Context, revisionId: string): Promise<Standing> {
  const row = await readRow<Standing>(
    context.database,
    `SELECT c.id AS calibrationId, c.registered_by_id AS registeredById, r.issued_on AS issuedOn,
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

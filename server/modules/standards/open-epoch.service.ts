import type { OpenEpochBody } from '#shared/contracts/standards.ts';
import type { z } from 'zod';
import { inAct } from '#server/db/act.ts';
import { insertRow } from '#server/db/base-model.ts';
import { readRow } from '#server/db/read.ts';
import { fieldError } from '#server/http/app-error.ts';
import { newId, today, type Context } from '#server/http/context.ts';
import { standardSubject } from './standard-laboratory.queries.ts';
import { epochModel } from './standards.model.ts';

/**
 * Opens a new stretch of a standard's life after an intervention: no history, drift fit or reference value
 * crosses it. Values already issued keep their epoch; a revision of their calibration moves them.
 * @throws AppError `not-found`, or `unprocessable` on beginsOn or lastGoodOn
 */
export async function openEpoch(
  context: Context,
  standardId: string,
  body: z.infer<typeof OpenEpochBody>,
): Promise<{ id: string; n: number }> {
  const day = today(context);
  const standard = await standardSubject(context.database, standardId, day);
  return inAct(context, { kind: 'epoch.open', laboratoryId: standard.ownerId }, async (act) => {
    const last = await readRow<{ n: number; beginsOn: string }>(
      context.database,
      'SELECT n, begins_on AS beginsOn FROM epoch WHERE standard_id = :standardId ORDER BY n DESC LIMIT 1',
      { standardId },
    );
    refuseDates(body, last?.beginsOn ?? null, day);
    const id = newId(context);
    const n = (last?.n ?? 0) + 1;
    await insertRow(epochModel(context.database), { id, standardId, n, ...body });
    act.record({ subject: { type: 'standard', id: standardId }, before: last, after: { n, ...body } });
    return { id, n };
  });
}

function refuseDates(body: z.infer<typeof OpenEpochBody>, lastBegin: string | null, day: string): void {
  if (body.beginsOn > day) {
    throw fieldError('beginsOn', {
      message: 'The intervention lies in the future. Enter it when it has happened.',
      received: body.beginsOn,
      expected: `${day} or earlier`,
    });
  }
  if (lastBegin !== null && body.beginsOn < lastBegin) {
    throw fieldError('beginsOn', {
      message: 'The epoch before this one began later. Epochs follow each other.',
      received: body.beginsOn,
      expected: `${lastBegin} or later`,
    });
  }
  if (body.lastGoodOn !== null && body.lastGoodOn > body.beginsOn) {
    throw fieldError('lastGoodOn', {
      message: 'The last day it was known to be good lies after the day the epoch begins.',
      received: body.lastGoodOn,
      expected: `${body.beginsOn} or earlier`,
    });
  }
}

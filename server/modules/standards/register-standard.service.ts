import type { RegisterStandardBody, StandardKind } from '#shared/contracts/standards.ts';
import type { z } from 'zod';
import { inAct } from '#server/db/act.ts';
import { readRow } from '#server/db/read.ts';
import { AppError, fieldError } from '#server/http/app-error.ts';
import { newId, today, type Context } from '#server/http/context.ts';
import { insertStandards, type NewStandard } from './insert-standards.ts';
import { densityProblem, inServiceProblem } from './registration-rules.ts';

/** What the form sends; other ways in may register prototypes, spheres, realizations and consensus values. */
export type StandardRegistration = RegisterStandardBody & { kind?: z.infer<typeof StandardKind> };

export interface RegisteredStandard {
  id: string;
  registryNo: string;
  /** The shared effect of its volume, where a density with U was given. */
  volumeSourceUid: string | null;
}

/**
 * Puts one standard into the register: its identity, first epoch, owner, custodian, class, state, density
 * with the shared effect of its volume, and the holder's programme.
 * @throws AppError `duplicate` on registryNo, `unprocessable` on density.k or inServiceFrom
 */
export async function registerStandard(
  context: Context,
  body: StandardRegistration,
): Promise<RegisteredStandard> {
  const problem =
    inServiceProblem(body.inServiceFrom, today(context)) ?? densityProblem(body.density, 'density');
  if (problem) throw fieldError(problem.field, problem);
  return inAct(context, { kind: 'standard.register', laboratoryId: body.laboratoryId }, async (act) => {
    await refuseTakenNumber(context, body.registryNo);
    const standard: NewStandard = { ...body, id: newId(context), kind: body.kind ?? 'weight' };
    const [registered] = await insertStandards(context, [standard]);
    if (!registered) throw new Error('The standard that was just registered is not there');
    act.record({ subject: { type: 'standard', id: registered.id }, after: body });
    return registered;
  });
}

/**
 * Sets and single weights share one row of numbers on paper, so no number may name two things.
 * @throws AppError `duplicate`
 */
export async function refuseTakenNumber(context: Context, registryNo: string): Promise<void> {
  const taken = await readRow<{ what: string }>(
    context.database,
    `SELECT 'a standard' AS what FROM standard WHERE registry_no = :registryNo
     UNION ALL SELECT 'a set' FROM weight_set WHERE registry_no = :registryNo LIMIT 1`,
    { registryNo },
  );
  if (!taken) return;
  const message = `This registry number already names ${taken.what}. Choose another.`;
  throw new AppError('duplicate', message, {
    fields: { registryNo: { message, received: registryNo, expected: 'a number not yet given out' } },
  });
}

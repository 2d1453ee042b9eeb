import { DraftContent } from '#shared/contracts/drafts.ts';
import { readRow } from '#server/db/read.ts';
import type { Context } from '#server/http/context.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { createDraft, setDraftState } from '#server/modules/calibrations/index.ts';
import { userByAccountId } from '#server/modules/identity/index.ts';
import type { Admitted } from './seed-network.ts';

/** Who left them on the desk. */
const METROLOGIST = 'metrologist@portalder.example';
const REFERENCE = 'OI 0100-01';

/**
 * Two certificates on the desk of Port Alder: one complete and waiting for the signatory, one half typed, as work is
 * left in the evening.
 */
export async function leaveDrafts(context: Context, admitted: Admitted): Promise<void> {
  const person = await signedInAs(context, METROLOGIST);
  const laboratoryId = admitted.laboratoryIds.get('PA')!;
  const complete = await createDraft(person, laboratoryId, await completeDraft(context, admitted));
  await setDraftState(person, complete.id, complete.version, 'sent to sign');
  await createDraft(person, laboratoryId, halfTyped(admitted));
}

async function signedInAs(context: Context, email: string): Promise<SignedInContext> {
  const account = await readRow<{ id: string }>(
    context.database,
    'SELECT id FROM account WHERE email = :email',
    {
      email,
    },
  );
  const user = account && (await userByAccountId(context.database, context.clock, account.id));
  if (!user) throw new Error(`The demo network has nobody called ${email}`);
  return { ...context, user };
}

async function completeDraft(context: Context, admitted: Admitted): Promise<DraftContent> {
  const reference = await readRow<{ uid: string }>(
    context.database,
    `SELECT uid FROM assigned_value WHERE standard_id = :standardId AND quantity = 'conventional mass'
     ORDER BY performed_end DESC LIMIT 1`,
    { standardId: admitted.standardIds.get(REFERENCE)! },
  );
  return DraftContent.parse({
    issuerId: admitted.laboratoryIds.get('OI')!,
    certificateNo: 'OI-26-014',
    issuedOn: '2026-10-28',
    performedBegin: '2026-10-26',
    performedEnd: '2026-10-27',
    method: 'Substitution weighing',
    decisionRule: 'simple',
    lines: [
      {
        key: '1',
        standardId: admitted.standardIds.get('PA 0400')!,
        value: '-0.061',
        unit: 'mg',
        expandedU: '0.060',
        uUnit: 'mg',
        k: '2',
        coverage: '0.9545',
        references: reference ? [{ valueUid: reference.uid, sensitivity: '1' }] : [],
      },
    ],
  });
}

function halfTyped(admitted: Admitted): DraftContent {
  return DraftContent.parse({
    issuerId: admitted.laboratoryIds.get('OI')!,
    certificateNo: 'OI-26-015',
    issuedOn: '2026-10-30',
    lines: [{ key: '1', standardId: admitted.standardIds.get('PA 0300-01')!, value: '0.0' }],
  });
}

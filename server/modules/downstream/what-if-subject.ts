import type { WhatIfInput } from '#shared/contracts/downstream.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { fieldError } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { readsInFull } from '#server/policy/user.ts';
import type { DownstreamSubject } from './downstream.policy.ts';
import { revisionSubject, valueSubject } from './subject.queries.ts';

/**
 * The values that a dry run starts from, one list for each change, in order. A notice speaks for an issuer: only who reads that laboratory in full may
 * try one, since its values are not for others to list.
 * @throws AppError `not-found` for what may not be known; `unprocessable` for a notice that covers nothing
 */
export async function whatIfSubject(
  context: SignedInContext,
  input: Pick<WhatIfInput, 'changes'>,
): Promise<DownstreamSubject> {
  const subject: DownstreamSubject = { ids: [], view: 'full' };
  for (const [at, change] of input.changes.entries()) {
    if (change.kind === 'notice') {
      if (!readsInFull(context.user, change.issuerId)) return { ids: [], view: 'none' };
      subject.ids.push(await idsOfIssuer(context, change, `changes.${at}.issuerId`));
      continue;
    }
    const named =
      change.kind === 'withdraw'
        ? await revisionSubject(context, change.revisionId)
        : await valueSubject(context, change.valueUid);
    subject.ids.push(named.ids.flat());
    if (named.view === 'statement') subject.view = 'statement';
  }
  return subject;
}

async function idsOfIssuer(
  context: SignedInContext,
  { issuerId, fromScaleId = null }: { issuerId: string; fromScaleId?: string | undefined | null },
  field: string,
): Promise<number[]> {
  const rows = await readRows<{ id: number }>(
    context.database,
    `SELECT id FROM assigned_value WHERE issuer_id = :issuerId
       AND (:fromScaleId IS NULL OR scale_version_id IS NULL OR scale_version_id = :fromScaleId)`,
    { issuerId, fromScaleId },
  );
  if (rows.length > 0) return rows.map((row) => row.id);
  const isKnown = await readRow(context.database, 'SELECT 1 AS yes FROM laboratory WHERE id = :issuerId', {
    issuerId,
  });
  throw fieldError(field, {
    message: isKnown
      ? 'This laboratory has issued no value that a notice could cover.'
      : 'No laboratory of the register has this identifier.',
    received: issuerId,
  });
}

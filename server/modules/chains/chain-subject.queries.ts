import { readRow } from '#server/db/read.ts';
import { notFound } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { readableLaboratoryIds } from '#server/policy/user.ts';
import { valueView } from '#server/policy/value-view.ts';
import type { ChainSubject } from './chains.policy.ts';

/** Whether any value of these laboratories leans on the value: stops at the first. */
const IS_ABOVE_OURS = `
  WITH RECURSIVE below (id) AS (
    SELECT CAST(:id AS UNSIGNED)
    UNION
    SELECT l.child_id FROM below b JOIN value_link l ON l.parent_id = b.id)
  SELECT 1 AS yes FROM below b JOIN assigned_value v ON v.id = b.id
  WHERE v.holder_id IN (:laboratoryIds) OR v.issuer_id IN (:laboratoryIds) LIMIT 1`;

/**
 * The value whose chain is asked for, with how much this person sees of it.
 * @throws AppError `not-found` for a value that does not exist, or that they may not know
 */
export async function chainSubject(context: SignedInContext, uid: string): Promise<ChainSubject> {
  const row = await readRow<Omit<ChainSubject, 'view'>>(
    context.database,
    'SELECT id, uid, holder_id AS holderId, issuer_id AS issuerId FROM assigned_value WHERE uid = :uid',
    { uid },
  );
  if (!row) throw notFound('This value');
  if (valueView(context.user, row, 'unrelated') === 'full') return { ...row, view: 'full' };
  const laboratoryIds = readableLaboratoryIds(context.user) ?? [];
  const isAbove =
    laboratoryIds.length > 0 &&
    (await readRow(context.database, IS_ABOVE_OURS, { id: row.id, laboratoryIds })) !== null;
  if (!isAbove) throw notFound('This value');
  return { ...row, view: valueView(context.user, row, 'upstream') };
}

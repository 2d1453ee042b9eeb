import { readRow } from '#server/db/read.ts';
import { today } from '#server/http/context.ts';
import type { SignedInContext } from '#server/http/route.ts';

/** Of the assertions about this person's hand in this laboratory that cover the day, the one recorded last. */
const AUTHORISATION = `
  SELECT a.state FROM authorisation a
  WHERE a.account_id = :accountId AND a.laboratory_id = :laboratoryId AND a.what = 'sign calibrations'
    AND a.valid_from <= :day AND (a.valid_to IS NULL OR a.valid_to >= :day)
  ORDER BY a.act_seq DESC, a.id DESC LIMIT 1`;

/** Whether this person's authorisation to sign calibrations of a laboratory is in force today. */
export async function isAuthorisedToSign(context: SignedInContext, laboratoryId: string): Promise<boolean> {
  const authorisation = await readRow<{ state: string }>(context.database, AUTHORISATION, {
    accountId: context.user.accountId,
    laboratoryId,
    day: today(context),
  });
  return authorisation?.state === 'granted';
}

import { readRow } from '#server/db/read.ts';
import { notFound } from '#server/http/app-error.ts';
import type { Context } from '#server/http/context.ts';

/** Asked after the permission: whether an account exists is told only to those who may give roles. */
export async function refuseUnknownAccount(context: Context, id: string): Promise<void> {
  const row = await readRow(context.database, 'SELECT id FROM account WHERE id = :id', { id });
  if (!row) throw notFound('This account');
}

import { readRow } from '#server/db/read.ts';
import { notFound } from '#server/http/app-error.ts';
import type { Context } from '#server/http/context.ts';

/** @throws AppError `not-found` for a laboratory that is not in the register */
export async function refuseUnknownLaboratory(context: Context, id: string): Promise<void> {
  const row = await readRow(context.database, 'SELECT id FROM laboratory WHERE id = :id', { id });
  if (!row) throw notFound('This laboratory');
}

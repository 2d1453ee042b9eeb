import { readRow, readRows } from '#server/db/read.ts';
import { notFound } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { readsInFull } from '#server/policy/user.ts';
import { valueView } from '#server/policy/value-view.ts';
import { below } from './below.ts';
import type { DownstreamSubject } from './downstream.policy.ts';
import { graphBelow } from './graph-memory.ts';
import { SIGHT, sightOf } from './sight.ts';

interface ValueRow {
  id: number;
  holderId: string;
  issuerId: string;
}

const VALUE = 'SELECT v.id, v.holder_id AS holderId, v.issuer_id AS issuerId FROM assigned_value v';

/**
 * A value by its uid.
 * @throws AppError `not-found` for one that does not exist, or that the person may not know
 */
export async function valueSubject(context: SignedInContext, uid: string): Promise<DownstreamSubject> {
  const rows = await readRows<ValueRow>(context.database, `${VALUE} WHERE v.uid = :uid`, { uid });
  const seen = await seenValues(context, rows);
  if (seen.ids[0]!.length === 0) throw notFound('This value');
  return seen;
}

/** A value, or all values of a standard that the person may know. @throws AppError `not-found` */
export async function valueOrStandardSubject(
  context: SignedInContext,
  uid: string,
): Promise<DownstreamSubject> {
  const isValue = await readRow(context.database, 'SELECT 1 AS yes FROM assigned_value WHERE uid = :uid', {
    uid,
  });
  return isValue ? valueSubject(context, uid) : standardSubject(context, uid);
}

/**
 * All values of a standard that the person may know.
 * @throws AppError `not-found` for a standard of which they may know nothing
 */
export async function standardSubject(
  context: SignedInContext,
  standardId: string,
): Promise<DownstreamSubject> {
  const [standard, rows] = await Promise.all([
    readRow<{ laboratoryId: string }>(
      context.database,
      'SELECT laboratory_id AS laboratoryId FROM standard WHERE id = :standardId',
      { standardId },
    ),
    readRows<ValueRow>(context.database, `${VALUE} WHERE v.standard_id = :standardId`, { standardId }),
  ]);
  const seen = await seenValues(context, rows);
  // A weight that was not calibrated yet: nothing leans on it, which its owner may be told.
  if (standard && readsInFull(context.user, standard.laboratoryId)) return { ...seen, view: 'full' };
  if (seen.ids[0]!.length === 0) throw notFound('This standard');
  return seen;
}

/** All values of a revision. @throws AppError `not-found` unless the person may know each */
export async function revisionSubject(
  context: SignedInContext,
  revisionId: string,
): Promise<DownstreamSubject> {
  const rows = await readRows<ValueRow>(context.database, `${VALUE} WHERE v.revision_id = :revisionId`, {
    revisionId,
  });
  const seen = await seenValues(context, rows);
  if (rows.length === 0 || seen.ids[0]!.length < rows.length) throw notFound('This certificate');
  return seen;
}

/** Of these values those that the person may know: seen in full, or above one that is. */
async function seenValues(context: SignedInContext, rows: ValueRow[]): Promise<DownstreamSubject> {
  const full = rows.filter((row) => valueView(context.user, row, 'unrelated') === 'full');
  if (full.length === rows.length) return { ids: [full.map((row) => row.id)], view: 'full' };
  const graph = await graphBelow(
    context.database,
    rows.map((row) => row.id),
  );
  const seen = rows.filter((row) => {
    if (full.includes(row)) return true;
    const found = below(graph, [graph.nodeOf(row.id)]);
    return sightOf(graph, found, context.user).some((sight) => sight >= SIGHT.issued);
  });
  return { ids: [seen.map((row) => row.id)], view: full.length > 0 ? 'full' : 'statement' };
}

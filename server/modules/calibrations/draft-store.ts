import { QueryTypes } from 'sequelize';
import type { DraftContent } from '#shared/contracts/drafts.ts';
import { inTransaction } from '#server/db/transaction.ts';
import { AppError, notFound, staleVersion } from '#server/http/app-error.ts';
import { newId } from '#server/http/context.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { draftById, type DraftRow, type DraftState } from './draft.queries.ts';

/** Drafts are documents, not the register: they change in place, version by version, until they are issued. */
export async function createDraft(
  context: SignedInContext,
  laboratoryId: string,
  content: DraftContent,
): Promise<DraftRow> {
  const id = newId(context);
  await context.database.query(
    `INSERT INTO calibration_draft
       (id, laboratory_id, version, content, state, revision_id, created_by, updated_by, created_at, updated_at)
     VALUES (:id, :laboratoryId, 1, :content, 'open', NULL, :by, :by, :now, :now)`,
    {
      type: QueryTypes.INSERT,
      replacements: {
        id,
        laboratoryId,
        content: JSON.stringify(content),
        by: context.user.accountId,
        now: context.clock.now(),
      },
    },
  );
  return existing(context, id);
}

/**
 * Keeps what was typed as the next version. A draft that waited for its signature is open again: what the
 * signatory read is no longer what it says.
 * @throws AppError `stale` with `current`, `unprocessable` where it is issued or discarded
 */
export function saveDraft(
  context: SignedInContext,
  id: string,
  version: number,
  content: DraftContent,
): Promise<DraftRow> {
  return inTransaction(context.database, async () => {
    const draft = await lockedDraft(context, id, version);
    refuseClosed(draft);
    await writeDraft(context, draft, { content, state: 'open' });
    return existing(context, id);
  });
}

/**
 * Sends a draft to be signed, takes it back, or discards it. A discarded draft can be opened again.
 * @throws AppError `stale` with `current`, `unprocessable` where it is issued
 */
export function setDraftState(
  context: SignedInContext,
  id: string,
  version: number,
  state: Exclude<DraftState, 'issued'>,
): Promise<DraftRow> {
  return inTransaction(context.database, async () => {
    const draft = await lockedDraft(context, id, version);
    if (draft.state !== 'discarded' || state !== 'open') refuseClosed(draft);
    await writeDraft(context, draft, { state });
    return existing(context, id);
  });
}

/** Locks a draft and sees that it is still the version that was read. */
export async function lockedDraft(context: SignedInContext, id: string, version: number): Promise<DraftRow> {
  const draft = await draftById(context.database, id, { isLocked: true });
  if (!draft) throw notFound('This draft');
  if (draft.version !== version) throw staleVersion(draft);
  return draft;
}

/** Marks a draft as issued; inside the act that issued it. */
export function closeDraft(context: SignedInContext, draft: DraftRow, revisionId: string): Promise<void> {
  return writeDraft(context, draft, { state: 'issued', revisionId });
}

/** @throws AppError `unprocessable` for a draft that no longer changes */
export function refuseClosed(draft: DraftRow): void {
  if (draft.state !== 'issued' && draft.state !== 'discarded') return;
  throw new AppError('unprocessable', `This draft is ${draft.state}; it does not change any more.`, {
    members: { state: draft.state, revisionId: draft.revisionId },
  });
}

async function writeDraft(
  context: SignedInContext,
  draft: DraftRow,
  changes: { content?: DraftContent; state: DraftState; revisionId?: string },
): Promise<void> {
  await context.database.query(
    `UPDATE calibration_draft
     SET version = version + 1, content = :content, state = :state, revision_id = :revisionId,
         updated_by = :by, updated_at = :now
     WHERE id = :id`,
    {
      type: QueryTypes.UPDATE,
      replacements: {
        id: draft.id,
        content: JSON.stringify(changes.content ?? draft.content),
        state: changes.state,
        revisionId: changes.revisionId ?? null,
        by: context.user.accountId,
        now: context.clock.now(),
      },
    },
  );
}

async function existing(context: SignedInContext, id: string): Promise<DraftRow> {
  const draft = await draftById(context.database, id);
  if (!draft) throw notFound('This draft');
  return draft;
}

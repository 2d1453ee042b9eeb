import { AppError, notFound, staleVersion } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import type { DraftSubject } from './calibrations.policy.ts';
import { draftById } from './draft.queries.ts';
import { presentDraft } from './draft.presenter.ts';
import { showDraft, type ShownDraft } from './show-draft.service.ts';

/**
 * The draft as it stands.
 * @throws AppError `not-found`
 */
export async function openDraft(context: SignedInContext, draftId: string): Promise<ShownDraft> {
  const draft = await draftById(context.database, draftId);
  if (!draft) throw notFound('This draft');
  return showDraft(context, draft);
}

/**
 * Does a write that started from some version. Where another version stands, the conflict carries it as the
 * person would read it, so that both can be laid side by side.
 * @throws AppError `stale` with `current`, a `DraftResponse`
 */
export async function withCurrent<T>(
  context: SignedInContext,
  subject: DraftSubject,
  write: () => Promise<T>,
): Promise<T> {
  try {
    return await write();
  } catch (error) {
    if (!(error instanceof AppError) || error.id !== 'stale') throw error;
    const shown = await openDraft(context, subject.draftId);
    throw staleVersion(presentDraft(shown, context.user, subject));
  }
}

import type { DraftCheck, OpenPoint, ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { documentById } from '#server/modules/documents/index.ts';
import { draftChecks } from './draft-checks.service.ts';
import type { DraftStandard } from './draft-facts.queries.ts';
import { judgeDraft } from './draft-points.service.ts';
import type { DraftRow } from './draft.queries.ts';

/** A draft with everything the sheet shows beside it. */
export interface ShownDraft {
  draft: DraftRow;
  document: { id: string; name: string; size: number } | null;
  standards: DraftStandard[];
  references: ReferenceChoice[];
  points: OpenPoint[];
  checks: DraftCheck[];
}

/** Reads a draft anew: its open points and checks are those of this moment, never stored. */
export async function showDraft(context: SignedInContext, draft: DraftRow): Promise<ShownDraft> {
  const { read, standards, references, points } = await judgeDraft(
    context,
    draft.laboratory.id,
    draft.content,
  );
  const { documentId } = draft.content;
  const document = documentId ? await documentById(context.database, documentId) : null;
  const isOwn = document?.laboratoryId === draft.laboratory.id;
  return {
    draft,
    document: isOwn ? document : null,
    standards,
    references,
    points: draft.state === 'issued' ? [] : points,
    checks: read ? await draftChecks(context, read) : [],
  };
}

import { z } from 'zod';
import { IssuedResponse } from '#shared/contracts/calibrations.ts';
import {
  CreateDraftBody,
  DraftResponse,
  DraftStateBody,
  IssueDraftBody,
  ReferenceListResponse,
  ReferenceQuery,
  SaveDraftBody,
} from '#shared/contracts/drafts.ts';
import { Id } from '#shared/ids.ts';
import { today } from '#server/http/context.ts';
import { route, type Route, type SignedInContext } from '#server/http/route.ts';
import { refuseUnknownLaboratory } from '#server/modules/network/index.ts';
import {
  draftCalibration,
  findReferences,
  issueCalibrationPermission,
  readDraftPermission,
  sendDraftPermission,
  writeDraftPermission,
} from './calibrations.policy.ts';
import { draftSubject } from './draft-subject.queries.ts';
import { presentDraft } from './draft.presenter.ts';
import { openDraft, withCurrent } from './open-draft.service.ts';
import { createDraft, saveDraft, setDraftState } from './draft-store.ts';
import { issueDraft } from './issue-draft.service.ts';
import { presentReferences } from './references.presenter.ts';
import { referenceChoices } from './references.queries.ts';
import { showDraft } from './show-draft.service.ts';

const DraftParams = z.object({ draftId: Id });
type DraftInput = { params: z.infer<typeof DraftParams> };

const subject = (context: SignedInContext, { params }: DraftInput) => draftSubject(context, params.draftId);

export const draftRoutes: Route[] = [
  route({
    method: 'post',
    path: '/api/drafts',
    summary: 'Begins a draft; it may hold anything half-done.',
    permission: draftCalibration,
    body: CreateDraftBody,
    subject: async (context, { body: { laboratoryId } }) => {
      await refuseUnknownLaboratory(context, laboratoryId);
      return { laboratoryId };
    },
    act: async (context, { body }) => {
      const draft = await createDraft(context, body.laboratoryId, body.content);
      return {
        shown: await showDraft(context, draft),
        subject: await draftSubject(context, draft.id),
      };
    },
    response: DraftResponse,
    present: (made, context) => presentDraft(made.shown, context.user, made.subject),
    status: 201,
    location: ({ shown }) => `/api/drafts/${shown.draft.id}`,
  }),
  route({
    method: 'get',
    path: '/api/drafts/:draftId',
    summary: 'A draft with its open points and checks as they are now.',
    permission: readDraftPermission,
    params: DraftParams,
    subject,
    act: (context, { params }) => openDraft(context, params.draftId),
    response: DraftResponse,
    present: (shown, context, about) => presentDraft(shown, context.user, about),
  }),
  route({
    method: 'put',
    path: '/api/drafts/:draftId',
    summary:
      'Keeps what was typed as the next version; another version on the server is a conflict with both.',
    permission: writeDraftPermission,
    params: DraftParams,
    body: SaveDraftBody,
    subject,
    act: (context, { params: { draftId }, body }, about) =>
      withCurrent(context, about, async () =>
        showDraft(context, await saveDraft(context, draftId, body.version, body.content)),
      ),
    response: DraftResponse,
    present: (shown, context, about) => presentDraft(shown, context.user, about),
  }),
  route({
    method: 'post',
    path: '/api/drafts/:draftId/state',
    summary: 'Sends a draft to sign, takes it back or discards it.',
    permission: sendDraftPermission,
    params: DraftParams,
    body: DraftStateBody,
    subject,
    act: (context, { params: { draftId }, body }, about) =>
      withCurrent(context, about, async () =>
        showDraft(context, await setDraftState(context, draftId, body.version, body.state)),
      ),
    response: DraftResponse,
    present: (shown, context, about) => presentDraft(shown, context.user, about),
  }),
  route({
    method: 'post',
    path: '/api/drafts/:draftId/issue',
    summary: 'Issues the calibration under the hand of a signatory, who types the password again.',
    permission: issueCalibrationPermission,
    params: DraftParams,
    body: IssueDraftBody,
    subject,
    act: (context, { body }, about) => withCurrent(context, about, () => issueDraft(context, about, body)),
    response: IssuedResponse,
    present: ({ revisionId, valueUids }) => ({ revisionId, valueUids }),
    status: 201,
    location: ({ revisionId }) => `/api/calibrations/${revisionId}`,
  }),
  route({
    method: 'get',
    path: '/api/references',
    summary:
      'Values a result may name as reference: own ones by part of the number, the issuer’s by a whole number.',
    permission: findReferences,
    query: ReferenceQuery,
    subject: async (context, { query }) => {
      await refuseUnknownLaboratory(context, query.laboratory);
      return { laboratoryId: query.laboratory };
    },
    act: (context, { query }) =>
      referenceChoices(context.database, {
        laboratoryId: query.laboratory,
        issuerId: query.issuer ?? null,
        q: query.q,
        quantity: query.quantity ?? null,
        day: today(context),
      }),
    response: ReferenceListResponse,
    present: (references, context) => ({ references: presentReferences(references, context.user) }),
  }),
];

import {
  infiniteQueryOptions,
  queryOptions,
  useMutation,
  useQueryClient,
  type UseMutationResult,
} from '@tanstack/react-query';
import type { z } from 'zod';
import {
  CalibrationListResponse,
  CalibrationResponse,
  CorrectedResponse,
  DocumentResponse,
  IssuedResponse,
  WithdrawnResponse,
  type CorrectBody,
  type SignedWithdrawBody,
} from '#shared/contracts/calibrations.ts';
import {
  DraftResponse,
  ReferenceListResponse,
  type DraftContent,
  type ReferenceChoice,
} from '#shared/contracts/drafts.ts';
import type { QuantityKind } from '#shared/contracts/common.ts';
import { LaboratoryListResponse } from '#shared/contracts/network.ts';
import { StandardListResponse, StandardResponse, type StandardRow } from '#shared/contracts/standards.ts';
import { get, post, put } from '#src/lib/api-client.ts';
import type { ListSearch } from './list-search.ts';

const ALL = ['calibrations'] as const;

/** The list as the address asks for it, page after page by cursor. */
export function calibrationListQuery({ pages: _pages, open: _open, ...asked }: ListSearch) {
  return infiniteQueryOptions({
    queryKey: [...ALL, 'list', asked],
    queryFn: ({ pageParam, signal }) =>
      get('/api/calibrations', CalibrationListResponse, { query: { ...asked, cursor: pageParam }, signal }),
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
  });
}

/** One issued calibration by its revision. */
export function calibrationQuery(revisionId: string) {
  return queryOptions({
    queryKey: [...ALL, 'one', revisionId],
    queryFn: ({ signal }) => get(`/api/calibrations/${revisionId}`, CalibrationResponse, { signal }),
  });
}

/** A draft with its open points and checks as they are now. */
export function draftQuery(draftId: string) {
  return queryOptions({
    queryKey: [...ALL, 'draft', draftId],
    queryFn: ({ signal }) => get(`/api/drafts/${draftId}`, DraftResponse, { signal }),
  });
}

/** Every laboratory, for choosing an issuer or a filter. */
export const laboratoriesQuery = queryOptions({
  queryKey: ['laboratories', 'today'],
  queryFn: ({ signal }) => get('/api/laboratories', LaboratoryListResponse, { signal }),
});

/** Weights of one laboratory by part of a number or marking. @param limit how many at most, up to 200 */
export async function findStandards(
  laboratoryId: string,
  text: string,
  limit: number,
  signal?: AbortSignal,
): Promise<StandardRow[]> {
  const query = { laboratory: laboratoryId, q: text, limit };
  return (await get('/api/standards', StandardListResponse, { query, signal })).standards;
}

/** The weights of a set by its whole number, in the order of their own. */
export async function weightsOfSet(registryNo: string, signal?: AbortSignal): Promise<StandardRow[]> {
  const query = { q: registryNo, limit: 200 };
  const { standards } = await get('/api/standards', StandardListResponse, { query, signal });
  return standards.filter(({ set }) => set?.registryNo === registryNo);
}

/** One weight, for a draft that begins with it. @throws ApiProblem */
export async function weightById(standardId: string, signal?: AbortSignal): Promise<StandardRow[]> {
  return [(await get(`/api/standards/${standardId}`, StandardResponse, { signal })).standard];
}

/** Values a result may name as its reference. */
export async function findReferences(
  asked: { laboratory: string; issuer?: string | undefined; q: string; quantity?: QuantityKind },
  signal?: AbortSignal,
): Promise<ReferenceChoice[]> {
  return (await get('/api/references', ReferenceListResponse, { query: asked, signal })).references;
}

/** The newest value in force of a weight by its whole number, where this laboratory may name one; else null. */
export async function newestReference(
  laboratory: string,
  registryNo: string,
  signal?: AbortSignal,
): Promise<ReferenceChoice | null> {
  const values = await findReferences({ laboratory, q: registryNo }, signal);
  const standing = values.filter(
    (one) => one.registryNo === registryNo && one.state === 'in force' && one.isNewest,
  );
  return standing.find((one) => one.quantity === 'conventional mass') ?? standing[0] ?? null;
}

/** Begins a draft. @throws ApiProblem */
export function createDraft(laboratoryId: string, content: DraftContent): Promise<DraftResponse> {
  return post('/api/drafts', { laboratoryId, content }, DraftResponse);
}

/** Keeps what was typed as the next version. @throws ApiProblem `stale` with `current` */
export function saveDraft(draftId: string, version: number, content: DraftContent): Promise<DraftResponse> {
  return put(`/api/drafts/${draftId}`, { version, content }, DraftResponse);
}

/** Keeps a file for a laboratory. */
export function useAddDocument(laboratoryId: string): Mutation<z.infer<typeof DocumentResponse>, File> {
  return useMutation({
    mutationFn: (file) =>
      post('/api/documents', file, DocumentResponse, {
        query: { laboratory: laboratoryId, name: file.name },
      }),
  });
}

/** Sends a draft to sign, takes it back or discards it. */
export function useSetDraftState(
  draftId: string,
): Mutation<DraftResponse, { version: number; state: 'open' | 'sent to sign' | 'discarded' }> {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body) => post(`/api/drafts/${draftId}/state`, body, DraftResponse),
    onSuccess: (draft) => {
      queries.setQueryData(draftQuery(draftId).queryKey, draft);
      void queries.invalidateQueries({ queryKey: [...ALL, 'list'] });
      void queries.invalidateQueries({ queryKey: ['desk'] });
    },
  });
}

/** Issues a draft under the signatory's password. Everything that shows values is read anew. */
export function useIssueDraft(
  draftId: string,
): Mutation<IssuedResponse, { version: number; password: string }> {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body) => post(`/api/drafts/${draftId}/issue`, body, IssuedResponse),
    onSuccess: () => {
      queries.removeQueries({ queryKey: draftQuery(draftId).queryKey });
      void queries.invalidateQueries();
    },
  });
}

/** Withdraws a calibration under the signatory's password. Everything that shows values is read anew. */
export function useWithdraw(
  revisionId: string,
): Mutation<WithdrawnResponse, z.infer<typeof SignedWithdrawBody>> {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body) => post(`/api/calibrations/${revisionId}/withdraw`, body, WithdrawnResponse),
    onSuccess: ({ actSeq: _actSeq, ...calibration }) => {
      queries.setQueryData(calibrationQuery(revisionId).queryKey, calibration);
      void queries.invalidateQueries();
    },
  });
}

/** Issues the next revision with some results corrected. Everything that shows values is read anew. */
export function useCorrect(revisionId: string): Mutation<CorrectedResponse, z.infer<typeof CorrectBody>> {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body) => post(`/api/calibrations/${revisionId}/correct`, body, CorrectedResponse),
    onSuccess: () => void queries.invalidateQueries(),
  });
}

type Mutation<Answer, Asked> = UseMutationResult<Answer, Error, Asked>;

import { infiniteQueryOptions, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  AuditAskedResponse,
  AuditFindingsResponse,
  AuditListResponse,
  AuditResponse,
  AuditStoppedResponse,
  type AuditBody,
  type AuditFindingsQuery,
} from '#shared/contracts/audits.ts';
import { get, post } from '#src/lib/api-client.ts';

const ALL = ['audits'];
/** How often a running audit is asked how far it is, ms. */
const ASK_EVERY = 700;

/** Which findings are asked for. */
export type FindingFilter = Omit<AuditFindingsQuery, 'cursor'>;

/** Whether an audit is still to end. */
export function isUnderWay({ state }: { state: AuditResponse['state'] }): boolean {
  return state === 'waiting' || state === 'running';
}

/** The audits in one's reach, newest first, page after page; asked again while one is under way. */
export const auditListQuery = infiniteQueryOptions({
  queryKey: [...ALL, 'list'],
  queryFn: ({ pageParam, signal }) =>
    get('/api/audits', AuditListResponse, { query: { cursor: pageParam }, signal }),
  initialPageParam: null as string | null,
  getNextPageParam: (last) => last.nextCursor,
  refetchInterval: ({ state }) =>
    state.data?.pages.some(({ audits }) => audits.some(isUnderWay)) ? 3 * ASK_EVERY : false,
});

/** One audit; asked again and again while it is under way. */
export function auditQuery(auditId: string) {
  return queryOptions({
    queryKey: [...ALL, 'one', auditId],
    queryFn: ({ signal }) => get(`/api/audits/${auditId}`, AuditResponse, { signal }),
    refetchInterval: ({ state }) => (state.data && isUnderWay(state.data) ? ASK_EVERY : false),
  });
}

/** What fails or cannot be judged, page after page; with the first page, how many there are of each rule. */
export function findingsQuery(auditId: string, filter: FindingFilter) {
  return infiniteQueryOptions({
    queryKey: [...ALL, 'findings', auditId, filter],
    queryFn: ({ pageParam: cursor, signal }) =>
      get(`/api/audits/${auditId}/findings`, AuditFindingsResponse, { query: { ...filter, cursor }, signal }),
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
    // A finished audit never changes.
    staleTime: Infinity,
  });
}

/** Asks for an audit. */
export function useAskAudit() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: AuditBody) => post('/api/audits', body, AuditAskedResponse),
    onSuccess: () => client.invalidateQueries({ queryKey: [...ALL, 'list'] }),
  });
}

/** Asks the same question again. */
export function useRepeatAudit(auditId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => post(`/api/audits/${auditId}/repeat`, {}, AuditAskedResponse),
    onSuccess: () => client.invalidateQueries({ queryKey: ALL, refetchType: 'none' }),
  });
}

/** Stops an audit that is under way. */
export function useStopAudit(auditId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => post(`/api/audits/${auditId}/stop`, {}, AuditStoppedResponse),
    onSuccess: () => client.invalidateQueries({ queryKey: ALL }),
  });
}

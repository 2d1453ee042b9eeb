import {
  infiniteQueryOptions,
  queryOptions,
  useMutation,
  useQueryClient,
  type UseMutationResult,
} from '@tanstack/react-query';
import type { z } from 'zod';
import { DistanceResponse } from '#shared/contracts/distance.ts';
import {
  DownstreamResponse,
  WhatIfResponse,
  type DownstreamBy,
  type WhatIfChange,
  type WhatIfSort,
} from '#shared/contracts/downstream.ts';
import {
  DryRunListResponse,
  DryRunResponse,
  NamedResponse,
  type DryRunNoteBody,
  type SaveDryRunBody,
} from '#shared/contracts/dry-runs.ts';
import { get, post } from '#src/lib/api-client.ts';
import type { AskedOfRows } from './what-if-search.ts';

/** The days and the grouping of a question; today where a day is left out. */
export interface GroupedBy {
  day?: string | undefined;
  known?: string | undefined;
  by: DownstreamBy;
}

/** Changes, what counts as material (a part of U), and the order of the rows. */
export interface Supposition extends GroupedBy {
  changes: WhatIfChange[];
  threshold: number;
  sort: WhatIfSort;
}

/** A page of a group's rows, gathered for a file: as many at once as are given out. */
interface AskedPage {
  group: string;
  cursor: string | undefined;
  signal: AbortSignal;
}
const MOST_ROWS = 500;

/** Changes as the address asks them. */
export function suppositionOf(
  changes: WhatIfChange[],
  { day, known, by, sort, beyond }: AskedOfRows,
): Supposition {
  return { changes, threshold: beyond / 100, day, known, by, sort };
}

/** Who leans on a value, in groups. */
export function downstreamQuery(uid: string, asked: GroupedBy) {
  return queryOptions({
    queryKey: ['downstream', uid, asked],
    queryFn: ({ signal }) =>
      get(`/api/downstream/${uid}`, DownstreamResponse, { query: { ...asked }, signal }),
  });
}

/** The rows of one group, page after page. */
export function downstreamRowsQuery(uid: string, asked: GroupedBy, group: string) {
  return infiniteQueryOptions({
    queryKey: ['downstream', uid, asked, 'rows', group],
    queryFn: async ({ pageParam: cursor, signal }) => {
      const query = { ...asked, group, cursor };
      return (await get(`/api/downstream/${uid}`, DownstreamResponse, { query, signal })).page!;
    },
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
  });
}

/** A page of who leans on a value, for a file. */
export async function downstreamPage(uid: string, asked: GroupedBy, { signal, ...page }: AskedPage) {
  const query = { ...asked, ...page, limit: MOST_ROWS };
  return (await get(`/api/downstream/${uid}`, DownstreamResponse, { query, signal })).page!;
}

/** The interval of an exposure beside what is asked of any list. */
export interface ExposedIn extends GroupedBy {
  lastGood: string;
  firstBad: string;
}

/** What leaned on a weight from its last good day to its first bad one, in groups. */
export function exposureQuery(standardId: string, asked: ExposedIn) {
  return queryOptions({
    queryKey: ['exposure', standardId, asked],
    queryFn: ({ signal }) =>
      get(`/api/exposure/${standardId}`, DownstreamResponse, { query: { ...asked }, signal }),
  });
}

/** The rows of one group of an exposure, page after page. */
export function exposureRowsQuery(standardId: string, asked: ExposedIn, group: string) {
  return infiniteQueryOptions({
    queryKey: ['exposure', standardId, asked, 'rows', group],
    queryFn: async ({ pageParam: cursor, signal }) => {
      const query = { ...asked, group, cursor };
      return (await get(`/api/exposure/${standardId}`, DownstreamResponse, { query, signal })).page!;
    },
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
  });
}

/** A page of an exposure, for a file. */
export async function exposurePage(standardId: string, asked: ExposedIn, { signal, ...page }: AskedPage) {
  const query = { ...asked, ...page, limit: MOST_ROWS };
  return (await get(`/api/exposure/${standardId}`, DownstreamResponse, { query, signal })).page!;
}

/** What a change would do, in groups. It is posted for its length only: asking changes nothing. */
export function whatIfQuery({ sort: _order, ...asked }: Supposition) {
  return queryOptions({
    queryKey: ['what-if', asked],
    queryFn: ({ signal }) => post('/api/what-if', asked, WhatIfResponse, { signal }),
  });
}

/** The rows of one group of a dry run, page after page in the order asked for. */
export function whatIfRowsQuery(asked: Supposition, group: string) {
  return infiniteQueryOptions({
    queryKey: ['what-if', asked, 'rows', group],
    queryFn: async ({ pageParam, signal }) => {
      const body = { ...asked, group, cursor: pageParam ?? undefined };
      return (await post('/api/what-if', body, WhatIfResponse, { signal })).page!;
    },
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
  });
}

/** A page of a dry run's rows, for a file. */
export async function whatIfPage(asked: Supposition, { signal, ...page }: AskedPage) {
  const body = { ...asked, ...page, limit: MOST_ROWS };
  return (await post('/api/what-if', body, WhatIfResponse, { signal })).page!;
}

/** What changes are about, in words, and which real acts are open. */
export function namedQuery(changes: WhatIfChange[]) {
  return queryOptions({
    queryKey: ['what-if', 'named', changes],
    queryFn: ({ signal }) => post('/api/what-if/named', { changes }, NamedResponse, { signal }),
  });
}

/** How wrong each ancestor of a value may be before it leaves its class. */
export function distanceQuery(valueUid: string) {
  return queryOptions({
    queryKey: ['chains', 'distance', valueUid],
    queryFn: ({ signal }) => get(`/api/chains/${valueUid}/distance`, DistanceResponse, { signal }),
  });
}

/** Dry runs kept for one's laboratories, page after page. */
export const dryRunListQuery = infiniteQueryOptions({
  queryKey: ['dry-runs', 'list'],
  queryFn: ({ pageParam, signal }) =>
    get('/api/dry-runs', DryRunListResponse, { query: { cursor: pageParam }, signal }),
  initialPageParam: null as string | null,
  getNextPageParam: (last) => last.nextCursor,
});

/** One dry run with its question. */
export function dryRunQuery(id: string) {
  return queryOptions({
    queryKey: ['dry-runs', 'one', id],
    queryFn: ({ signal }) => get(`/api/dry-runs/${id}`, DryRunResponse, { signal }),
  });
}

type Mutation<Answer, Asked> = UseMutationResult<Answer, Error, Asked>;

/** Keeps the question of a dry run. */
export function useSaveDryRun(): Mutation<DryRunResponse, z.input<typeof SaveDryRunBody>> {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body) => post('/api/dry-runs', body, DryRunResponse),
    onSuccess: (run) => {
      queries.setQueryData(dryRunQuery(run.id).queryKey, run);
      return queries.invalidateQueries({ queryKey: dryRunListQuery.queryKey });
    },
  });
}

/** Adds a remark to a dry run, or discards it. */
export function useNoteDryRun(id: string): Mutation<DryRunResponse, z.infer<typeof DryRunNoteBody>> {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body) => post(`/api/dry-runs/${id}/notes`, body, DryRunResponse),
    onSuccess: (run) => {
      queries.setQueryData(dryRunQuery(id).queryKey, run);
      return queries.invalidateQueries({ queryKey: dryRunListQuery.queryKey });
    },
  });
}

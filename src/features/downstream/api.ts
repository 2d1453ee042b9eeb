import { infiniteQueryOptions, queryOptions } from '@tanstack/react-query';
import {
  DistanceResponse,
  DownstreamResponse,
  WhatIfResponse,
  type DownstreamBy,
  type WhatIfChange,
  type WhatIfSort,
} from '#shared/contracts/downstream.ts';
import { get, post } from '#src/lib/api-client.ts';

/** The days and the grouping of a question; today where a day is left out. */
export interface GroupedBy {
  day?: string | undefined;
  known?: string | undefined;
  by: DownstreamBy;
}

/** One change, what counts as material (a part of U), and the order of the rows. */
export interface Supposition extends GroupedBy {
  changes: WhatIfChange[];
  threshold: number;
  sort: WhatIfSort;
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

/** How wrong each ancestor of a value may be before it leaves its class. */
export function distanceQuery(valueUid: string) {
  return queryOptions({
    queryKey: ['chains', 'distance', valueUid],
    queryFn: ({ signal }) => get(`/api/chains/${valueUid}/distance`, DistanceResponse, { signal }),
  });
}

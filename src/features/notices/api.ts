import { infiniteQueryOptions, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { WhatIfResponse, type WhatIfChange } from '#shared/contracts/downstream.ts';
import {
  NoticeListResponse,
  NoticeResponse,
  PublishNoticeResponse,
  ScaleVersionListResponse,
  type PublishNoticeBody,
} from '#shared/contracts/notices.ts';
import { get, post } from '#src/lib/api-client.ts';

const ALL = ['notices'] as const;

/** Every notice, by the day it takes effect. */
export const noticeListQuery = queryOptions({
  queryKey: [...ALL, 'list'],
  queryFn: ({ signal }) => get('/api/notices', NoticeListResponse, { signal }),
});

/** Every version of the mass scale, in the order of their days. */
export const scaleVersionListQuery = queryOptions({
  queryKey: [...ALL, 'scale versions'],
  queryFn: ({ signal }) => get('/api/scale-versions', ScaleVersionListResponse, { signal }),
});

/** One notice with what it brings to one's own values, page after page. */
export function noticeQuery(noticeId: string) {
  return infiniteQueryOptions({
    queryKey: [...ALL, 'one', noticeId],
    queryFn: ({ pageParam, signal }) =>
      get(`/api/notices/${noticeId}`, NoticeResponse, { query: { cursor: pageParam }, signal }),
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
  });
}

/** What a notice would do, before it is published: counts only. Asking changes nothing. */
export function noticePreviewQuery(changes: WhatIfChange[]) {
  return queryOptions({
    queryKey: ['what-if', 'notice', changes],
    queryFn: ({ signal }) => post('/api/what-if', { changes }, WhatIfResponse, { signal }),
  });
}

/** Publishes a notice: what chains, values and dry runs say may be another from now on. */
export function usePublishNotice() {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof PublishNoticeBody>) =>
      post('/api/notices', body, PublishNoticeResponse),
    onSuccess: () => queries.invalidateQueries(),
  });
}

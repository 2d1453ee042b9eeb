import { infiniteQueryOptions, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { LaboratoryListResponse } from '#shared/contracts/network.ts';
import {
  EpochResponse,
  RegisteredSetResponse,
  RegisteredStandardResponse,
  StandardListResponse,
  StandardResponse,
  type OpenEpochBody,
  type RegisterSetBody,
  type RegisterStandardBody,
} from '#shared/contracts/standards.ts';
import { get, post } from '#src/lib/api-client.ts';
import type { ListSearch } from './list-search.ts';

const ALL = ['standards'] as const;

/** The list as the address asks for it, page after page by cursor. */
export function standardListQuery({ pages: _pages, open: _open, ...asked }: ListSearch) {
  return infiniteQueryOptions({
    queryKey: [...ALL, 'list', asked],
    queryFn: ({ pageParam, signal }) =>
      get('/api/standards', StandardListResponse, { query: { ...asked, cursor: pageParam }, signal }),
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
  });
}

/** One standard with its history. */
export function standardQuery(standardId: string) {
  return queryOptions({
    queryKey: [...ALL, 'one', standardId],
    queryFn: ({ signal }) => get(`/api/standards/${standardId}`, StandardResponse, { signal }),
  });
}

/** Every laboratory, for the filter. */
export const laboratoryChoicesQuery = queryOptions({
  queryKey: ['network', 'list'],
  queryFn: ({ signal }) => get('/api/laboratories', LaboratoryListResponse, { signal }),
});

/** Registers one weight; every list may have changed. */
export function useRegisterStandard() {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body: RegisterStandardBody) => post('/api/standards', body, RegisteredStandardResponse),
    onSuccess: () => queries.invalidateQueries({ queryKey: ALL }),
  });
}

/** Registers a set with all its weights. */
export function useRegisterSet() {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body: RegisterSetBody) => post('/api/sets', body, RegisteredSetResponse),
    onSuccess: () => queries.invalidateQueries({ queryKey: ALL }),
  });
}

/** Opens a new epoch of a standard. */
export function useOpenEpoch(standardId: string) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body: z.infer<typeof OpenEpochBody>) =>
      post(`/api/standards/${standardId}/epochs`, body, EpochResponse),
    onSuccess: () => queries.invalidateQueries({ queryKey: ALL }),
  });
}

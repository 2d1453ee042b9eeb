import { queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import { DeskResponse, FindResponse } from '#shared/contracts/desk.ts';
import { get } from '#src/lib/api-client.ts';

/** One thing the search box found. */
export type Found = z.infer<typeof FindResponse>['found'][number];

/** What needs this person today. */
export const deskQuery = queryOptions({
  queryKey: ['desk'],
  queryFn: ({ signal }) => get('/api/desk', DeskResponse, { signal }),
});

/** Anything by registry number, marking, certificate number or laboratory. */
export async function find(text: string, signal: AbortSignal): Promise<Found[]> {
  const { found } = await get('/api/find', FindResponse, { query: { q: text }, signal });
  return found;
}

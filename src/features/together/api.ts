import { queryOptions } from '@tanstack/react-query';
import { TogetherResponse } from '#shared/contracts/together.ts';
import { post } from '#src/lib/api-client.ts';
import type { Placed } from './search.ts';

/** Several weights together. It is posted for its length only: asking changes nothing. */
export function togetherQuery(placed: readonly Placed[]) {
  const body = { valueUids: placed.map(({ uid }) => uid), signs: placed.map(({ sign }) => sign) };
  return queryOptions({
    queryKey: ['chains', 'together', body],
    queryFn: ({ signal }) => post('/api/chains/together', body, TogetherResponse, { signal }),
  });
}

import { queryOptions } from '@tanstack/react-query';
import { z } from 'zod';
import { ChainValue } from '#shared/contracts/chains.ts';
import { TogetherResponse } from '#shared/contracts/together.ts';
import { get, post } from '#src/lib/api-client.ts';
import type { Placed } from './search.ts';

/** Several weights together. It is posted for its length only: asking changes nothing. */
export function togetherQuery(placed: readonly Placed[]) {
  const body = { valueUids: placed.map(({ uid }) => uid), signs: placed.map(({ sign }) => sign) };
  return queryOptions({
    queryKey: ['chains', 'together', body],
    queryFn: ({ signal }) => post('/api/chains/together', body, TogetherResponse, { signal }),
  });
}

/** As much of a chain as names the weight it is about. */
const NamedChain = z.object({
  focusUid: z.string(),
  nodes: z.array(
    z.union([
      ChainValue.pick({ type: true, uid: true, registryNo: true, nominal: true, certificateNo: true }),
      z.object({ type: z.literal('source') }),
    ]),
  ),
});

/** What one value is, where no answer about several names it: null where its chain names none. */
export function placedQuery(uid: string) {
  return queryOptions({
    queryKey: ['chains', 'named', uid],
    retry: false,
    queryFn: async ({ signal }) => {
      const chain = await get(`/api/chains/${uid}`, NamedChain, { query: { checks: 'packed' }, signal });
      return chain.nodes.find((node) => node.type === 'value' && node.uid === chain.focusUid) ?? null;
    },
  });
}

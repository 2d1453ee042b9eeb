import { queryOptions } from '@tanstack/react-query';
import { ChainLifeResponse } from '#shared/contracts/chain-life.ts';
import {
  type ChainAs,
  type ChainResponse,
  ChainSearchResponse,
  CovarianceResponse,
} from '#shared/contracts/chains.ts';
import { PackedChainResponse, unpackChecks } from '#shared/contracts/packed-checks.ts';
import { get } from '#src/lib/api-client.ts';

/** The question behind a chain, apart from the value: the day and the knowledge day, today where left out, and how its links stand. */
export interface ChainDays {
  day?: string | undefined;
  known?: string | undefined;
  as?: ChainAs | undefined;
}

/** The chain of a value, with its numbers and checks. */
export function chainQuery(valueUid: string, days: ChainDays) {
  return queryOptions({
    queryKey: ['chains', 'detail', valueUid, days],
    queryFn: async ({ signal }): Promise<ChainResponse> => {
      const query = { day: days.day, known: days.known, as: days.as, checks: 'packed' };
      const reply = await get(`/api/chains/${valueUid}`, PackedChainResponse, { query, signal });
      return { ...reply, checks: unpackChecks(reply.checks) };
    },
  });
}

/**
 * Which chain to open: values in force of weights this person reads in full.
 * @param isFailing only those that fail in the newest audit of their laboratory
 */
export function chainChoicesQuery(q: string, isFailing = false) {
  const query = { q, failing: isFailing ? '1' : undefined };
  return queryOptions({
    queryKey: ['chains', 'list', query],
    queryFn: ({ signal }) => get('/api/chains', ChainSearchResponse, { query, signal }),
  });
}

/** How two values vary together, through what both lean on. */
export function covarianceQuery(valueUid: string, otherUid: string) {
  return queryOptions({
    queryKey: ['chains', 'covariance', valueUid, otherUid],
    queryFn: ({ signal }) =>
      get(`/api/chains/${valueUid}/covariance/${otherUid}`, CovarianceResponse, { signal }),
  });
}

/** What befell a weight and what it rests on. */
export function chainLifeQuery(valueUid: string) {
  return queryOptions({
    queryKey: ['chains', 'life', valueUid],
    queryFn: ({ signal }) => get(`/api/chains/${valueUid}/life`, ChainLifeResponse, { signal }),
  });
}

import { useQuery } from '@tanstack/react-query';
import type { ChainResponse, CovarianceResponse } from '#shared/contracts/chains.ts';
import type { z } from 'zod';
import { chainQuery, covarianceQuery } from '../api.ts';
import type { ChainQuestion } from '../question.ts';

/** A second weight beside the one in question: its chain, and how both vary together. */
export interface SecondWeight {
  chain: ChainResponse | null;
  together: z.infer<typeof CovarianceResponse> | null;
  error: Error | null;
}

/** What the question says of a second weight; null where it names none. */
export function useSecondWeight(focusUid: string, question: ChainQuestion): SecondWeight | null {
  const uid = question.with === focusUid ? undefined : question.with;
  const days = { day: question.day, known: question.known };
  const chain = useQuery({ ...chainQuery(uid ?? '', days), enabled: uid !== undefined });
  const together = useQuery({ ...covarianceQuery(focusUid, uid ?? ''), enabled: uid !== undefined });
  if (uid === undefined) return null;
  return {
    chain: chain.data ?? null,
    together: together.data ?? null,
    error: chain.error ?? together.error,
  };
}

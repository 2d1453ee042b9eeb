import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { sessionQuery } from '#src/features/identity/api.ts';
import { ApiProblem } from '#src/lib/api-problem.ts';
import { readingProgress } from '#src/lib/register-being-read.ts';

/** Between two looks at a server that is reading its register. */
const READING_DELAY_MS = 700;

/**
 * The one server cache. Retries only what may mend itself: no answer, a server that is not ready, and one that is
 * reading its register for as long as it takes.
 */
export function makeQueryClient(): QueryClient {
  const client: QueryClient = new QueryClient({
    queryCache: new QueryCache({ onError: (error) => noteSignedOut(client, error) }),
    mutationCache: new MutationCache({ onError: (error) => noteSignedOut(client, error) }),
    defaultOptions: {
      queries: {
        staleTime: 30_000,
        retry: (failures, error) => readingProgress(error) !== null || (failures < 2 && isPassing(error)),
        retryDelay: (failures, error) =>
          readingProgress(error) ? READING_DELAY_MS : Math.min(1000 * 2 ** failures, 30_000),
      },
      mutations: { retry: false },
    },
  });
  return client;
}

/** The client of the running application; loaders prime it, components read from it. */
export const queryClient = makeQueryClient();

function isPassing(error: Error): boolean {
  return error instanceof ApiProblem && [0, 502, 503, 504].includes(error.status);
}

/** A session that ended meanwhile: the root layout sees it and asks to sign in, with the way back. */
function noteSignedOut(client: QueryClient, error: Error): void {
  if (error instanceof ApiProblem && error.id === 'not-signed-in') {
    void client.invalidateQueries({ queryKey: sessionQuery.queryKey });
  }
}

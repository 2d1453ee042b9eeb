import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { SessionResponse, SignOutResponse, type SignInBody } from '#shared/contracts/identity.ts';
import { get, post, remove } from '#src/lib/api-client.ts';

/** Who is signed in. Asked once; sign-in, sign-out and a refused request make it asked again. */
export const sessionQuery = queryOptions({
  queryKey: ['session'],
  queryFn: ({ signal }) => get('/api/session', SessionResponse, { signal }),
  staleTime: Infinity,
  refetchOnWindowFocus: 'always',
});

/** Signs in; whatever was read by somebody before is forgotten. */
export function useSignIn() {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body: SignInBody) => post('/api/session', body, SessionResponse),
    onSuccess: (session) => {
      queries.removeQueries({ predicate: (query) => query.queryKey[0] !== sessionQuery.queryKey[0] });
      queries.setQueryData(sessionQuery.queryKey, session);
    },
  });
}

/** Signs out. The caller then loads the page anew, so that nothing read stays in the memory of the tab. */
export function useSignOut() {
  return useMutation({ mutationFn: () => remove('/api/session', SignOutResponse) });
}

import { useSuspenseQuery } from '@tanstack/react-query';
import { queryClient } from '#src/app/query-client.ts';
import { deskQuery } from '#src/features/desk/api.ts';
import { Desk } from '#src/features/desk/components/desk.tsx';

/** Primes the desk while its module is still on the way. */
export async function loader(): Promise<null> {
  await queryClient.query({ ...deskQuery, staleTime: 0 });
  return null;
}

/** What needs this person today. */
export function Component() {
  const { data } = useSuspenseQuery(deskQuery);
  return <Desk desk={data} />;
}

import { useSuspenseQuery } from '@tanstack/react-query';
import { queryClient } from '#src/app/query-client.ts';
import { laboratoryListQuery } from '#src/features/network/api.ts';
import { LaboratoryList } from '#src/features/network/components/laboratory-list.tsx';

/** Primes the list while its module is still on the way. */
export async function loader(): Promise<null> {
  await queryClient.query({ ...laboratoryListQuery, staleTime: 5_000 });
  return null;
}

/** The laboratories of the network. */
export function Component() {
  const { data } = useSuspenseQuery(laboratoryListQuery);
  return <LaboratoryList laboratories={data.laboratories} />;
}

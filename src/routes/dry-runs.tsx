import { queryClient } from '#src/app/query-client.ts';
import { dryRunListQuery } from '#src/features/downstream/api.ts';
import { DryRunList } from '#src/features/downstream/components/dry-run-list.tsx';

/** Primes the first page of the list. */
export async function loader(): Promise<null> {
  await queryClient.infiniteQuery(dryRunListQuery);
  return null;
}

/** Dry runs kept for one's laboratories. */
export function Component() {
  return <DryRunList />;
}

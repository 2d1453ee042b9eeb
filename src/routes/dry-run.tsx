import { useSuspenseQuery } from '@tanstack/react-query';
import { useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { queryClient } from '#src/app/query-client.ts';
import { dryRunQuery } from '#src/features/downstream/api.ts';
import { DryRunScreen } from '#src/features/downstream/components/dry-run-screen.tsx';
import { readRunView, runViewParameters, type RunView } from '#src/features/downstream/run-view.ts';

/** Primes the question; its answer is worked out on the screen, which says so meanwhile. */
export async function loader({ params }: LoaderFunctionArgs): Promise<null> {
  await queryClient.query({ ...dryRunQuery(params.dryRunId!), staleTime: 5_000 });
  return null;
}

/** One kept dry run; how it is looked at stands in the address. */
export function Component() {
  const { dryRunId } = useParams();
  const [parameters, setParameters] = useSearchParams();
  const { data } = useSuspenseQuery(dryRunQuery(dryRunId!));
  const view = readRunView(parameters);
  const change = (next: Partial<RunView>) =>
    setParameters(runViewParameters({ ...view, ...next }), { replace: true, preventScrollReset: true });
  return <DryRunScreen run={data} view={view} onView={change} />;
}

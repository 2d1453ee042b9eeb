import { useSuspenseQuery } from '@tanstack/react-query';
import { redirect, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { dryRunQuery } from '#src/features/downstream/api.ts';
import { MEASURES, type Measure } from '#src/features/downstream/compare-runs.ts';
import { CompareScreen } from '#src/features/downstream/components/compare-screen.tsx';
import { readSearch } from '#src/features/downstream/search.ts';

/** Primes both questions; without two of them there is nothing to compare. */
export async function loader({ request }: LoaderFunctionArgs): Promise<Response | null> {
  const { searchParams } = new URL(request.url);
  const [one, other] = [searchParams.get('one'), searchParams.get('other')];
  if (!one || !other) return redirect(paths.dryRuns.href());
  await Promise.all([one, other].map((id) => queryClient.query({ ...dryRunQuery(id), staleTime: 5_000 })));
  return null;
}

/** Two kept dry runs side by side. */
export function Component() {
  const [parameters, setParameters] = useSearchParams();
  const one = useSuspenseQuery(dryRunQuery(parameters.get('one')!));
  const other = useSuspenseQuery(dryRunQuery(parameters.get('other')!));
  const { by } = readSearch(parameters);
  const measure = MEASURES.find((each) => each === parameters.get('measure'));
  const change = (next: { by?: string; measure?: Measure }) =>
    setParameters(
      { ...Object.fromEntries(parameters), ...next },
      { replace: true, preventScrollReset: true },
    );
  return <CompareScreen one={one.data} other={other.data} by={by} measure={measure} onChange={change} />;
}

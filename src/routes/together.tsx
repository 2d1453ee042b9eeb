import { useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { queryClient } from '#src/app/query-client.ts';
import { togetherQuery } from '#src/features/together/api.ts';
import { TogetherScreen } from '#src/features/together/components/together-screen.tsx';
import { placedParameters, readPlaced } from '#src/features/together/search.ts';

/** Asks early; an answer that is refused is said on the screen, where the weights can be changed. */
export function loader({ request }: LoaderFunctionArgs): null {
  const placed = readPlaced(new URL(request.url).searchParams);
  if (placed.length > 1) void queryClient.prefetchQuery({ ...togetherQuery(placed), staleTime: 10_000 });
  return null;
}

/** Several weights on the pans; which they are stands in the address. */
export function Component() {
  const [parameters, setParameters] = useSearchParams();
  return (
    <TogetherScreen
      placed={readPlaced(parameters)}
      onPlaced={(placed) =>
        setParameters(placedParameters(placed), { replace: true, preventScrollReset: true })
      }
    />
  );
}

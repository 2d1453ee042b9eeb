import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { nominalText } from '#shared/numbers/nominal.ts';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { ExposureScreen } from '#src/features/downstream/components/exposure-screen.tsx';
import {
  readExposureSearch,
  withExposureChange,
  type ExposureSearch,
} from '#src/features/downstream/exposure-search.ts';
import { standardQuery } from '#src/features/standards/api.ts';

/** Primes the weight; what leaned on it is read on the screen, which says so meanwhile. */
export async function loader({ params }: LoaderFunctionArgs): Promise<null> {
  await queryClient.query({ ...standardQuery(params.standardId!), staleTime: 5_000 });
  return null;
}

/** What leaned on a weight while it was in doubt; the interval stands in the address. */
export function Component() {
  const { standardId } = useParams();
  const [parameters, setParameters] = useSearchParams();
  const { data } = useSuspenseQuery(standardQuery(standardId!));
  const search = readExposureSearch(parameters);
  const change = (next: Partial<ExposureSearch>) =>
    setParameters(withExposureChange(search, next), { replace: true, preventScrollReset: true });
  const { registryNo, nominal, class: weightClass } = data.standard;
  return (
    <ExposureScreen
      standardId={standardId!}
      registryNo={registryNo}
      sub={
        <>
          {`${nominalText(nominal)}${weightClass ? `, class ${weightClass}` : ''} · `}
          <Link to={paths.standard.href(standardId!)} className="text-ink underline underline-offset-3">
            the weight
          </Link>
        </>
      }
      search={search}
      onChange={change}
    />
  );
}

import { useCallback } from 'react';
import { useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { queryClient } from '#src/app/query-client.ts';
import { calibrationListQuery } from '#src/features/calibrations/api.ts';
import { CalibrationList } from '#src/features/calibrations/components/calibration-list.tsx';
import {
  changeListSearch,
  readListSearch,
  writeListSearch,
  type ListSearch,
} from '#src/features/calibrations/list-search.ts';

/** Primes as many pages as the address shows. */
export async function loader({ request }: LoaderFunctionArgs): Promise<null> {
  const search = readListSearch(new URL(request.url).searchParams);
  await queryClient.infiniteQuery({ ...calibrationListQuery(search), pages: search.pages });
  return null;
}

/** The list of calibrations; everything it shows is in the address. */
export function Component() {
  const [parameters, setParameters] = useSearchParams();
  const search = readListSearch(parameters);
  const onSearch = useCallback(
    (change: Partial<ListSearch>) =>
      setParameters((before) => writeListSearch(changeListSearch(readListSearch(before), change)), {
        replace: true,
        preventScrollReset: true,
      }),
    [setParameters],
  );
  return <CalibrationList search={search} onSearch={onSearch} />;
}

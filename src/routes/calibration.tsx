import { useSuspenseQuery } from '@tanstack/react-query';
import { useLocation, useParams, type LoaderFunctionArgs } from 'react-router';
import { queryClient } from '#src/app/query-client.ts';
import { calibrationQuery } from '#src/features/calibrations/api.ts';
import { CalibrationSheet } from '#src/features/calibrations/components/calibration-sheet.tsx';

/** Primes the sheet while its module is still on the way. */
export async function loader({ params }: LoaderFunctionArgs): Promise<null> {
  await queryClient.query({ ...calibrationQuery(params['revisionId'] ?? ''), staleTime: 0 });
  return null;
}

/** One issued calibration. */
export function Component() {
  const { revisionId = '' } = useParams();
  const { data } = useSuspenseQuery(calibrationQuery(revisionId));
  const state: unknown = useLocation().state;
  return <CalibrationSheet {...data} isJustIssued={state === 'just issued'} />;
}

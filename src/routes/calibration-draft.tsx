import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import {
  useLoaderData,
  useNavigate,
  useParams,
  useSearchParams,
  type LoaderFunctionArgs,
} from 'react-router';
import type { StandardRow } from '#shared/contracts/standards.ts';
import { paths, SAME_SCREEN } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { draftQuery, weightsOfSet } from '#src/features/calibrations/api.ts';
import { DraftPlace } from '#src/features/calibrations/draft/draft-place.tsx';

const NEW = 'new';

/** Primes the draft; for one that its first change will create, the weights of the set it is about. */
export async function loader({ params, request }: LoaderFunctionArgs): Promise<StandardRow[]> {
  const { draftId = NEW } = params;
  if (draftId === NEW) {
    const set = new URL(request.url).searchParams.get('set');
    return set ? weightsOfSet(set, request.signal) : [];
  }
  await queryClient.query({ ...draftQuery(draftId), staleTime: 1000 });
  return [];
}

/** A draft, or the sheet on which one begins. */
export function Component() {
  const { draftId = NEW } = useParams();
  const weights = useLoaderData<typeof loader>();
  const [parameters] = useSearchParams();
  const navigate = useNavigate();
  const { data } = useQuery({ ...draftQuery(draftId), enabled: draftId !== NEW });
  // A draft that gets its id while somebody types is still the same sheet: the key does not change under it.
  const [createdHere, setCreatedHere] = useState<string | null>(null);
  return (
    <DraftPlace
      key={draftId === createdHere ? NEW : draftId}
      draft={data ?? null}
      laboratoryId={parameters.get('laboratory') ?? undefined}
      firstStandards={weights}
      firstStandardId={parameters.get('standard') ?? undefined}
      onCreated={(draft) => {
        setCreatedHere(draft.id);
        void navigate(paths.calibrationDraft.href(draft.id), {
          replace: true,
          preventScrollReset: true,
          state: SAME_SCREEN,
        });
      }}
      onIssued={({ revisionId }) =>
        void navigate(paths.calibration.href(revisionId), { replace: true, state: 'just issued' })
      }
      onDiscarded={() => void navigate(paths.calibrations.href())}
    />
  );
}

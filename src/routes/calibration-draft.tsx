import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import {
  useLoaderData,
  useNavigate,
  useParams,
  useSearchParams,
  type LoaderFunctionArgs,
} from 'react-router';
import { Id } from '#shared/ids.ts';
import type { ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { StandardRow } from '#shared/contracts/standards.ts';
import { paths, SAME_SCREEN } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { draftQuery, newestReference, weightById, weightsOfSet } from '#src/features/calibrations/api.ts';
import { ApiProblem } from '#src/lib/api-problem.ts';
import { DraftPlace } from '#src/features/calibrations/draft/draft-place.tsx';

const NEW = 'new';

/** What a new draft begins with. */
interface Beginning {
  weights: StandardRow[];
  /** What the first line leans on. */
  reference: ReferenceChoice | null;
}

const NOTHING: Beginning = { weights: [], reference: null };

/** Primes the draft; for one that its first change will create, the weights and the reference it is about. */
export async function loader({ params, request }: LoaderFunctionArgs): Promise<Beginning> {
  const { draftId = NEW } = params;
  if (draftId === NEW) return beginning(new URL(request.url).searchParams, request.signal);
  await queryClient.query({ ...draftQuery(draftId), staleTime: 1000 });
  return NOTHING;
}

async function beginning(parameters: URLSearchParams, signal: AbortSignal): Promise<Beginning> {
  const [set, standard] = [parameters.get('set'), parameters.get('standard')];
  const [laboratory, reference] = [parameters.get('laboratory'), parameters.get('reference')];
  const [weights, found] = await Promise.all([
    set ? weightsOfSet(set, signal) : standard ? weightById(standard, signal).catch(notTheirs) : [],
    laboratory && reference ? newestReference(laboratory, reference, signal).catch(notTheirs) : null,
  ]);
  return { weights: weights ?? [], reference: found };
}

/** What this person may not see or name is left out: the sheet itself tells who may enter what. */
function notTheirs(error: unknown): null {
  if (error instanceof ApiProblem && [403, 404].includes(error.status)) return null;
  throw error;
}

/** A draft, or the sheet on which one begins. */
export function Component() {
  const { draftId = NEW } = useParams();
  const { weights, reference } = useLoaderData<typeof loader>();
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
      firstReference={reference}
      firstIssuerId={Id.safeParse(parameters.get('issuer')).data}
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

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { lazy, Suspense } from 'react';
import { useNavigate, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { LinkButton } from '#src/components/ui/button.tsx';
import { UnreadAddress } from '#src/components/ui/unread-address.tsx';
import { AuditChain } from '#src/features/audits/components/audit-chain.tsx';
import { chainQuery, type ChainDays } from '#src/features/chains/api.ts';
import { ChainScreen } from '#src/features/chains/components/chain-screen.tsx';
import type { ValueNode } from '#src/features/chains/components/selection-sheet.tsx';
import { readQuestion, withChange, type ChainQuestion } from '#src/features/chains/question.ts';
import { distanceQuery } from '#src/features/downstream/api.ts';
import { unreadIn } from '#src/lib/unread-address.ts';
import { DistanceSection } from '#src/features/downstream/components/distance-section.tsx';

/** Fetched with the screen, not with the application. */
const TakeAlong = lazy(() =>
  import('#src/features/chains/export/take-along.tsx').then((module) => ({ default: module.TakeAlong })),
);

/** Primes the chain, so that the drawing and its numbers are on the way together. */
export async function loader({ params, request }: LoaderFunctionArgs): Promise<null> {
  const question = readQuestion(new URL(request.url).searchParams);
  await queryClient.query({
    ...chainQuery(params.valueUid!, daysOf(question)),
    staleTime: 10_000,
  });
  return null;
}

/** The chain of one value. Everything asked of it stands in the address. */
export function Component() {
  const { valueUid } = useParams();
  const [parameters, setParameters] = useSearchParams();
  const question = readQuestion(parameters);
  const { data, error } = useQuery({
    ...chainQuery(valueUid!, daysOf(question)),
    placeholderData: keepPreviousData,
  });
  if (error) throw error;
  if (!data) return null;
  const change = (next: Partial<ChainQuestion>, isStep = 'at' in next) =>
    setParameters(withChange(question, next), { replace: isStep, preventScrollReset: true });
  return (
    <>
      <UnreadAddress unread={unreadIn(parameters, question)} />
      <ChainScreen
        chain={data}
        question={question}
        onChange={change}
        actionsFor={(node) => actionsFor(node, question)}
        hrefOf={(uid) => paths.chain.href(uid, question)}
        actions={<Further chain={data} question={question} />}
      />
    </>
  );
}

function daysOf({ day, known, as }: ChainQuestion): ChainDays {
  return { day, known, as };
}

/** Where the chain leads on: who leans on the weight, and how wrong what it leans on may be. */
function Further({ chain, question }: { chain: ChainResponse; question: ChainQuestion }) {
  const focus = chain.nodes.find(({ uid }) => uid === chain.focusUid);
  const isFull = focus?.type === 'value' && focus.view === 'full';
  const navigate = useNavigate();
  const { data: distance } = useQuery({ ...distanceQuery(chain.focusUid), enabled: isFull });
  return (
    <>
      <Toolbar>
        <LinkButton to={paths.downstream.href(chain.focusUid, question)}>Who leans on this</LinkButton>
        <LinkButton to={paths.together.href([chain.focusUid])}>Weigh together with …</LinkButton>
        <AuditChain
          valueUid={chain.focusUid}
          days={question}
          onAsked={(id) => void navigate(paths.audit.href(id))}
        />
      </Toolbar>
      <Suspense>
        <TakeAlong valueUid={chain.focusUid} question={question} />
      </Suspense>
      {isFull && distance && <DistanceSection distance={distance} />}
    </>
  );
}

function actionsFor(node: ValueNode, question: ChainQuestion) {
  return (
    <Toolbar>
      {node.revisionId && (
        <LinkButton to={paths.calibration.href(node.revisionId)}>Open the calibration</LinkButton>
      )}
      {node.view === 'full' && (
        <LinkButton to={paths.standard.href(node.standardId)}>Open the standard</LinkButton>
      )}
      {node.tier > 0 && <LinkButton to={paths.chain.href(node.uid)}>Its own chain</LinkButton>}
      <LinkButton to={paths.downstream.href(node.uid, question)}>Who leans on this</LinkButton>
    </Toolbar>
  );
}

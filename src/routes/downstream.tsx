import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { UnreadAddress } from '#src/components/ui/unread-address.tsx';
import { chainQuery } from '#src/features/chains/api.ts';
import type { ValueNode } from '#src/features/chains/components/selection-sheet.tsx';
import { downstreamQuery } from '#src/features/downstream/api.ts';
import { DownstreamScreen } from '#src/features/downstream/components/downstream-screen.tsx';
import { readSearch, withChange, type DownstreamSearch } from '#src/features/downstream/search.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { unreadIn } from '#src/lib/unread-address.ts';
import { ACT_DIALOGS } from './act-dialogs.tsx';

/** Primes the value and its groups; a dry run is worked out on the screen, which says so meanwhile. */
export async function loader({ params, request }: LoaderFunctionArgs): Promise<null> {
  const { day, known, by, suppose } = readSearch(new URL(request.url).searchParams);
  await Promise.all([
    queryClient.query({ ...chainQuery(params.valueUid!, { day, known }), staleTime: 10_000 }),
    suppose === undefined &&
      queryClient.query({ ...downstreamQuery(params.valueUid!, { day, known, by }), staleTime: 10_000 }),
  ]);
  return null;
}

/** Who leans on a value. The value itself is told by its chain. */
export function Component() {
  const { valueUid } = useParams();
  const [parameters, setParameters] = useSearchParams();
  const search = readSearch(parameters);
  const days = { day: search.day, known: search.known };
  const { data, error } = useQuery({ ...chainQuery(valueUid!, days), placeholderData: keepPreviousData });
  if (error) throw error;
  const focus = data?.nodes.find(
    (node): node is ValueNode => node.uid === data.focusUid && node.type === 'value',
  );
  if (!data || !focus) return null;
  const change = (next: Partial<DownstreamSearch>) => {
    const isAnotherQuestion = 'suppose' in next || 'day' in next || 'known' in next;
    setParameters(withChange(search, next), { replace: !isAnotherQuestion, preventScrollReset: true });
  };
  return (
    <>
      <UnreadAddress unread={unreadIn(parameters, search)} />
      <DownstreamScreen
        subject={focus}
        sub={<Sub focus={focus} days={days} />}
        answered={data.question}
        search={search}
        onChange={change}
        dialogs={ACT_DIALOGS}
      />
    </>
  );
}

function Sub({
  focus,
  days,
}: {
  focus: ValueNode;
  days: { day?: string | undefined; known?: string | undefined };
}) {
  const kind = `${nominalText(focus.nominal)}${focus.class ? `, class ${focus.class}` : ''}`;
  return (
    <>
      {`${kind} · ${focus.holder?.name ?? focus.issuer.name} · certificate ${focus.certificateNo} · ${focus.state === 'in force' ? '' : `${focus.state} · `}`}
      <Link to={paths.chain.href(focus.uid, days)} className="text-ink underline underline-offset-3">
        its chain
      </Link>
    </>
  );
}

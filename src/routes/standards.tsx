import { keepPreviousData, useInfiniteQuery, useQuery } from '@tanstack/react-query';
import { useLayoutEffect, useRef } from 'react';
import { useSearchParams, type LoaderFunctionArgs, type ShouldRevalidateFunctionArgs } from 'react-router';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { LinkButton } from '#src/components/ui/button.tsx';
import { laboratoryChoicesQuery, standardListQuery } from '#src/features/standards/api.ts';
import { StandardList } from '#src/features/standards/components/standard-list.tsx';
import {
  changeListSearch,
  filtersOf,
  readListSearch,
  writeListSearch,
  type ListSearch,
} from '#src/features/standards/list-search.ts';
import { can } from '#src/lib/abilities.ts';
import { laboratoriesOf, usePerson } from '#src/lib/session.ts';

/** Primes as many pages of the list as the address asks for. */
export async function loader({ request }: LoaderFunctionArgs): Promise<null> {
  const search = readListSearch(new URL(request.url).searchParams);
  await queryClient.infiniteQuery({ ...standardListQuery(search), pages: search.pages, staleTime: 5_000 });
  return null;
}

/** Opening a row or asking for more puts no new question. */
export function shouldRevalidate({ currentUrl, nextUrl }: ShouldRevalidateFunctionArgs): boolean {
  return questionOf(currentUrl) !== questionOf(nextUrl);
}

/** The standards this person reads in full, as the address asks for them. */
export function Component() {
  const [parameters, setParameters] = useSearchParams();
  const search = readListSearch(parameters);
  const list = useInfiniteQuery({ ...standardListQuery(search), placeholderData: keepPreviousData });
  const laboratories = useLaboratoryChoices();
  // A second change may come before the first is drawn: it builds on what was asked, not on what is shown.
  const asked = useRef(search);
  useLayoutEffect(() => {
    asked.current = readListSearch(parameters);
  }, [parameters]);
  const change = (next: Partial<ListSearch>) => {
    asked.current = changeListSearch(asked.current, next);
    setParameters(writeListSearch(asked.current), { replace: true, preventScrollReset: true });
  };
  const more = async () => {
    const { isSuccess } = await list.fetchNextPage();
    if (isSuccess) change({ pages: search.pages + 1 });
  };
  const pages = list.data?.pages ?? [];
  if (list.error && pages.length === 0) throw list.error;
  return (
    <StandardList
      pages={pages}
      search={search}
      onChange={change}
      laboratories={laboratories}
      hrefOf={(open) => `?${writeListSearch({ ...search, open }).toString()}`}
      onMore={list.hasNextPage ? () => void more() : undefined}
      isFetchingMore={list.isFetchingNextPage}
      error={list.error}
      registerActions={can(pages[0], 'standard:register') ? <RegisterActions /> : null}
      actionsFor={actionsFor}
    />
  );
}

function RegisterActions() {
  return (
    <>
      <LinkButton weight="primary" to={paths.newSet.href()}>
        Register a set
      </LinkButton>
      <LinkButton to={paths.newStandard.href()}>Register a weight</LinkButton>
    </>
  );
}

function actionsFor({ standard, abilities }: StandardResponse) {
  return (
    <>
      <LinkButton weight="primary" to={paths.standard.href(standard.id)}>
        Open the standard
      </LinkButton>
      {standard.value && <LinkButton to={paths.chain.href(standard.value.uid)}>Open the chain</LinkButton>}
      {can({ abilities }, 'standard:change') && (
        <LinkButton to={paths.newDraft.href(standard.id)}>Record a calibration</LinkButton>
      )}
    </>
  );
}

/** A person with a role in the whole network reads every laboratory; others read those they belong to. */
function useLaboratoryChoices() {
  const person = usePerson();
  const isOfNetwork = person.roles.some((role) => role.laboratory === null);
  const { data } = useQuery({ ...laboratoryChoicesQuery, enabled: isOfNetwork });
  const choices = isOfNetwork ? (data?.laboratories ?? []) : laboratoriesOf(person);
  return choices.map(({ id, name }) => ({ value: id, label: name }));
}

function questionOf(url: URL): string {
  const search = readListSearch(url.searchParams);
  return JSON.stringify([filtersOf(search), search.sort]);
}

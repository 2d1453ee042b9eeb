import type { OpenedGroup } from './components/group-rows.tsx';

interface Pages<FetchedRow> {
  data: { pages: readonly { rows: readonly FetchedRow[] }[] } | undefined;
  isFetching: boolean;
  isFetchingNextPage: boolean;
  hasNextPage: boolean;
  error: Error | null;
  fetchNextPage: () => Promise<unknown>;
}

/** The pages of an open group as a table shows them. */
export function openedFrom<FetchedRow>(pages: Pages<FetchedRow>): OpenedGroup<FetchedRow> {
  return {
    rows: pages.data?.pages.flatMap((page) => page.rows) ?? [],
    isWaiting: pages.isFetching && pages.data === undefined,
    onMore: pages.hasNextPage ? () => void pages.fetchNextPage() : undefined,
    isFetchingMore: pages.isFetchingNextPage,
    error: pages.error,
  };
}

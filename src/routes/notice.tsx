import { useInfiniteQuery } from '@tanstack/react-query';
import { useParams, type LoaderFunctionArgs } from 'react-router';
import { queryClient } from '#src/app/query-client.ts';
import { noticeQuery } from '#src/features/notices/api.ts';
import { NoticePage } from '#src/features/notices/components/notice-page.tsx';
import { OwnValues } from '#src/features/notices/components/own-values.tsx';

/** Primes the notice while its module is still on the way. */
export async function loader({ params }: LoaderFunctionArgs): Promise<null> {
  await queryClient.infiniteQuery({ ...noticeQuery(params.noticeId!), staleTime: 5_000 });
  return null;
}

/** One notice, and what it brings to one's own values. */
export function Component() {
  const { noticeId } = useParams();
  const { data, error, fetchNextPage, hasNextPage, isFetchingNextPage } = useInfiniteQuery(
    noticeQuery(noticeId!),
  );
  if (error) throw error;
  const notice = data?.pages[0];
  if (!notice) return null;
  return (
    <NoticePage notice={notice}>
      <OwnValues
        total={notice.total}
        rows={data.pages.flatMap((page) => page.rows)}
        onMore={hasNextPage ? () => void fetchNextPage() : undefined}
        isFetchingMore={isFetchingNextPage}
      />
    </NoticePage>
  );
}

import { useSuspenseQuery } from '@tanstack/react-query';
import { useNavigate, useSearchParams } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { Page } from '#src/components/layout/page.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { noticeListQuery, scaleVersionListQuery } from '#src/features/notices/api.ts';
import { NoticeForm } from '#src/features/notices/components/notice-form.tsx';
import { usePerson } from '#src/lib/session.ts';
import { noticeOfChange } from '#src/features/notices/notice-form.ts';

/** Primes what the form chooses from. */
export async function loader(): Promise<null> {
  await Promise.all([
    queryClient.query({ ...noticeListQuery, staleTime: 5_000 }),
    queryClient.query({ ...scaleVersionListQuery, staleTime: 5_000 }),
  ]);
  return null;
}

/** A new notice; the address may hold what a dry run supposed. */
export function Component() {
  const { notices, publishesFor } = useSuspenseQuery(noticeListQuery).data;
  const { scaleVersions } = useSuspenseQuery(scaleVersionListQuery).data;
  const [parameters] = useSearchParams();
  const navigate = useNavigate();
  const { accountId } = usePerson();
  return (
    <Page title="New notice" sub="A published act on the mass scale, signed by the national institute">
      {publishesFor.length === 0 ? (
        <EmptyState>
          Notices are published by a signatory of a national institute whose authorisation is in force. You
          hold no such role today.
        </EmptyState>
      ) : (
        <NoticeForm
          accountId={accountId}
          publishesFor={publishesFor}
          scaleVersions={scaleVersions}
          notices={notices}
          from={noticeOfChange(parameters.get('change'))}
          day={new Date().toISOString().slice(0, 10)}
          onPublished={(noticeId) => void navigate(paths.notice.href(noticeId))}
        />
      )}
    </Page>
  );
}

import { useSuspenseQuery } from '@tanstack/react-query';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Page } from '#src/components/layout/page.tsx';
import { LinkButton } from '#src/components/ui/button.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { noticeListQuery, scaleVersionListQuery } from '#src/features/notices/api.ts';
import { ScaleHistory } from '#src/features/notices/components/scale-history.tsx';

/** Primes both lists while their module is still on the way. */
export async function loader(): Promise<null> {
  await Promise.all([
    queryClient.query({ ...noticeListQuery, staleTime: 5_000 }),
    queryClient.query({ ...scaleVersionListQuery, staleTime: 5_000 }),
  ]);
  return null;
}

/** The mass scale of the network: its versions, and the notices that lead from one to the next. */
export function Component() {
  const { notices, publishesFor } = useSuspenseQuery(noticeListQuery).data;
  const { scaleVersions } = useSuspenseQuery(scaleVersionListQuery).data;
  return (
    <Page
      title="Mass scale"
      sub={`${counted(scaleVersions.length, 'scale version')}, ${counted(notices.length, 'notice')}`}
    >
      <p className="max-w-[70ch] text-ink-2">
        A notice changes what certificates mean without re-issuing them: the effective value is the
        certificate with the notices since.
      </p>
      {publishesFor.length > 0 && (
        <Toolbar>
          <LinkButton weight="primary" to={paths.newNotice.href()}>
            New notice
          </LinkButton>
        </Toolbar>
      )}
      {scaleVersions.length === 0 ? (
        <EmptyState>
          Versions of the mass scale stand here once the national institute has named one.
        </EmptyState>
      ) : (
        <ScaleHistory scaleVersions={scaleVersions} notices={notices} />
      )}
    </Page>
  );
}

function counted(count: number, what: string): string {
  return count === 1 ? `1 ${what}` : `${count} ${what}s`;
}

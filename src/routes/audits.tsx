import { useNavigate } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { auditListQuery } from '#src/features/audits/api.ts';
import { AuditList } from '#src/features/audits/components/audit-list.tsx';

/** Primes the list while its module is still on the way. */
export async function loader(): Promise<null> {
  await queryClient.infiniteQuery({ ...auditListQuery, staleTime: 0 });
  return null;
}

/** The audits in one's reach. */
export function Component() {
  const navigate = useNavigate();
  return <AuditList onAsked={(id) => void navigate(paths.audit.href(id))} />;
}

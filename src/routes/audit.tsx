import { useSuspenseQuery } from '@tanstack/react-query';
import { useNavigate, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { auditQuery } from '#src/features/audits/api.ts';
import { AuditScreen } from '#src/features/audits/components/audit-screen.tsx';
import { readSearch, withChange } from '#src/features/audits/search.ts';

/** Primes the audit while its module is still on the way. */
export async function loader({ params }: LoaderFunctionArgs): Promise<null> {
  await queryClient.query({ ...auditQuery(params.auditId!), staleTime: 0 });
  return null;
}

/** One audit. Which findings are shown stands in the address. */
export function Component() {
  const { auditId } = useParams();
  const [parameters, setParameters] = useSearchParams();
  const navigate = useNavigate();
  const { data } = useSuspenseQuery(auditQuery(auditId!));
  const search = readSearch(parameters);
  return (
    <AuditScreen
      audit={data}
      search={search}
      onChange={(change) =>
        setParameters(withChange(search, change), { replace: true, preventScrollReset: true })
      }
      onAsked={(id) => void navigate(paths.audit.href(id))}
    />
  );
}

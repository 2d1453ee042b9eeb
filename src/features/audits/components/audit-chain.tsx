import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { useAskAudit } from '../api.ts';

interface AuditChainProps {
  valueUid: string;
  days: { day?: string | undefined; known?: string | undefined };
  onAsked: (auditId: string) => void;
}

/** Asks for an audit of one chain, on the days it is looked at. */
export function AuditChain({ valueUid, days, onAsked }: AuditChainProps) {
  const ask = useAskAudit();
  const { day, known } = days;
  return (
    <>
      <Button
        isBusy={ask.isPending}
        onClick={() =>
          ask.mutate({ scope: 'value', valueUid, day, known }, { onSuccess: ({ id }) => onAsked(id) })
        }
      >
        Audit this chain
      </Button>
      {ask.error && <ErrorNotice error={ask.error} />}
    </>
  );
}

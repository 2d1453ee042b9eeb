import type { AuditResponse } from '#shared/contracts/audits.ts';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { Progress } from '#src/components/ui/progress.tsx';
import { can } from '#src/lib/abilities.ts';
import { useStopAudit } from '../api.ts';
import { progressText } from '../words.ts';

/** How far an audit is, or why it ended without a result. */
export function AuditProgress({ audit }: { audit: AuditResponse }) {
  const stop = useStopAudit(audit.id);
  if (audit.state === 'failed') {
    return (
      <Notice tone="broken" title="The audit broke off" role="alert">
        {audit.message}
      </Notice>
    );
  }
  if (audit.state === 'stopped')
    return <Notice title="The audit was stopped">Nothing of it was kept.</Notice>;
  return (
    <div className="flex max-w-prose flex-col items-start gap-3">
      {audit.state === 'waiting' ? (
        <p role="status" className="text-ink-2">
          Waiting for its turn. Audits are worked on one after the other.
        </p>
      ) : (
        <div className="w-full">
          <Progress label="The audit" done={audit.done} total={audit.total ?? 0} says={progressText(audit)} />
        </div>
      )}
      {audit.message && <p className="text-ink-2">{audit.message}</p>}
      <p className="text-ink-2">
        You can leave this screen: the work goes on, and its result stays in the list.
      </p>
      {can(audit, 'audit:stop') && (
        <Button isBusy={stop.isPending} onClick={() => stop.mutate()}>
          Stop the audit
        </Button>
      )}
      {stop.error && <ErrorNotice error={stop.error} />}
    </div>
  );
}

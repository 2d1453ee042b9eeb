import type { AuditResponse } from '#shared/contracts/audits.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { useRepeatAudit } from '../api.ts';

interface RepeatAuditProps {
  audit: AuditResponse;
  onAsked: (auditId: string) => void;
}

/** Asks the same question again, with the knowledge of then. */
export function RepeatAudit({ audit, onAsked }: RepeatAuditProps) {
  const repeat = useRepeatAudit(audit.id);
  return (
    <Section title="Ask it again">
      <p className="text-ink-2">
        The same question with the knowledge of then, by the rules of now. What was recorded since does not
        count.
      </p>
      <p>
        <Button
          isBusy={repeat.isPending}
          onClick={() => repeat.mutate(undefined, { onSuccess: ({ id }) => onAsked(id) })}
        >
          Repeat the audit
        </Button>
      </p>
      {repeat.error && <ErrorNotice error={repeat.error} />}
    </Section>
  );
}

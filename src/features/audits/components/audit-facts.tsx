import type { z } from 'zod';
import { Link } from 'react-router';
import type { AuditResponse, AuditResult } from '#shared/contracts/audits.ts';
import { paths } from '#src/app/paths.ts';
import { Facts } from '#src/components/layout/facts.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';

interface AuditFactsProps {
  audit: AuditResponse;
  result: z.infer<typeof AuditResult>;
}

/** By what an audit was answered, and the digests it is found again by. */
export function AuditFacts({ audit, result }: AuditFactsProps) {
  return (
    <>
      <Facts
        facts={[
          ['Knowledge', `up to act ${audit.asOfAct}, ${audit.asOf.slice(0, 19).replace('T', ' ')} UTC`],
          [
            'Rule set',
            <span key="r" className="font-mono text-sm">
              {result.ruleSet}
            </span>,
          ],
          [
            'Engine',
            <span key="e" className="font-mono text-sm">
              {result.engine}
            </span>,
          ],
          ['Ended', <DateText key="d" value={result.endedAt} />],
          ['Recorded', `act ${result.actSeq}`],
          ['Result', <Digest key="s" text={result.resultSha256} />],
          ['What it saw', <Digest key="f" text={result.factsSha256} />],
          ['Repeats', audit.repeatOf && <AuditLink key="o" id={audit.repeatOf} />],
          ['Repeated by', audit.repeatedBy && <AuditLink key="b" id={audit.repeatedBy} />],
        ]}
      />
      <p className="text-sm text-ink-3">
        SHA-256 of the findings and of every fact that the rules were given. The machine states what the rules
        find; it gives no verdict of conformity. Legal metrology and accreditation stand above it.
      </p>
    </>
  );
}

function Digest({ text }: { text: string }) {
  return <span className="font-mono text-sm break-all">{text}</span>;
}

function AuditLink({ id }: { id: string }) {
  return (
    <Link to={paths.audit.href(id)} className="underline underline-offset-3">
      the other audit
    </Link>
  );
}

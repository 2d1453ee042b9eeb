import type { AuditResponse } from '#shared/contracts/audits.ts';
import { TwoColumns } from '#src/components/layout/columns.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { can } from '#src/lib/abilities.ts';
import type { AuditSearch } from '../search.ts';
import { subjectText } from '../words.ts';
import { AuditFacts } from './audit-facts.tsx';
import { AuditProgress } from './audit-progress.tsx';
import { Comparison } from './comparison.tsx';
import { Figures } from './figures.tsx';
import { FindingsByRule } from './findings-by-rule.tsx';
import { RepeatAudit } from './repeat-audit.tsx';

interface AuditScreenProps {
  audit: AuditResponse;
  search: AuditSearch;
  onChange: (change: Partial<AuditSearch>) => void;
  onAsked: (auditId: string) => void;
}

/** One audit: how far it is, then what it found, by rule, each finding a step from its chain. */
export function AuditScreen({ audit, search, onChange, onAsked }: AuditScreenProps) {
  const { result } = audit;
  return (
    <Page title={`Audit: ${subjectText(audit)}`} sub={<Sub audit={audit} />}>
      {!result && <AuditProgress audit={audit} />}
      {audit.comparison && <Comparison comparison={audit.comparison} />}
      {result && (
        <TwoColumns
          sideWidth="narrow"
          side={
            <>
              <Figures result={result} />
              <RepeatAudit audit={audit} onAsked={onAsked} />
              <Section title="How it was asked">
                <AuditFacts audit={audit} result={result} />
              </Section>
            </>
          }
        >
          <FindingsByRule
            auditId={audit.id}
            days={{ day: audit.day, known: audit.known }}
            result={result}
            search={search}
            onChange={onChange}
            hasOwners={audit.subject.scope === 'laboratory'}
          />
        </TwoColumns>
      )}
      {!result && can(audit, 'audit:repeat') && audit.state !== 'waiting' && audit.state !== 'running' && (
        <RepeatAudit audit={audit} onAsked={onAsked} />
      )}
    </Page>
  );
}

function Sub({ audit }: { audit: AuditResponse }) {
  return (
    <>
      in force on <DateText value={audit.day} />, as known on <DateText value={audit.known} /> · asked by{' '}
      {audit.askedBy} <DateText value={audit.askedAt} />
    </>
  );
}

import { useInfiniteQuery } from '@tanstack/react-query';
import { Link } from 'react-router';
import type { z } from 'zod';
import type { AuditFinding, AuditResult } from '#shared/contracts/audits.ts';
import { countText } from '#shared/numbers/count-text.ts';
import { mendingOf } from '#shared/rules/mending.ts';
import { fillSentence } from '#shared/rules/sentence.ts';
import { stateOfOutcome } from '#shared/states.ts';
import { paths } from '#src/app/paths.ts';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { entersResultsFor, opensHoldingsOf } from '#src/lib/holdings.ts';
import { mendingLink } from '#src/lib/mending-link.ts';
import { usePerson, type Person } from '#src/lib/session.ts';
import { findingsQuery, type FindingFilter } from '../api.ts';
import { severityWord } from '#shared/severity-words.ts';

type Rule = z.infer<typeof AuditResult>['rules'][number];

interface RuleFindingsProps {
  auditId: string;
  days: { day: string; known: string };
  rule: Rule;
  filter: FindingFilter;
}

/** The findings of one rule: each a step from its chain on the audited day, and from the place where it is mended. */
export function RuleFindings({ auditId, days, rule, filter }: RuleFindingsProps) {
  const person = usePerson();
  const { data, error, refetch, hasNextPage, isFetchingNextPage, fetchNextPage } = useInfiniteQuery(
    findingsQuery(auditId, { ...filter, rule: rule.id }),
  );
  if (error) return <ErrorNotice error={error} onRetry={() => void refetch()} />;
  if (!data) return <Waiting>Reading the findings</Waiting>;
  const findings = data.pages.flatMap((page) => page.findings);
  return (
    <>
      <ul className="flex flex-col">
        {findings.map((finding) => (
          <FindingItem key={finding.n} {...{ finding, rule, days, person }} />
        ))}
      </ul>
      {hasNextPage && (
        <p className="pt-2">
          <Button isBusy={isFetchingNextPage} onClick={() => void fetchNextPage()}>
            Show more
          </Button>{' '}
          <span className="text-ink-3">{`${countText(findings.length)} of ${countText(data.pages[0]!.total)}`}</span>
        </p>
      )}
    </>
  );
}

interface FindingItemProps extends Pick<RuleFindingsProps, 'rule' | 'days'> {
  finding: AuditFinding;
  person: Person;
}

function FindingItem({ finding, rule, days, person }: FindingItemProps) {
  const { value, reference, laboratory } = finding;
  const template = finding.sentence === null ? undefined : rule.sentences[finding.sentence];
  return (
    <li className="border-b border-rule py-1.5 last:border-0">
      <div className="flex flex-wrap items-baseline justify-between gap-x-3">
        <Link to={chainHref(finding, days)} className="font-mono text-sm underline underline-offset-3">
          {reference ? `${value.registryNo} ← ${reference.registryNo}` : value.registryNo}
        </Link>
        <span className="text-sm text-ink-2">
          <StateMark state={stateOfOutcome(finding.outcome, finding.severity)}>
            {finding.outcome === 'fails' ? `fails, ${severityWord(finding.severity)}` : finding.outcome}
          </StateMark>
          {` · ${finding.verdict === 'conduct' ? 'at use' : 'today'} · ${laboratory.name}`}
        </span>
      </div>
      <p>
        {template === undefined
          ? `${rule.title}: the words are ${laboratory.name}’s to see.`
          : fillSentence(template, finding.parameters)}
      </p>
      <Mend finding={finding} person={person} />
    </li>
  );
}

function Mend({ finding, person }: { finding: AuditFinding; person: Person }) {
  const mending = mendingOf({ ...finding, subject: { type: finding.subject } });
  if (!mending) return null;
  const { value, reference, laboratory } = finding;
  const link = mendingLink(mending, {
    laboratory,
    ...placesOf(person, value),
    reference: reference && { registryNo: reference.registryNo, ...placesOf(person, reference) },
  });
  return (
    <p className="text-sm text-ink-2">
      {mending.step}{' '}
      {link && (
        <Link to={link.href} className="text-ink underline underline-offset-3">
          {link.label}
        </Link>
      )}
    </p>
  );
}

/** Who issued a certificate reads its value in full, and yet may not open the weight of another laboratory. */
function placesOf(person: Person, { holderId, standardId, revisionId }: AuditFinding['value']) {
  return {
    standardId: holderId && opensHoldingsOf(person, holderId) ? standardId : null,
    revisionId,
    entersFor: entersResultsFor(person, holderId),
  };
}

/** The chain on the audited day under the finding's verdict, with the link or the value selected. */
function chainHref(finding: AuditFinding, days: RuleFindingsProps['days']): string {
  const { subject, value, reference, focusUid, verdict } = finding;
  if (subject === 'chain') return paths.chain.href(focusUid, days);
  const at = reference ? `${value.uid}.${reference.uid}` : value.uid;
  return paths.chain.selectedHref(focusUid, { ...days, verdict }, at);
}

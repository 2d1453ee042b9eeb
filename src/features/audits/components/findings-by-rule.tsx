import { useInfiniteQuery } from '@tanstack/react-query';
import { Fragment } from 'react';
import type { z } from 'zod';
import type { AuditFindingGroup, AuditResult } from '#shared/contracts/audits.ts';
import { groupBy } from '#shared/group-by.ts';
import { stateOfOutcome } from '#shared/states.ts';
import { Section } from '#src/components/layout/page.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, RowButton, Table } from '#src/components/ui/table.tsx';
import { address } from '#src/lib/api-client.ts';
import { findingsQuery } from '../api.ts';
import type { AuditSearch } from '../search.ts';
import { SEVERITIES, severityWord } from '../words.ts';
import { FindingFilters } from './finding-filters.tsx';
import { RuleFindings } from './rule-findings.tsx';

type Rule = z.infer<typeof AuditResult>['rules'][number];

interface FindingsByRuleProps {
  auditId: string;
  days: { day: string; known: string };
  result: z.infer<typeof AuditResult>;
  search: AuditSearch;
  onChange: (change: Partial<AuditSearch>) => void;
  hasOwners: boolean;
}

const COLUMNS = 3;

/** Findings by rule, the gravest first; a rule opens to its rows. */
export function FindingsByRule({ auditId, days, result, search, onChange, hasOwners }: FindingsByRuleProps) {
  const { rule: open, ...filter } = search;
  const { data, error, refetch } = useInfiniteQuery(findingsQuery(auditId, filter));
  const groups = groupBy(data?.pages[0]?.groups ?? [], (group) => group.rule);
  const rules = result.rules.filter((rule) => groups.has(rule.id)).sort(byGravity(groups));
  return (
    <Section
      title="Findings by rule"
      actions={
        <a
          href={address(`/api/audits/${auditId}/findings.csv`, { ...search })}
          className="underline underline-offset-3"
          download
        >
          Save as CSV
        </a>
      }
    >
      <FindingFilters search={search} onChange={onChange} hasOwners={hasOwners} />
      {error && <ErrorNotice error={error} onRetry={() => void refetch()} />}
      {!data && !error && <Waiting>Reading the findings</Waiting>}
      {data && rules.length === 0 && (
        <EmptyState>
          {result.findings === 0
            ? 'No rule fails, and each could be judged. What holds is counted beside; it is no verdict of conformity.'
            : 'No finding is left under this filter.'}
        </EmptyState>
      )}
      {rules.length > 0 && (
        <Table caption="Findings by rule">
          <thead>
            <tr>
              <Head>Rule</Head>
              <Head>Fails</Head>
              <Head align="right">Cannot be judged</Head>
            </tr>
          </thead>
          <tbody>
            {rules.map((rule) => (
              <Fragment key={rule.id}>
                <RuleRow
                  rule={rule}
                  groups={groups.get(rule.id)!}
                  isOpen={rule.id === open}
                  onToggle={() => onChange({ rule: rule.id === open ? undefined : rule.id })}
                />
                {rule.id === open && (
                  <tr>
                    <td colSpan={COLUMNS} className="border-b border-rule pb-3 pl-4">
                      <RuleFindings auditId={auditId} days={days} rule={rule} filter={search} />
                    </td>
                  </tr>
                )}
              </Fragment>
            ))}
          </tbody>
        </Table>
      )}
    </Section>
  );
}

interface RuleRowProps {
  rule: Rule;
  groups: readonly AuditFindingGroup[];
  isOpen: boolean;
  onToggle: () => void;
}

function RuleRow({ rule, groups, isOpen, onToggle }: RuleRowProps) {
  const notJudged = groups
    .filter(({ outcome }) => outcome === 'cannot be judged')
    .reduce((sum, { count }) => sum + count, 0);
  return (
    <Row isSelected={isOpen}>
      <Cell isHeading className="min-w-56">
        <RowButton aria-expanded={isOpen} onClick={onToggle}>
          <span className="font-mono text-sm">{rule.id}</span> {rule.title}
        </RowButton>
        <p className="text-xs text-ink-3">
          {rule.clause === 'none' ? rule.edition : `${rule.edition}: ${rule.clause}`}
        </p>
      </Cell>
      <Cell>
        {groups
          .filter(({ outcome }) => outcome === 'fails')
          .map(({ severity, count }) => (
            <StateMark key={severity} state={stateOfOutcome('fails', severity)} className="mr-3">
              {`${count} ${severityWord(severity)}`}
            </StateMark>
          ))}
      </Cell>
      <Cell align="right">{notJudged || ''}</Cell>
    </Row>
  );
}

/** Rules with the gravest failing findings first, then by number. */
function byGravity(groups: ReadonlyMap<string, readonly AuditFindingGroup[]>): (a: Rule, b: Rule) => number {
  const gravity = ({ id }: Rule) => {
    const failing = groups.get(id)!.filter(({ outcome }) => outcome === 'fails');
    return Math.min(SEVERITIES.length, ...failing.map(({ severity }) => SEVERITIES.indexOf(severity)));
  };
  return (a, b) => gravity(a) - gravity(b) || (a.id < b.id ? -1 : 1);
}

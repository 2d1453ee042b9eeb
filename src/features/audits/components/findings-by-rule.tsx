import { useInfiniteQuery } from '@tanstack/react-query';
import type { z } from 'zod';
import type { AuditFindingGroup, AuditResult } from '#shared/contracts/audits.ts';
import { groupBy } from '#shared/group-by.ts';
import { countText } from '#shared/numbers/count-text.ts';
import { stateOfOutcome } from '#shared/states.ts';
import { Section } from '#src/components/layout/page.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { address } from '#src/lib/api-client.ts';
import { findingsQuery } from '../api.ts';
import type { AuditSearch } from '../search.ts';
import { SEVERITIES, severityWord } from '#shared/severity-words.ts';
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

/** Findings by rule, the gravest first; a rule opens to its rows. */
export function FindingsByRule({ auditId, days, result, search, onChange, hasOwners }: FindingsByRuleProps) {
  const { rule: open, ...filter } = search;
  const { data, error, refetch } = useInfiniteQuery(findingsQuery(auditId, filter));
  const groups = groupBy(data?.pages[0]?.groups ?? [], (group) => group.rule);
  const rules = result.rules.filter((rule) => groups.has(rule.id)).sort(byGravity(groups));
  const found = result.counts
    .filter(({ outcome }) => outcome === 'fails' || outcome === 'cannot be judged')
    .reduce((sum, { count }) => sum + count, 0);
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
      {found > result.findings && (
        <p className="text-ink-2">
          {`Not all that cannot be judged is listed: ${countText(found - result.findings)} findings are counted only.`}
        </p>
      )}
      {data && rules.length === 0 && (
        <EmptyState>
          {result.findings === 0
            ? 'No rule fails, and each could be judged. What holds is counted beside; it is no verdict of conformity.'
            : 'No finding is left under this filter.'}
        </EmptyState>
      )}
      {rules.length > 0 && (
        <ul aria-label="Findings by rule" className="flex flex-col border-t border-rule">
          {rules.map((rule) => (
            <li key={rule.id} className="border-b border-rule">
              <RuleLine
                rule={rule}
                groups={groups.get(rule.id)!}
                isOpen={rule.id === open}
                onToggle={() => onChange({ rule: rule.id === open ? undefined : rule.id })}
              />
              {rule.id === open && (
                <div className="border-l-3 border-brass pb-2 pl-3.5">
                  <RuleFindings auditId={auditId} days={days} rule={rule} filter={search} />
                </div>
              )}
            </li>
          ))}
        </ul>
      )}
    </Section>
  );
}

interface RuleLineProps {
  rule: Rule;
  groups: readonly AuditFindingGroup[];
  isOpen: boolean;
  onToggle: () => void;
}

function RuleLine({ rule, groups, isOpen, onToggle }: RuleLineProps) {
  const notJudged = groups
    .filter(({ outcome }) => outcome === 'cannot be judged')
    .reduce((sum, { count }) => sum + count, 0);
  return (
    <button
      type="button"
      aria-expanded={isOpen}
      onClick={onToggle}
      className="flex min-h-11 w-full flex-wrap items-baseline justify-between gap-x-4 py-1.5 text-left hover:bg-raised"
    >
      <span className="min-w-0 flex-[1_1_18rem]">
        <span className="font-mono text-sm">{rule.id}</span> {rule.title}
        <span className="block text-xs text-ink-3">
          {rule.clause === 'none' ? rule.edition : `${rule.edition}: ${rule.clause}`}
        </span>
      </span>
      <span className="flex flex-wrap gap-x-3">
        {groups
          .filter(({ outcome }) => outcome === 'fails')
          .map(({ severity, count }) => (
            <StateMark key={severity} state={stateOfOutcome('fails', severity)}>
              {`${countText(count)} ${severityWord(severity)}`}
            </StateMark>
          ))}
        {notJudged > 0 && <StateMark state="not judged">{`${countText(notJudged)} not judged`}</StateMark>}
      </span>
    </button>
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

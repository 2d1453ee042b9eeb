import type { ChainResponse } from '#shared/contracts/chains.ts';
import { fillSentence } from '#shared/rules/sentence.ts';
import { groupChecks, type Check } from '../group-checks.ts';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { stateOfOutcome } from '#shared/states.ts';
import { Mend } from './mend.tsx';

interface CheckListProps {
  chain: ChainResponse;
  checks: readonly Check[];
}

/**
 * Checks in words: what failed first, each with its clause and the sentence that names what would mend it. What holds,
 * does not apply or hardly matters stands behind its count.
 */
export function CheckList({ chain, checks }: CheckListProps) {
  const { loud, quiet } = groupChecks(chain, checks);
  if (checks.length === 0) return <p className="text-ink-2">No rule speaks about this.</p>;
  return (
    <div>
      {loud.length > 0 ? (
        <Items chain={chain} checks={loud} />
      ) : (
        <p className="text-ink-2">Nothing fails here, and nothing that weighs is open.</p>
      )}
      {quiet.map(({ outcome, because, checks: group }) => (
        <details key={outcome} className="border-b border-rule">
          <summary className="min-h-8 cursor-pointer py-1.5 pointer-coarse:min-h-11">
            <StateMark state={stateOfOutcome(outcome)}>{outcome}</StateMark>
            <span className="text-ink-2">
              {because && `, ${because}`}: {group.length} {group.length === 1 ? 'check' : 'checks'}
            </span>
          </summary>
          <Items chain={chain} checks={group} />
        </details>
      ))}
    </div>
  );
}

function Items({ chain, checks }: CheckListProps) {
  return (
    <ul className="flex flex-col">
      {checks.map((check) => (
        <CheckItem key={`${check.rule} ${check.verdict}`} chain={chain} check={check} />
      ))}
    </ul>
  );
}

function CheckItem({ chain, check }: { chain: ChainResponse; check: Check }) {
  const rule = chain.rules.find((candidate) => candidate.id === check.rule)!;
  const template = check.sentence === null ? undefined : rule.sentences[check.sentence];
  return (
    <li className="border-b border-rule py-1.5">
      <div className="flex flex-wrap items-baseline justify-between gap-x-3">
        <StateMark state={stateOfOutcome(check.outcome, check.severity)}>{check.outcome}</StateMark>
        <span className="text-sm text-ink-2">
          <span className="font-mono">{check.rule}</span> · {check.verdict === 'conduct' ? 'at use' : 'today'}
        </span>
      </div>
      <p>{template === undefined ? rule.title : fillSentence(template, check.parameters)}</p>
      <Mend chain={chain} check={check} />
      <p className="text-xs text-ink-3">
        {rule.clause === 'none' ? rule.edition : `${rule.edition}: ${rule.clause}`}
      </p>
    </li>
  );
}

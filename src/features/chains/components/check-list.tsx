import type { ChainResponse } from '#shared/contracts/chains.ts';
import { fillSentence } from '#shared/rules/sentence.ts';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { stateOfOutcome } from '#shared/states.ts';

export type Check = ChainResponse['checks'][number];

const ORDER = ['fails', 'cannot be judged', 'holds', 'does not apply'];

/** Checks in words: what failed first, each with its clause and the sentence that names what would mend it. */
export function CheckList({ chain, checks }: { chain: ChainResponse; checks: Check[] }) {
  const sorted = checks.toSorted((a, b) => ORDER.indexOf(a.outcome) - ORDER.indexOf(b.outcome));
  if (sorted.length === 0) return <p className="text-ink-2">No rule speaks about this.</p>;
  return (
    <ul className="flex flex-col">
      {sorted.map((check) => (
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
      <p className="text-xs text-ink-3">
        {rule.clause === 'none' ? rule.edition : `${rule.edition}: ${rule.clause}`}
      </p>
    </li>
  );
}

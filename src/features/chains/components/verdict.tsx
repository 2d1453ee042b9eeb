import type { ChainResponse } from '#shared/contracts/chains.ts';
import { fillSentence } from '#shared/rules/sentence.ts';
import { Section } from '#src/components/layout/page.tsx';
import type { ChainQuestion } from '../question.ts';
import { CheckList } from './check-list.tsx';
import { namesOf } from './link-table.tsx';

const LONGEST_LIST = 3;

/** What the checks come to, in a heading and a few sentences. No verdict on fitness: that is for people. */
export function Verdict({ chain, question }: { chain: ChainResponse; question: ChainQuestion }) {
  const counts = chain.summary[question.verdict];
  const failing = failingSentences(chain, question);
  const ofChain = chain.checks.filter(
    (check) =>
      check.subject.type === 'chain' &&
      check.verdict === question.verdict &&
      ['fails', 'cannot be judged'].includes(check.outcome),
  );
  return (
    <Section title={headline(counts, chain.summary.links)}>
      {failing.slice(0, LONGEST_LIST).map((sentence) => (
        <p key={sentence} className="text-ink-2">
          {sentence}
        </p>
      ))}
      {failing.length > LONGEST_LIST && (
        <p className="text-ink-2">{failing.length - LONGEST_LIST} more in the table below.</p>
      )}
      {ofChain.length > 0 && <CheckList chain={chain} checks={ofChain} />}
    </Section>
  );
}

function headline(counts: ChainResponse['summary']['today'], links: number): string {
  const of = `of ${links} ${links === 1 ? 'link' : 'links'}`;
  if (links === 0) return 'A root: it leans on nothing';
  if (counts.broken > 0) return `${counts.broken} ${of} ${counts.broken === 1 ? 'fails' : 'fail'} a check`;
  if (counts.notJudged > 0) return `${counts.notJudged} ${of} cannot be judged`;
  if (counts.caution > 0)
    return `${counts.caution} ${of} ${counts.caution === 1 ? 'calls' : 'call'} for caution`;
  return links === 1 ? 'The link holds its checks' : `All ${links} links hold their checks`;
}

/** Each failing check once in words; a value's failure shows at the link it made. */
function failingSentences(chain: ChainResponse, question: ChainQuestion): string[] {
  const rules = new Map(chain.rules.map((rule) => [rule.id, rule]));
  const names = namesOf(chain);
  const sentences = chain.checks
    .filter((check) => check.outcome === 'fails' && check.subject.type !== 'chain')
    .filter((check) => check.verdict === question.verdict || question.verdict === 'today')
    .map((check) => {
      const rule = rules.get(check.rule)!;
      if (check.sentence !== null) return fillSentence(rule.sentences[check.sentence]!, check.parameters);
      const uid = check.subject.type === 'value' ? check.subject.uid : chain.focusUid;
      return `${names.get(uid)}: ${rule.title} (${check.rule}).`;
    });
  return [...new Set(sentences)];
}

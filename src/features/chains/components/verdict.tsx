import type { ChainResponse } from '#shared/contracts/chains.ts';
import { fillSentence } from '#shared/rules/sentence.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { countingChecks } from '#shared/drawing/counting-checks.ts';
import { notYet } from '../not-yet.ts';
import type { ChainQuestion } from '../question.ts';
import { CheckList } from './check-list.tsx';
import { namesOf } from '#shared/drawing/link-order.ts';

const LONGEST_LIST = 3;

interface VerdictProps {
  chain: ChainResponse;
  question: ChainQuestion;
  onChange: (change: Partial<ChainQuestion>) => void;
}

/** What the checks come to, in a heading and a few sentences. No verdict on fitness: that is for people. */
export function Verdict({ chain, question, onChange }: VerdictProps) {
  const before = notYet(chain);
  if (before)
    return (
      <Section title={`Not yet ${before.what} on ${before.day}`}>
        <p className="text-ink-2">What the checks found of the chain since then stands in the table below.</p>
      </Section>
    );
  const failing = failingSentences(chain, question);
  const ofChain = chain.checks.filter(
    (check) =>
      check.subject.type === 'chain' &&
      check.verdict === question.verdict &&
      ['fails', 'cannot be judged'].includes(check.outcome),
  );
  return (
    <Section title={headline(chain.summary[question.verdict], chain.summary.links)}>
      {failing.slice(0, LONGEST_LIST).map((sentence) => (
        <p key={sentence} className="text-ink-2">
          {sentence}
        </p>
      ))}
      {failing.length > LONGEST_LIST && (
        <p className="text-ink-2">{failing.length - LONGEST_LIST} more in the table below.</p>
      )}
      {ofChain.length > 0 && <CheckList chain={chain} checks={ofChain} />}
      {question.verdict === 'today' && (
        <AtUse chain={chain} onSwitch={() => onChange({ verdict: 'conduct' })} />
      )}
    </Section>
  );
}

/** Under what is known now: what failed when it was done is not forgotten, and one click away. */
function AtUse({ chain, onSwitch }: { chain: ChainResponse; onSwitch: () => void }) {
  const { conduct, links } = chain.summary;
  const failed = conduct.broken + conduct.caution;
  if (failed === 0) return null;
  return (
    <p className="text-sm text-ink-2">
      At use, {failed} of {links} {links === 1 ? 'link' : 'links'} failed a check.{' '}
      <Button weight="text" onClick={onSwitch}>
        Judge by what was known at use
      </Button>
    </p>
  );
}

function headline(counts: ChainResponse['summary']['today'], links: number): string {
  if (links === 0) return 'A root: it leans on nothing';
  const { broken, notJudged, caution } = counts;
  const findings = [
    { count: broken, says: broken === 1 ? 'fails a check' : 'fail a check' },
    { count: notJudged, says: 'cannot be judged' },
    { count: caution, says: caution === 1 ? 'calls for caution' : 'call for caution' },
  ].filter(({ count }) => count > 0);
  if (findings.length === 0)
    return links === 1 ? 'The link holds its checks' : `All ${links} links hold their checks`;
  const of = `of ${links} ${links === 1 ? 'link' : 'links'}`;
  return findings.map(({ count, says }, at) => `${count} ${at === 0 ? `${of} ` : ''}${says}`).join(', ');
}

/** Each failing check once in words; a value's failure shows at the link it made. */
function failingSentences(chain: ChainResponse, question: ChainQuestion): string[] {
  const rules = new Map(chain.rules.map((rule) => [rule.id, rule]));
  const names = namesOf(chain);
  const sentences = countingChecks(chain, question.verdict)
    .filter((check) => check.outcome === 'fails')
    .map((check) => {
      const rule = rules.get(check.rule)!;
      if (check.sentence !== null) return fillSentence(rule.sentences[check.sentence]!, check.parameters);
      const uid = check.subject.type === 'value' ? check.subject.uid : chain.focusUid;
      return `${names.get(uid)}: ${rule.title} (${check.rule}).`;
    });
  return [...new Set(sentences)];
}

import type { ChainResponse } from '#shared/contracts/chains.ts';
import { fillSentence } from '#shared/rules/sentence.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { askedTodayOnly } from '#shared/drawing/asked-today-only.ts';
import { countingChecks } from '#shared/drawing/counting-checks.ts';
import { notYet } from '../not-yet.ts';
import type { ChainQuestion } from '../question.ts';
import { CheckList } from './check-list.tsx';
import { atUseWords, meaningOf } from './meaning-of.ts';
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
      <BothVerdicts chain={chain} chosen={question.verdict} onChange={onChange} />
    </Section>
  );
}

type VerdictName = ChainQuestion['verdict'];

interface BothVerdictsProps {
  chain: ChainResponse;
  chosen: VerdictName;
  onChange: (change: Partial<ChainQuestion>) => void;
}

/** Both verdicts beside each other where they differ: what each counts, and what the difference means. */
function BothVerdicts({ chain, chosen, onChange }: BothVerdictsProps) {
  const { summary, question } = chain;
  const said = (verdict: VerdictName) => headline(summary[verdict], summary.links);
  if (said('today') === said('conduct')) return null;
  const unasked = askedTodayOnly(chain);
  const verdicts: { name: VerdictName; words: string; counts: string }[] = [
    { name: 'conduct', words: 'Known at use', counts: atUseWords(unasked) },
    { name: 'today', words: 'Known now', counts: `All that is on record by ${question.known}.` },
  ];
  return (
    <div className="mt-1 border-t border-rule pt-1.5">
      <dl className="grid grid-cols-2 gap-x-4">
        {verdicts.map(({ name, words, counts }) => (
          <div key={name}>
            <dt className="text-sm text-ink-2">{words}</dt>
            <dd>
              <p className={name === chosen ? 'font-semibold' : ''}>{said(name)}</p>
              <p className="text-sm text-ink-2">{counts}</p>
              {name !== chosen && (
                <Button weight="text" onClick={() => onChange({ verdict: name })}>
                  Judge by this
                </Button>
              )}
            </dd>
          </div>
        ))}
      </dl>
      <p className="mt-1 text-ink-2">{meaningOf(summary, unasked)}</p>
    </div>
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

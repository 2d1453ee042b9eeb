import type { ChainResponse } from '#shared/contracts/chains.ts';
import { linkKey } from '#shared/drawing/drawing-question.ts';
import { namesOf } from '#shared/drawing/link-order.ts';
import { fillSentence } from '#shared/rules/sentence.ts';
import type { Change } from './change.ts';
import type { Link, Pairs } from './pairs.ts';

type Check = ChainResponse['checks'][number];
type Judgement = Link['today'];

const GRAVEST_LAST: Judgement[] = ['sound', 'caution', 'not judged', 'broken'];
const VERDICTS = [
  { verdict: 'today', words: 'by what is known now' },
  { verdict: 'conduct', words: 'by what was known at use' },
] as const;

/** A link that both answers hold and judge differently, with the checks that make the difference. */
export interface ChangedLink {
  change: Change;
  checks: Check[];
}

/** Links that stand differently under either verdict. */
export function changedLinks(pairs: Pairs): ChangedLink[] {
  const names = namesOf(pairs.after);
  return pairs.links.flatMap(({ before, after }) =>
    VERDICTS.filter(({ verdict }) => before[verdict] !== after[verdict]).map(({ verdict, words }) => {
      const [was, is] = [before[verdict], after[verdict]];
      const isWorse = GRAVEST_LAST.indexOf(is) > GRAVEST_LAST.indexOf(was);
      const [earlier, later] = [
        tellingChecks(pairs.before, before, verdict),
        tellingChecks(pairs.after, after, verdict),
      ];
      const checks = isWorse ? onlyIn(later, earlier) : onlyIn(earlier, later);
      const name = `${names.get(after.parentUid)} → ${names.get(after.childUid)}`;
      return {
        checks,
        change: {
          group: 'How links stand' as const,
          says: `${name}, ${words}: ${is}, was ${was}${rulesOf(checks)}.`,
          why: isWorse ? whyOf(pairs.after, checks) : whyOf(pairs.before, checks, 'Before: '),
          at: linkKey(after),
          mark: `was ${was}`,
          weight: Math.max(GRAVEST_LAST.indexOf(is), GRAVEST_LAST.indexOf(was)),
        },
      };
    }),
  );
}

/** The failing or open checks of a link and of the value that it made, which is how its standing counts them. */
function tellingChecks(chain: ChainResponse, link: Link, verdict: 'conduct' | 'today'): Check[] {
  const lasting = new Set(chain.rules.filter((rule) => rule.isLasting).map((rule) => rule.id));
  return chain.checks.filter(
    (check) =>
      isTelling(check) &&
      (check.verdict === verdict || (verdict === 'today' && lasting.has(check.rule))) &&
      isAbout(check, link),
  );
}

const GRAVE: Check['severity'][] = ['block', 'critical', 'major'];

/** Whether a check moves a link's standing: a lesser rule that cannot be judged changes nothing. */
function isTelling({ outcome, severity }: Check): boolean {
  return outcome === 'fails' || (outcome === 'cannot be judged' && GRAVE.includes(severity));
}

/** The findings that one side has and the other has not; all of them where that leaves none. */
function onlyIn(these: Check[], others: readonly Check[]): Check[] {
  const key = ({ rule, verdict, outcome, subject: { type } }: Check) =>
    `${rule} ${verdict} ${outcome} ${type}`;
  const there = new Set(others.map(key));
  const own = these.filter((check) => !there.has(key(check)));
  return own.length > 0 ? own : these;
}

function isAbout({ subject }: Check, link: Link): boolean {
  if (subject.type === 'link')
    return subject.childUid === link.childUid && subject.parentUid === link.parentUid;
  return subject.type === 'value' && subject.uid === link.childUid;
}

function rulesOf(checks: readonly Check[]): string {
  const rules = [...new Set(checks.map((check) => check.rule))];
  return rules.length === 0 ? '' : ` (${rules.join(', ')})`;
}

const MOST_SENTENCES = 3;

/** The gravest findings in words; how many more there are. */
function whyOf(chain: ChainResponse, checks: readonly Check[], lead = ''): string[] {
  const rank = ({ outcome, severity }: Check) =>
    Number(outcome !== 'fails') * 2 + Number(!GRAVE.includes(severity));
  const sentences = sentencesOf(
    chain,
    checks.toSorted((a, b) => rank(a) - rank(b)),
  ).map((sentence) => lead + sentence);
  const more = sentences.length - MOST_SENTENCES;
  return more > 0 ? [...sentences.slice(0, MOST_SENTENCES), `And ${more} more.`] : sentences;
}

/** What the rules say, in their own words; where those would tell too much, the rule's title. */
export function sentencesOf(chain: ChainResponse, checks: readonly Check[]): string[] {
  const rules = new Map(chain.rules.map((rule) => [rule.id, rule]));
  const sentences = checks.map((check) => {
    const rule = rules.get(check.rule)!;
    const sentence = check.sentence === null ? undefined : rule.sentences[check.sentence];
    return sentence === undefined ? `${rule.title} (${rule.id}).` : fillSentence(sentence, check.parameters);
  });
  return [...new Set(sentences)];
}

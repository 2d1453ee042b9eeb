import type { z } from 'zod';
import type { ChainCheck, ChainLink, ChainRule } from '#shared/contracts/chains.ts';
import type { ChainFacts, LinkFacts, Question, ValueFacts } from './facts.ts';
import { RULES, rulesInWords } from './rule-set.ts';
import type { Finding, RuleHead, Severity, VerdictName } from './rule.ts';
import { placesOf } from './sentence.ts';

export type Check = z.infer<typeof ChainCheck>;
export type Standing = z.infer<typeof ChainLink>['conduct'];

/** A link with its worst outcome under each verdict. */
export interface LinkStanding {
  childUid: string;
  parentUid: string;
  conduct: Standing;
  today: Standing;
}

/** What the rules found in a chain. */
export interface ChainJudgement {
  checks: Check[];
  links: LinkStanding[];
  rules: z.infer<typeof ChainRule>[];
}

const LASTING = new Set(RULES.filter((rule) => rule.isLasting).map((rule) => rule.id));
const LINK_RULES = RULES.filter((rule) => rule.scope === 'link');
const VALUE_RULES = RULES.filter((rule) => rule.scope === 'value');
const CHAIN_RULES = RULES.filter((rule) => rule.scope === 'chain');

/** How the steps of a chain are judged: anew, or as somebody who asked before found them. */
export interface StepJudges {
  judgeLink(link: LinkFacts, question: Question): Check[];
  judgeValue(value: ValueFacts, question: Question): Check[];
}

/** Runs every rule over a chain. A link that only informs is not judged by link rules: nothing flows through it. */
export function judgeChain(chain: ChainFacts, steps: StepJudges = { judgeLink, judgeValue }): ChainJudgement {
  const { question } = chain;
  const links = chain.links.filter((link) => link.role === 'reference');
  const checks = [
    ...links.flatMap((link) => steps.judgeLink(link, question)),
    ...chain.values.flatMap((value) => steps.judgeValue(value, question)),
    ...judgeWhole(chain),
  ];
  return { checks, links: standingsOf(chain, checks), rules: rulesInWords(question.day) };
}

/** The checks of a chain as a whole, without those of its steps. */
export function judgeWhole(chain: ChainFacts): Check[] {
  return checksOf(CHAIN_RULES, { type: 'chain' }, chain, chain.question);
}

/** The checks of one link: for a chain, and for a draft whose reference has just been chosen. */
export function judgeLink(link: LinkFacts, question: Question): Check[] {
  const subject = { type: 'link', childUid: link.child.uid, parentUid: link.parent.uid } as const;
  return checksOf(LINK_RULES, subject, link, question);
}

/** The checks of one value: for a chain, and for a line of a draft. */
export function judgeValue(value: ValueFacts, question: Question): Check[] {
  return checksOf(VALUE_RULES, { type: 'value', uid: value.uid }, value, question);
}

const GRAVE: readonly Severity[] = ['block', 'critical', 'major'];

/**
 * The worst of some checks. A grave failure (block, critical, major) breaks; a lesser one (minor, information) calls
 * for caution; a grave rule that cannot be judged leaves the link not judged where nothing fails; a lesser one that
 * cannot be judged changes nothing.
 */
export function standingOf(checks: readonly Check[]): Standing {
  const failing = checks.filter((check) => check.outcome === 'fails');
  if (failing.some((check) => GRAVE.includes(check.severity))) return 'broken';
  if (failing.length > 0) return 'caution';
  const isOpen = checks.some(
    (check) => check.outcome === 'cannot be judged' && GRAVE.includes(check.severity),
  );
  return isOpen ? 'not judged' : 'sound';
}

type RuleAbout<Facts> = RuleHead & {
  judge(facts: Facts, question: Question, verdict: VerdictName): Finding;
};

function checksOf<Facts>(
  rules: readonly RuleAbout<Facts>[],
  subject: Check['subject'],
  facts: Facts,
  question: Question,
): Check[] {
  const checks: Check[] = [];
  for (const rule of rules) {
    for (const verdict of rule.verdicts) {
      const finding = rule.judge(facts, question, verdict);
      const { outcome, sentence, severity = rule.severity } = finding;
      const parameters = usedIn(rule, finding);
      checks.push({ rule: rule.id, subject, verdict, outcome, severity, parameters, sentence });
    }
  }
  return checks;
}

/** The places of each sentence, by rule and key. */
const PLACES = new Map(
  RULES.map(({ id, sentences }) => [
    id,
    new Map(Object.entries(sentences).map(([key, text]) => [key, placesOf(text)])),
  ]),
);

/** Of what a rule had at hand only what its sentence says: a reply with hundreds of checks is half as large. */
function usedIn({ id }: RuleHead, { sentence, parameters }: Finding): Record<string, string> {
  const used: Record<string, string> = {};
  for (const name of PLACES.get(id)?.get(sentence) ?? []) {
    const text = parameters[name];
    if (text !== undefined) used[name] = text;
  }
  return used;
}

/**
 * A link stands as its own checks and those of the value that leans: the step made that value. The checks of a value
 * without a step above it (a root) count where it is leaned on. What a rule finds for the conduct counts for today as
 * well where it is a flaw of the result itself.
 */
function standingsOf(chain: ChainFacts, checks: readonly Check[]): LinkStanding[] {
  const byLink = new Map<string, Check[]>();
  const byValue = new Map<string, Check[]>();
  for (const check of checks) {
    const { subject } = check;
    if (subject.type === 'link') add(byLink, `${subject.childUid} ${subject.parentUid}`, check);
    if (subject.type === 'value') add(byValue, subject.uid, check);
  }
  const leaning = new Set(
    chain.links.filter((link) => link.role === 'reference').map((link) => link.child.uid),
  );
  return chain.links.map((link) => {
    const [childUid, parentUid] = [link.child.uid, link.parent.uid];
    if (link.role === 'informs') return { childUid, parentUid, conduct: 'sound', today: 'sound' };
    const concerned = [
      ...(byLink.get(`${childUid} ${parentUid}`) ?? []),
      ...(byValue.get(childUid) ?? []),
      ...(leaning.has(parentUid) ? [] : (byValue.get(parentUid) ?? [])),
    ];
    return {
      childUid,
      parentUid,
      conduct: standingOf(concerned.filter((check) => check.verdict === 'conduct')),
      today: standingOf(concerned.filter((check) => check.verdict === 'today' || LASTING.has(check.rule))),
    };
  });
}

function add(map: Map<string, Check[]>, key: string, check: Check): void {
  const list = map.get(key);
  if (list) list.push(check);
  else map.set(key, [check]);
}

import type { z } from 'zod';
import type { Outcome, Severity, Verdict } from '#shared/contracts/common.ts';
import type { ChainFacts, LinkFacts, Question, ValueFacts } from './facts.ts';

export type { Outcome, Severity };
export type VerdictName = z.infer<typeof Verdict>;

/** What a rule found: its outcome, the key of its sentence, and the texts for the sentence's `{places}`. */
export interface Finding {
  outcome: Outcome;
  /** Key into the rule's `sentences`. */
  sentence: string;
  /** Texts ready for reading. */
  parameters: Record<string, string>;
  /** Where the outcome weighs other than the rule itself. */
  severity?: Severity;
}

/** What every rule is, whatever it looks at. */
export interface RuleHead {
  /** Number of the rule in the rule list, for example `B-14`; `X-..` for a question of our own. */
  id: string;
  title: string;
  severity: Severity;
  /** Which verdicts it speaks for; it is judged once for each. */
  verdicts: readonly VerdictName[];
  /** A flaw of the result itself: found for the conduct, it counts for today as well. */
  isLasting?: true;
  /** Each names the certificate, the date or the field that would mend it. */
  sentences: Readonly<Record<string, string>>;
}

/** A rule about one step from a value to its reference. */
export interface LinkRule extends RuleHead {
  scope: 'link';
  judge(facts: LinkFacts, question: Question, verdict: VerdictName): Finding;
}

/** A rule about one assigned value. */
export interface ValueRule extends RuleHead {
  scope: 'value';
  judge(facts: ValueFacts, question: Question, verdict: VerdictName): Finding;
}

/** A rule about the chain as a whole. */
export interface ChainRuleOf extends RuleHead {
  scope: 'chain';
  judge(facts: ChainFacts, question: Question, verdict: VerdictName): Finding;
}

export type Rule = LinkRule | ValueRule | ChainRuleOf;

type Parameters = Record<string, string>;

/** The rule is kept. `severity` where the finding is worth a note all the same. */
export function holds(sentence: string, parameters: Parameters = {}, severity?: Severity): Finding {
  return { outcome: 'holds', sentence, parameters, ...(severity && { severity }) };
}

/** The rule is not kept. */
export function fails(sentence: string, parameters: Parameters = {}, severity?: Severity): Finding {
  return { outcome: 'fails', sentence, parameters, ...(severity && { severity }) };
}

/** A datum is missing; the sentence names it. `severity` where it would not decide as much as the rule itself. */
export function cannotBeJudged(sentence: string, parameters: Parameters = {}, severity?: Severity): Finding {
  return { outcome: 'cannot be judged', sentence, parameters, ...(severity && { severity }) };
}

/** The rule has nothing to say here; the sentence says why. */
export function doesNotApply(sentence: string, parameters: Parameters = {}): Finding {
  return { outcome: 'does not apply', sentence, parameters };
}

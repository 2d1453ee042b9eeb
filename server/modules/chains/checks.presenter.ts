import type { z } from 'zod';
import type { ChainCheck, ChainResponse } from '#shared/contracts/chains.ts';

type Check = z.infer<typeof ChainCheck>;

/** The rules with those of their sentences that are said: the others would be a quarter of the reply. */
export function rulesTold(rules: ChainResponse['rules'], checks: readonly Check[]): ChainResponse['rules'] {
  const told = new Set(checks.map(({ rule, sentence }) => `${rule} ${sentence}`));
  return rules.map((rule) => ({
    ...rule,
    sentences: Object.fromEntries(
      Object.entries(rule.sentences).filter(([key]) => told.has(`${rule.id} ${key}`)),
    ),
  }));
}

/** Rules of which the words quote other calibrations of the weight, or of its duplicate. */
const OF_HISTORY: ReadonlySet<string> = new Set(['B-17', 'B-18', 'B-19', 'X-01']);

/**
 * Whether what a rule says of a value may be told in words. From the history and budget of another laboratory's weight
 * nothing is; to who issued its certificate, nothing from its history. The outcome is shown in any case.
 */
export function isToldInWords(rule: string, sees: { full: boolean; history: boolean }): boolean {
  return sees.full && (sees.history || !OF_HISTORY.has(rule));
}

/** A check as it may be told: of a value without its words where they are not this person's to read. */
export function redactCheck(
  check: Check,
  sees: { full(uid: string): boolean; history(uid: string): boolean },
): Check {
  const { rule, subject } = check;
  if (subject.type !== 'value') return check;
  if (isToldInWords(rule, { full: sees.full(subject.uid), history: sees.history(subject.uid) })) return check;
  return { ...check, sentence: null, parameters: {} };
}

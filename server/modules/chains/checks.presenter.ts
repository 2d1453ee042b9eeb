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

/** What a rule says of another laboratory's weight from its history and budget stays there; its outcome is shown. */
export function redactCheck(check: Check, isFull: (uid: string) => boolean): Check {
  if (check.subject.type !== 'value' || isFull(check.subject.uid)) return check;
  return { ...check, sentence: null, parameters: {} };
}

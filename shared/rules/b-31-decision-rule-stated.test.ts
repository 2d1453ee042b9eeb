import { expect, it } from 'vitest';
import { decisionRuleStated } from './b-31-decision-rule-stated.ts';
import { judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

const judge = (changes: Partial<ValueFacts>) => judgedBy(decisionRuleStated, valueFacts(changes));

it('holds with a decision rule, for the mass as well where the conventional mass is on the certificate', () => {
  expect(judge({}).text).toBe('Certificate RL-2025-031 states class E2 by the guarded decision rule.');
  expect(judge({ quantity: 'mass', otherKind: valueFacts() }).outcome).toBe('holds');
});

it('fails without: minor, since R 111-1 has one of its own', () => {
  expect(judge({ decisionRule: null })).toMatchObject({
    outcome: 'fails',
    severity: 'minor',
    sentence: 'no rule',
  });
});

it('fails where the specification does not cover the result', () => {
  expect(judge({ nominal: '300' })).toMatchObject({
    outcome: 'fails',
    severity: 'major',
    sentence: 'no limit',
  });
  expect(judge({ quantity: 'mass' }).text).toContain('class E2 for the mass of MI 0007');
});

it('cannot be judged for a certificate received', () => {
  expect(judge({ decisionRule: null, registeredByIssuer: false })).toMatchObject({
    outcome: 'cannot be judged',
    severity: 'information',
  });
});

it('does not apply without class', () => {
  expect(judge({ class: null, decisionRule: null }).outcome).toBe('does not apply');
});

import { expect, it } from 'vitest';
import { classByDeclaredRule } from './b-30-class-by-declared-rule.ts';
import { judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

/** E2 at 1 kg: maximum permissible error 1.6 mg (OIML R 111-1:2004, Table 1); U 0.30 mg, so MPE - U = 1.30 mg. */
const judge = (deviation: string, changes: Partial<ValueFacts> = {}) =>
  judgedBy(classByDeclaredRule, valueFacts({ deviation, ...changes }));
const simple = { decisionRule: 'simple' } as const;
const undeclared = { decisionRule: null };

it('holds by the declared rule, exactly at its limit too', () => {
  expect(judge('-0.0013').outcome).toBe('holds');
  expect(judge('0.0015', simple).outcome).toBe('holds');
});

it('fails by the declared rule, though the other might accept', () => {
  const found = judge('0.0015');
  expect(found).toMatchObject({ outcome: 'fails', severity: 'critical' });
  expect(found.text).toContain(
    '+1.50\u2009mg with U 0.30\u2009mg does not keep the guarded decision rule (maximum permissible error 1.6 mg)',
  );
  expect(judge('-0.0017', simple).outcome).toBe('fails');
});

it('without a declared rule is judged only where both agree', () => {
  expect(judge('0.001', undeclared).sentence).toBe('follows both');
  expect(judge('0.0017', undeclared).sentence).toBe('breaks both');
  expect(judge('0.0015', undeclared)).toMatchObject({ outcome: 'cannot be judged', sentence: 'no rule' });
});

it('cannot be judged on the limit within rounding, or without U', () => {
  expect(judge('0.00131').sentence).toBe('rounding');
  expect(judge('0.001', { expandedU: null }).outcome).toBe('cannot be judged');
});

it('does not apply without class', () => {
  expect(judge('0.01', { class: null }).outcome).toBe('does not apply');
});

import { expect, it } from 'vitest';
import { driftOfReference } from './b-23-drift-of-reference.ts';
import { BUDGET, judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';
import type { BudgetFacts, EffectFacts, LeaningFacts } from './weight-facts.ts';

const judge = (budget: Partial<BudgetFacts>, changes: Partial<ValueFacts> = {}) =>
  judgedBy(driftOfReference, valueFacts({ budget: { ...BUDGET, ...budget }, ...changes }));
const leaning = (changes: Partial<LeaningFacts>): LeaningFacts[] => [
  { ...BUDGET.references[0]!, ...changes },
];
const drift: EffectFacts = {
  kind: 'drift',
  standardId: 'standard-reference',
  of: 'RL 0001',
  sensitivity: 1.2,
  u: 2e-5,
  determinedOn: null,
  onRecord: [],
};

it('holds by a component that names the change, however it is called', () => {
  for (const name of ['Drift of the standard', 'Instability of RL 0001', 'Reference since its calibration'])
    expect(judge({ components: ['Repeatability', name] }).outcome).toBe('holds');
});

it("holds by a drift source of the reference itself, not by another weight's", () => {
  const components = ['Repeatability', 'Balance'];
  expect(judge({ components, effects: [drift] }).outcome).toBe('holds');
  expect(judge({ components, effects: [{ ...drift, standardId: 'standard-other' }] }).outcome).toBe('fails');
});

it('fails where the budget is there and has no such term', () => {
  const found = judge({ components: ['Repeatability', 'Balance', 'Air density'] });
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain('RL-2025-031 for MI 0007 has no term for what RL 0001 may have changed');
});

it('cannot be judged where a component only speaks of the reference, or no budget is on record', () => {
  expect(judge({ components: ['Repeatability', 'Reference weight'] })).toMatchObject({
    outcome: 'cannot be judged',
    sentence: 'unnamed',
    severity: 'minor',
  });
  expect(judge({ components: [] })).toMatchObject({ outcome: 'cannot be judged', severity: 'information' });
  expect(judge({ components: ['Weighing'] }).sentence).toBe('no budget');
});

it('does not apply to a certificate received, to a root, nor where the use counts the change already', () => {
  expect(judge({ components: [] }, { registeredByIssuer: false }).sentence).toBe('received');
  expect(judge({ references: [] }).sentence).toBe('no reference');
  expect(judge({ references: leaning({ kind: 'consensus value' }) }).sentence).toBe('no reference');
  expect(judge({ references: leaning({ usedAs: 'class limit' }) }).sentence).toBe('counted otherwise');
});

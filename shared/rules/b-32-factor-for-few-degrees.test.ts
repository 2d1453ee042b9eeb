import { expect, it } from 'vitest';
import { factorForFewDegrees } from './b-32-factor-for-few-degrees.ts';
import { BUDGET, judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';
import type { BudgetFacts } from './weight-facts.ts';

/** Factors for 95.45 %: 2.87 with 4 degrees of freedom, 2.32 with 9 (JCGM 100:2008, Table G.2). */
const judge = (budget: Partial<BudgetFacts>, changes: Partial<ValueFacts> = {}) =>
  judgedBy(factorForFewDegrees, valueFacts({ budget: { ...BUDGET, ...budget }, ...changes }));

it('holds with ten or more, and with the factor that few need', () => {
  expect(judge({ nuEff: 10 }).sentence).toBe('enough');
  expect(judge({ nuEff: 4 }, { k: '2.87' }).sentence).toBe('fits');
  expect(judge({ nuEff: 9 }, { k: '2.26', coverage: '0.95' }).sentence).toBe('fits');
});

it('fails for k = 2 with few', () => {
  const found = judge({ nuEff: 4.8 });
  expect(found).toMatchObject({ outcome: 'fails', severity: 'minor' });
  expect(found.text).toContain('k = 2 for MI 0007 with 4 degrees of freedom; 2.87 is needed for 95.45 %');
  expect(judge({ nuEff: 0.4 }).outcome).toBe('fails');
});

it('takes the own part where none are stated: the most there can be', () => {
  // u = 0.15 mg, own part 0.15 mg with 5: then 5 in all; with half of it own 80.
  expect(judge({ ownU: 0.00015, ownDegreesOfFreedom: 5 }).outcome).toBe('fails');
  expect(judge({ ownU: 0.000075, ownDegreesOfFreedom: 5 }).text).toContain('With 80 degrees of freedom');
});

it('cannot be judged where nothing is known of them', () => {
  expect(judge({ ownDegreesOfFreedom: null })).toMatchObject({
    outcome: 'cannot be judged',
    severity: 'information',
  });
});

it('does not apply without U or k', () => {
  expect(judge({ nuEff: 4 }, { expandedU: null }).outcome).toBe('does not apply');
  expect(judge({ nuEff: 4 }, { k: null }).outcome).toBe('does not apply');
});

import { expect, it } from 'vitest';
import { buoyancyCounted } from './b-25-buoyancy-counted.ts';
import { BUDGET, judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';
import type { BudgetFacts, EffectFacts } from './weight-facts.ts';

const judge = (budget: Partial<BudgetFacts>, changes: Partial<ValueFacts> = {}) =>
  judgedBy(buoyancyCounted, valueFacts({ budget: { ...BUDGET, ...budget }, ...changes }));
/** The weight's own volume, at an air density of 1.18 kg/m³ between conventional masses. */
const own: EffectFacts = {
  kind: 'volume',
  standardId: 'standard-focus',
  of: 'MI 0007',
  sensitivity: -0.00002,
  u: 0.3,
  determinedOn: null,
  onRecord: [],
};
const without = { components: ['Repeatability', 'Reference since its calibration'] };

it('holds by the volumes, or by a component', () => {
  expect(judge({ ...without, effects: [own] }).text).toContain('by the volumes of MI 0007');
  expect(judge({ components: ['Repeatability', 'Buoyancy'] }).sentence).toBe('component');
  expect(judge({ components: ['Air density'] }).outcome).toBe('holds');
});

it('says so where the air density lay more than a tenth from 1.2 kg/m³', () => {
  const thin = judge({ ...without, effects: [{ ...own, sensitivity: -0.00017 }] });
  expect(thin).toMatchObject({ outcome: 'holds', severity: 'information', sentence: 'other air' });
  expect(thin.text).toContain('about 1.03 kg/m³');
  const asMass = judge({ ...without, effects: [{ ...own, sensitivity: 0.00103 }] }, { quantity: 'mass' });
  expect(asMass.sentence).toBe('other air');
  expect(judge({ ...without, effects: [{ ...own, sensitivity: 0.9 }] }).sentence).toBe('volumes');
});

it('fails where a fine class has a budget without it', () => {
  const found = judge(without);
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain('RL-2025-031 for MI 0007 has no term for air buoyancy and names no volume');
});

it('cannot be judged without budget and volumes', () => {
  expect(judge({ components: [] })).toMatchObject({ outcome: 'cannot be judged', severity: 'information' });
  expect(judge({ components: ['Weighing'] }).sentence).toBe('no budget');
});

it('does not apply in vacuum, to coarse classes, certificates received and roots', () => {
  expect(judge(without, { medium: 'vacuum' }).sentence).toBe('not in air');
  expect(judge(without, { class: 'F2' }).sentence).toBe('coarse');
  expect(judge({ components: [] }, { registeredByIssuer: false }).sentence).toBe('received');
  expect(judge({ ...without, references: [] }).sentence).toBe('no comparison');
});

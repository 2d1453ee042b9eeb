import { expect, it } from 'vitest';
import { weightIdentified } from './b-01-weight-identified.ts';
import { judgedBy, valueFacts, WEIGHT } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';
import type { WeightFacts } from './weight-facts.ts';

const judge = (weight: Partial<WeightFacts>, changes: Partial<ValueFacts> = {}) =>
  judgedBy(weightIdentified, valueFacts({ weight: { ...WEIGHT, ...weight }, ...changes }));
const bare = { serial: null };
const twin = { registryNo: 'MI 0008', marking: '1 kg', serial: null };

it('holds by serial number, by marking, and as the only one of its set', () => {
  expect(judge({}).text).toContain('serial number 4711');
  expect(judge(bare, { marking: 'Kilogram A' }).sentence).toBe('marking');
  expect(judge({ ...bare, isInSet: true }).text).toContain('the only weight of 1\u2009kg in its set');
});

it('holds for two of one nominal value that a star or a serial number tells apart', () => {
  const star = { ...bare, isInSet: true, alike: [{ ...twin, marking: '1 kg *' }] };
  expect(judge(star).outcome).toBe('holds');
  expect(judge({ isInSet: true, alike: [{ ...twin, serial: '4712' }] }).outcome).toBe('holds');
});

it('fails where two of a set could be taken for each other', () => {
  const found = judge({ ...bare, isInSet: true, alike: [twin] });
  expect(found).toMatchObject({ outcome: 'fails', severity: 'block' });
  expect(found.text).toContain('MI 0007 and MI 0008 of the same set are both marked "1 kg"');
});

it('cannot be judged for a single weight with its nominal value alone, and that weighs little', () => {
  expect(judge(bare)).toMatchObject({ outcome: 'cannot be judged', severity: 'minor' });
});

it('does not apply to what is no artefact', () => {
  expect(judge({ kind: 'consensus value' }).outcome).toBe('does not apply');
});

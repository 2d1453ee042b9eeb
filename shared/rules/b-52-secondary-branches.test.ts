import { expect, it } from 'vitest';
import { secondaryBranches } from './b-52-secondary-branches.ts';
import { BUDGET, judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';
import type { EffectFacts } from './weight-facts.ts';

/** u of the value 0.15 mg; a volume with u 0.5 cm3 at 0.05 mg/cm3 brings (0.025/0.15)^2, 2.8 % of its variance. */
const volume: EffectFacts = {
  kind: 'volume',
  standardId: 'standard-focus',
  of: 'MI 0007',
  sensitivity: 0.00005,
  u: 0.5,
  determinedOn: null,
  onRecord: [
    {
      kind: 'density',
      isThis: true,
      validFrom: '2019-01-01',
      validTo: null,
      recordedAt: '2019-01-01T08:00:00.000000Z',
    },
  ],
};
const newer = {
  kind: 'density',
  isThis: false,
  validFrom: '2024-06-01',
  validTo: null,
  recordedAt: '2024-06-01T08:00:00.000000Z',
} as const;
const judge = (effects: Partial<EffectFacts>[], changes: Partial<ValueFacts> = {}) =>
  judgedBy(
    secondaryBranches,
    valueFacts({ budget: { ...BUDGET, effects: effects.map((one) => ({ ...volume, ...one })) }, ...changes }),
  );

it('holds for the volume that stood, and for what was determined by then', () => {
  expect(judge([{}]).text).toContain('leaned on MI 0007, which stood on 2025-03-10');
  const air = { kind: 'air', of: 'Barometer 3', determinedOn: '2025-03-10' } as const;
  expect(judge([air]).text).toContain('Barometer 3 (air)');
});

it('fails where another determination stood by then, and was known', () => {
  const found = judge([{ onRecord: [...volume.onRecord, newer] }]);
  expect(found).toMatchObject({ outcome: 'fails', severity: 'minor', sentence: 'later one' });
  const knownLater = { ...newer, recordedAt: '2025-08-01T08:00:00.000000Z' };
  expect(judge([{ onRecord: [...volume.onRecord, knownLater] }]).outcome).toBe('holds');
});

it('fails where it was determined after the use', () => {
  expect(judge([{ determinedOn: '2025-03-11' }]).text).toContain('determined only on 2025-03-11');
});

it('cannot be judged where dates are missing or too coarse', () => {
  expect(judge([{ onRecord: [] }])).toMatchObject({ sentence: 'not dated', severity: 'information' });
  expect(judge([{ determinedOn: '2025-03-20' }], { datePrecision: 'month' }).sentence).toBe('undecided');
  expect(judge([{}], { expandedU: null }).sentence).toBe('no uncertainty');
});

it('does not follow what hardly contributes, nor the scale', () => {
  expect(judge([{ u: 0.1, onRecord: [newer] }]).sentence).toBe('small');
  expect(judge([{ kind: 'scale version' }]).sentence).toBe('none');
});

import { expect, it } from 'vitest';
import { beforeAndAfterAdjustment } from './b-36-before-and-after-adjustment.ts';
import { judgedBy, SHEET, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';
import type { SheetFacts } from './weight-facts.ts';

/** Performed from 2025-03-09 to 2025-03-10. */
const judge = (
  beginsOn: string,
  stages: SheetFacts['stages'],
  changes: Partial<ValueFacts> = {},
  reason = 'adjusted',
) =>
  judgedBy(
    beforeAndAfterAdjustment,
    valueFacts({ sheet: { ...SHEET, stages, epoch: { n: 2, reason, beginsOn } }, ...changes }),
  );

it('holds with both results', () => {
  expect(judge('2025-03-09', ['as found', 'as left'], { stage: 'as left' }).outcome).toBe('holds');
});

it('fails with one of them, whichever the epoch it belongs to', () => {
  const found = judge('2025-03-10', ['as left'], { stage: 'as left' });
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major', sentence: 'not before' });
  expect(found.text).toContain(
    'MI 0007 was adjusted on 2025-03-10, in the course of certificate RL-2025-031',
  );
  expect(judge('2025-03-09', [null]).outcome).toBe('fails');
  const nextEpoch = {
    reason: 'adjusted',
    beginsOn: '2025-03-10',
    lastGoodOn: null,
    recordedAt: '2025-03-10T09:00:00.000000Z',
  };
  const before = valueFacts({ stage: 'as found', nextEpoch, sheet: { ...SHEET, stages: ['as found'] } });
  expect(judgedBy(beforeAndAfterAdjustment, before).sentence).toBe('not after');
});

it('cannot be judged after a repair, or where a month does not decide', () => {
  expect(judge('2025-03-09', [null], {}, 'repaired')).toMatchObject({
    outcome: 'cannot be judged',
    severity: 'minor',
  });
  expect(judge('2025-03-15', [null], { datePrecision: 'month' }).sentence).toBe('undecided');
});

it('does not apply where the epoch began before, nor to the first epoch of a weight', () => {
  expect(judge('2025-03-08', [null]).outcome).toBe('does not apply');
  expect(judgedBy(beforeAndAfterAdjustment, valueFacts()).outcome).toBe('does not apply');
  const first = { ...SHEET, epoch: { n: 1, reason: 'new', beginsOn: '2025-03-10' } };
  expect(judgedBy(beforeAndAfterAdjustment, valueFacts({ sheet: first })).outcome).toBe('does not apply');
});

import { expect, it } from 'vitest';
import { amendmentSaysWhy } from './b-40-amendment-says-why.ts';
import { judgedBy, SHEET, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

const judge = (amendmentReason: string | null, changes: Partial<ValueFacts> = { revisionN: 2 }) =>
  judgedBy(amendmentSaysWhy, valueFacts({ sheet: { ...SHEET, amendmentReason }, ...changes }));

it('holds with a reason', () => {
  expect(judge('The address of the customer was corrected.').text).toBe(
    'Certificate RL-2025-031, revision 2 amends revision 1 and states what changed and why.',
  );
});

it('fails without, or with one that says nothing', () => {
  expect(judge(null)).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(judge(' - ').outcome).toBe('fails');
});

it('cannot be judged for a revision that its recipient entered', () => {
  expect(judge(null, { revisionN: 2, registeredByIssuer: false })).toMatchObject({
    outcome: 'cannot be judged',
    severity: 'minor',
  });
});

it('does not apply to the first issue', () => {
  expect(judge(null, { revisionN: 1 }).outcome).toBe('does not apply');
});

import { expect, it } from 'vitest';
import { referenceWithinEpoch } from './b-08-epoch-of-reference.ts';
import { judgedBy, linkFacts, referenceFacts, valueFacts } from './example-facts.ts';

const adjusted = (beginsOn: string, lastGoodOn: string | null = null) =>
  referenceFacts({
    nextEpoch: { reason: 'adjusted', beginsOn, lastGoodOn, recordedAt: `${beginsOn}T00:00:00.000000Z` },
  });
const judge = (parent = referenceFacts(), child = valueFacts()) =>
  judgedBy(referenceWithinEpoch, linkFacts({ parent, child }));

it('holds without an intervention, and with one after the use or on its day', () => {
  expect(judge()).toMatchObject({ outcome: 'holds', sentence: 'untouched' });
  expect(judge(adjusted('2025-08-01'))).toMatchObject({ outcome: 'holds', sentence: 'before' });
  expect(judge(adjusted('2025-03-10')).outcome).toBe('holds');
});

it('fails where the weight had been adjusted by then, and names the certificate', () => {
  const found = judge(adjusted('2024-11-01'));
  expect(found).toMatchObject({ outcome: 'fails', severity: 'critical' });
  expect(found.text).toContain(
    'Certificate IP-2024-002 was used until 2025-03-10, but RL 0001 was adjusted by 2024-11-01',
  );
});

it('cannot be judged between last good and first bad', () => {
  const found = judge(adjusted('2025-06-01', '2025-01-01'));
  expect(found.outcome).toBe('cannot be judged');
  expect(found.text).toContain('last known good on 2025-01-01');
  const coarse = judge(adjusted('2025-06-01'), valueFacts({ datePrecision: 'year' }));
  expect(coarse.text).toContain('an unknown day');
});

it('does not apply to the earlier definition', () => {
  expect(judge(referenceFacts({ rootKind: 'earlier definition' })).outcome).toBe('does not apply');
});

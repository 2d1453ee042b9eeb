import { expect, it } from 'vitest';
import { referenceIssuedFirst } from './b-13-reference-issued-first.ts';
import { judgedBy, linkFacts, referenceFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

const judge = (parent: Partial<ValueFacts>) =>
  judgedBy(referenceIssuedFirst, linkFacts({ parent: referenceFacts(parent) }));

it('holds where the reference was issued before, or on the same day', () => {
  expect(judge({}).outcome).toBe('holds');
  expect(judge({ issuedOn: '2025-03-14' }).outcome).toBe('holds');
});

it('fails where it was issued later', () => {
  const found = judge({ issuedOn: '2025-03-15' });
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain('RL-2025-031 was issued on 2025-03-14');
});

it('cannot be judged by the month alone', () => {
  expect(judge({ issuedOn: '2025-03-01', datePrecision: 'month' }).outcome).toBe('cannot be judged');
});

it('does not apply to the earlier definition', () => {
  expect(judge({ rootKind: 'earlier definition' }).outcome).toBe('does not apply');
});

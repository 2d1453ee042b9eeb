import { expect, it } from 'vitest';
import { referencePerResult } from './b-11-reference-per-result.ts';
import { judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

const judge = (changes: Partial<ValueFacts>) => judgedBy(referencePerResult, valueFacts(changes));

it('holds where this result has references', () => {
  expect(judge({}).outcome).toBe('holds');
});

it('fails where only other results of the certificate have them', () => {
  const found = judge({ references: 0, siblingLinesWithReferences: 4 });
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain('the one for MI 0007 does not');
});

it('cannot be judged where the other results are not known', () => {
  expect(judge({ references: 0, siblingLinesWithReferences: null }).outcome).toBe('cannot be judged');
});

it('does not apply to a stated reference, nor where no result names one (B-10 does)', () => {
  expect(judge({ rootKind: 'realization run', references: 0 }).outcome).toBe('does not apply');
  expect(judge({ references: 0, siblingLinesWithReferences: 0 }).sentence).toBe('none');
});

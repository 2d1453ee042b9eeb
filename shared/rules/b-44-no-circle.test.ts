import { expect, it } from 'vitest';
import { noCircle } from './b-44-no-circle.ts';
import { FOCUS, REFERENCE, chainFacts, judgedBy, linkFacts, referenceFacts } from './example-facts.ts';
import type { ChainFacts, LinkFacts, ValueFacts } from './facts.ts';

const judge = (changes: Partial<ChainFacts>) => judgedBy(noCircle, chainFacts(changes));
const leaningOn = (parent: Partial<ValueFacts>, changes: Partial<LinkFacts> = {}) =>
  judge({ links: [linkFacts({ parent: referenceFacts(parent), ...changes })] });

it('holds where every reference is earlier, or of the same day', () => {
  expect(judge({}).outcome).toBe('holds');
  expect(leaningOn({ performedEnd: '2025-03-10' }).outcome).toBe('holds');
});

it('fails for a circle, and names it', () => {
  const found = judge({ circle: [FOCUS, REFERENCE, 'value-elsewhere', FOCUS] });
  expect(found).toMatchObject({ outcome: 'fails', severity: 'block' });
  expect(found.text).toContain('MI 0007 ← RL 0001 ← value-elsewhere ← MI 0007');
});

it('fails for a later reference, bracketing excepted', () => {
  expect(leaningOn({ performedEnd: '2025-03-11' }).text).toContain(
    'leans on IP-2024-002, which was determined later (2025-03-11)',
  );
  expect(leaningOn({ performedEnd: '2025-03-11' }, { usedAs: 'bracketing' }).outcome).toBe('does not apply');
});

it('cannot be judged by the year alone', () => {
  expect(leaningOn({ datePrecision: 'year', performedEnd: '2025-01-01' }).outcome).toBe('cannot be judged');
});

it('does not apply without dated links', () => {
  expect(judge({ links: [] }).outcome).toBe('does not apply');
  expect(leaningOn({ rootKind: 'earlier definition' }).outcome).toBe('does not apply');
  expect(leaningOn({ performedEnd: '2026-01-01' }, { role: 'informs' }).outcome).toBe('does not apply');
});

import { expect, it } from 'vitest';
import { quantityKind } from './b-16-quantity-kind.ts';
import { judgedBy, linkFacts, referenceFacts, valueFacts } from './example-facts.ts';
import type { LinkFacts, ValueFacts } from './facts.ts';

const judge = (parent: Partial<ValueFacts>, changes: Partial<LinkFacts> = {}) =>
  judgedBy(quantityKind, linkFacts({ parent: referenceFacts(parent), ...changes }));

it('holds for one kind, and for two where the density with its U is on record', () => {
  expect(judge({}).sentence).toBe('same');
  expect(judge({ quantity: 'mass' }).sentence).toBe('converted');
});

it('fails without a density: critical for fine classes and without class, minor for M', () => {
  const mixed = { quantity: 'mass', density: null } as const;
  expect(judge(mixed)).toMatchObject({ outcome: 'fails', severity: 'critical' });
  expect(judge(mixed, { child: valueFacts({ class: null }) }).severity).toBe('critical');
  expect(judge(mixed, { child: valueFacts({ class: 'M1' }) }).severity).toBe('minor');
  expect(judge(mixed).text).toContain('no density of RL 0001 is on record');
});

it('cannot be judged where the density states no U', () => {
  const density = { value: '7950', expandedU: null, k: null, origin: 'assumed' } as const;
  expect(judge({ quantity: 'mass', density }).outcome).toBe('cannot be judged');
});

it('does not apply where only the class was used', () => {
  expect(judge({ quantity: 'mass' }, { usedAs: 'class limit' }).outcome).toBe('does not apply');
});

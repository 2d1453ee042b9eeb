import { expect, it } from 'vitest';
import { uOfReference } from './b-22-u-of-reference.ts';
import { judgedBy, linkFacts, referenceFacts } from './example-facts.ts';
import type { LinkFacts, ValueFacts } from './facts.ts';

/** The certificate: U 0.12 mg, k = 2.32. */
const judge = (changes: Partial<LinkFacts>, parent: Partial<ValueFacts> = {}) =>
  judgedBy(uOfReference, linkFacts({ parent: referenceFacts({ k: '2.32', ...parent }), ...changes }));

it('holds for the U of the certificate with its own k, and for more', () => {
  expect(judge({}).sentence).toBe('as stated');
  expect(judge({ usedExpandedU: '0.0001', usedK: '1.93' }).sentence).toBe('as stated');
  expect(judge({ usedK: '2' })).toMatchObject({
    outcome: 'holds',
    severity: 'information',
    sentence: 'larger',
  });
});

it('fails where less was used', () => {
  const found = judge({ usedExpandedU: '0.00012', usedK: '3' });
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain('gives 0.052\u2009mg (U/k with its own k = 2.32)');
});

it('cannot be judged where the certificate states no U or no k', () => {
  expect(judge({}, { expandedU: null }).sentence).toBe('no uncertainty');
  expect(judge({}, { k: null }).sentence).toBe('no k');
});

it('does not apply where not the certificate was used', () => {
  for (const usedAs of ['class limit', 'fit', 'bracketing'] as const) {
    expect(judge({ usedAs }).outcome).toBe('does not apply');
  }
  expect(judge({ usedAs: 'by notice' }).outcome).toBe('holds');
});

import { expect, it } from 'vitest';
import { chainVariance } from './b-46-chain-variance.ts';
import { chainFacts, judgedBy, referenceFacts, valueFacts } from './example-facts.ts';
import type { ChainFacts, ValueFacts } from './facts.ts';

/** U of the focus 0.30 mg at k = 2. */
const judge = (uNow: number | null, changes: Partial<ChainFacts> = {}) =>
  judgedBy(chainVariance, chainFacts({ varianceNow: uNow === null ? null : (uNow / 1000) ** 2, ...changes }));
const withFocus = (changes: Partial<ValueFacts>) => ({ values: [valueFacts(changes), referenceFacts()] });
const deficit = referenceFacts({ rootKind: null, references: 1, carriedVariance: 0.0001 ** 2 });

it('holds where U covers it, and within rounding along the way', () => {
  expect(judge(0.12).sentence).toBe('covers');
  expect(judge(0.15)).toMatchObject({ outcome: 'holds', sentence: 'rounding' });
  expect(judge(0.156)).toMatchObject({ outcome: 'holds', severity: 'information' });
});

it('fails where a deficit upstream is inherited, and names its certificate', () => {
  const found = judge(0.156, { values: [valueFacts(), deficit] });
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major', sentence: 'inherits' });
  expect(found.text).toContain('inherits the deficit of certificate IP-2024-002');
});

it('fails beyond rounding without one', () => {
  expect(judge(0.2).text).toContain('carries 0.40\u2009mg at the same k: 33 % more');
});

it('cannot be judged without U, or where the chain is not computable', () => {
  expect(judge(0.2, withFocus({ expandedU: null })).sentence).toBe('no uncertainty');
  expect(judge(0.2, withFocus({ k: null })).sentence).toBe('no uncertainty');
  expect(judge(null, withFocus({ carriedMissing: ['X-1'] })).text).toContain('certificate X-1 states no U');
  expect(judge(null)).toMatchObject({ outcome: 'cannot be judged', sentence: 'lost' });
});

it('does not apply to a stated reference, nor where the deficit is reported at the focus itself', () => {
  expect(judge(0.2, withFocus({ rootKind: 'realization run' })).sentence).toBe('root');
  expect(judge(0.2, withFocus({ carriedVariance: 0.0002 ** 2 })).sentence).toBe('at the focus');
});

it('does not count a reference without U as a deficit', () => {
  const silent = referenceFacts({ expandedU: null });
  expect(judge(0.12, { values: [valueFacts(), silent] }).outcome).toBe('holds');
});

import { expect, it } from 'vitest';
import { massAndConventional } from './b-20-mass-and-conventional.ts';
import { historyFacts, judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

/**
 * OIML D 28: m (1 - 1.2/rho) = mc (1 - 1.2/8000). At 7950 kg/m3 and 1 kg the conventional mass is 0.9435 mg below the
 * mass: (1 - 1.2/7950)/(1 - 1.2/8000) - 1 = -9.4354e-7.
 */
const judge = (mass: string, changes: Partial<ValueFacts> = {}) =>
  judgedBy(massAndConventional, valueFacts({ otherKind: historyFacts({ deviation: mass }), ...changes }));

it('holds within the rounding of both', () => {
  expect(judge('0.00115')).toMatchObject({ outcome: 'holds', sentence: 'agree' });
  expect(judge('0.00116').sentence).toBe('agree');
});

it('fails where a value leaves no mass at all', () => {
  expect(judge('-1000')).toMatchObject({ outcome: 'fails', sentence: 'no mass' });
});

it('reads either kind as the first', () => {
  const conventional = historyFacts({ deviation: '0.00021' });
  const found = judgedBy(
    massAndConventional,
    valueFacts({ quantity: 'mass', deviation: '0.00115', otherKind: conventional }),
  );
  expect(found.sentence).toBe('agree');
});

it('holds with a note where only the U of the density covers the gap', () => {
  // 1 kg x 1.2 x 140 / 7950^2 = 2.66 mg.
  expect(judge('0.0030')).toMatchObject({
    outcome: 'holds',
    severity: 'information',
    sentence: 'agree by density',
  });
});

it('fails beyond, also with a density known well or without U', () => {
  expect(judge('0.0060')).toMatchObject({ outcome: 'fails', severity: 'major' });
  const density = { value: '7950', expandedU: null, k: null, origin: 'measured' } as const;
  const found = judge('0.0030', { density });
  expect(found.outcome).toBe('fails');
  expect(found.text).toContain('differ by 1.8\u2009mg from their identity at 7950 kg/m³');
});

it('cannot be judged without a density, and does not apply to one kind alone', () => {
  expect(judge('0.0030', { density: null }).outcome).toBe('cannot be judged');
  expect(judge('0', { otherKind: null }).outcome).toBe('does not apply');
});

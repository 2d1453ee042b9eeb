import { expect, it } from 'vitest';
import { uWithinThirdOfMpe } from './b-29-u-within-third-of-mpe.ts';
import { judgedBy, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

/** E1 at 1 kg: maximum permissible error 0.5 mg (OIML R 111-1:2004, Table 1), a third 0.1666... mg. */
const judge = (expandedU: string | null, changes: Partial<ValueFacts> = {}) =>
  judgedBy(uWithinThirdOfMpe, valueFacts({ class: 'E1', expandedU, ...changes }));

it('holds up to a third, an exact ratio', () => {
  expect(judge('0.00016').outcome).toBe('holds');
  expect(judge('0.000166666666', { reportedUDecimals: 9 }).outcome).toBe('holds');
});

it('fails above it', () => {
  const found = judge('0.00018');
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain('with U 0.18\u2009mg; class E1 needs at most 0.1667 mg');
});

it('cannot be judged where the printed U straddles it, or is not stated', () => {
  expect(judge('0.00017')).toMatchObject({ outcome: 'cannot be judged', sentence: 'rounding' });
  expect(judge('0.00017', { reportedUDecimals: 3 }).outcome).toBe('fails');
  expect(judge(null).outcome).toBe('cannot be judged');
});

it('compares at k = 2', () => {
  expect(judge('0.00024', { k: '3' }).outcome).toBe('holds');
  expect(judge('0.00012', { k: '1' }).outcome).toBe('fails');
});

it('does not apply without class, to mass, or where the class has no limit', () => {
  expect(judge('0.00018', { class: null }).sentence).toBe('no class');
  expect(judge('0.00018', { quantity: 'mass' }).sentence).toBe('mass');
  expect(judge('0.00018', { nominal: '300' }).sentence).toBe('no limit');
});

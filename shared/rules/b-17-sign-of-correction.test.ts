import fc from 'fast-check';
import { expect, it } from 'vitest';
import { signOfCorrection } from './b-17-sign-of-correction.ts';
import { historyFacts, judgedBy, valueFacts } from './example-facts.ts';
import type { HistoryFacts, ValueFacts } from './facts.ts';

/** U is 0.30 mg everywhere; 1.5 U is 0.45 mg. */
const past = (deviation: string, year = 2023, changes: Partial<HistoryFacts> = {}) =>
  historyFacts({ deviation, performedEnd: `${year}-02-02`, certificateNo: `RL-${year}`, ...changes });
const judge = (deviation: string, history: HistoryFacts[], changes: Partial<ValueFacts> = {}) =>
  judgedBy(signOfCorrection, valueFacts({ deviation, history, ...changes }));

it('holds where the sign fits', () => {
  expect(judge('0.0006', [past('0.00052')]).outcome).toBe('holds');
});

it('fails where the history fits only with the other sign, and names the values', () => {
  const found = judge('-0.0006', [past('0.00058')]);
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain(
    'states −600\u2009µg; the other values of MI 0007 (RL-2023) fit it only with the other sign',
  );
});

it('asks about the value that was turned, not about its neighbours', () => {
  const turned = past('-0.0006', 2023);
  expect(judge('0.0006', [past('0.00061', 2021), turned]).outcome).toBe('holds');
  expect(judge('0.0006', [turned, past('0.00058', 2027)]).outcome).toBe('holds');
  expect(judge('-0.0006', [past('0.00061', 2027), past('0.00058', 2029)]).outcome).toBe('fails');
  expect(judge('-0.0006', [past('0.00061', 2027)]).outcome).toBe('holds');
});

it('does not take a real change for a changed sign', () => {
  expect(judge('0.0006', [past('-0.0015')]).outcome).toBe('holds');
  expect(judge('0.0006', [past('0.0019')]).outcome).toBe('holds');
});

it('does not apply without history, nor to a deviation below 1.5 U', () => {
  expect(judge('-0.0006', []).sentence).toBe('first');
  expect(judge('-0.00044', [past('0.00044')]).sentence).toBe('small');
});

it('cannot be judged where U is not stated', () => {
  expect(judge('-0.0006', [past('0.0006')], { expandedU: null }).outcome).toBe('cannot be judged');
  expect(judge('-0.0006', [past('0.0006', 2023, { expandedU: null })])).toMatchObject({
    outcome: 'cannot be judged',
    sentence: 'others without uncertainty',
  });
});

it('never asks about two values of the same sign', () => {
  const size = fc.integer({ min: 0, max: 5000 });
  fc.assert(
    fc.property(size, size, (a, b) => {
      const text = (n: number) => (n / 1e6).toFixed(6);
      expect(judge(text(a), [past(text(b))]).outcome).not.toBe('fails');
    }),
  );
});

it('finds every changed sign of at least 1.5 U whose two values differ from the truth by up to u', () => {
  const truth = fc.integer({ min: 600, max: 3000 });
  const noise = fc.integer({ min: -150, max: 150 });
  fc.assert(
    fc.property(truth, noise, noise, (t, a, b) => {
      const found = judge((-(t + a) / 1e6).toFixed(6), [past(((t + b) / 1e6).toFixed(6))]);
      expect(found.outcome).toBe('fails');
    }),
  );
});

import fc from 'fast-check';
import { expect, it } from 'vitest';
import { nominalInSeries } from './b-02-nominal-in-series.ts';
import { judgedBy, valueFacts, WEIGHT } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

const judge = (nominal: string, changes: Partial<ValueFacts> = {}) =>
  judgedBy(nominalInSeries, valueFacts({ nominal, ...changes }));
const unclassed = { class: null, weight: { ...WEIGHT, classClaimed: null } };

it('holds for 1, 2 and 5 times every power of ten from a milligram to five tonnes', () => {
  fc.assert(
    fc.property(fc.constantFrom('1', '2', '5'), fc.integer({ min: -3, max: 6 }), (factor, power) => {
      expect(judge(`${factor}e${power}`).outcome).toBe('holds');
    }),
  );
});

it('fails for any other nominal value with a class', () => {
  expect(judge('300')).toMatchObject({ outcome: 'fails', severity: 'minor' });
  expect(judge('300').text).toContain('300\u2009g, does not belong to the series 1, 2, 5, and class E2');
  expect(judge('1.5').outcome).toBe('fails');
});

it('cannot be judged without class: it may be special', () => {
  expect(judge('300', unclassed).outcome).toBe('cannot be judged');
  expect(judge('500', unclassed).outcome).toBe('holds');
});

it('does not apply to prototypes, spheres and agreed values', () => {
  expect(judge('300', { weight: { ...WEIGHT, kind: 'silicon sphere' } }).outcome).toBe('does not apply');
});

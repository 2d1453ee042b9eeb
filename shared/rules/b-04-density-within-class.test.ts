import { expect, it } from 'vitest';
import { densityWithinClass } from './b-04-density-within-class.ts';
import { judgedBy, valueFacts, WEIGHT } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

/** E2 from 100 g up: 7810 to 8210 kg/m³; E1: 7934 to 8067 kg/m³ (OIML R 111-1:2004, Table 5, from memory). */
const judge = (value: string, expandedU: string | null, changes: Partial<ValueFacts> = {}) =>
  judgedBy(
    densityWithinClass,
    valueFacts({ density: { value, expandedU, k: expandedU && '2', origin: 'measured' }, ...changes }),
  );

it('holds inside, U included', () => {
  expect(judge('7950', '140').outcome).toBe('holds');
  expect(judge('7815', '5').outcome).toBe('holds');
  expect(judge('7900', null).outcome).toBe('holds');
});

it('fails outside by more than U', () => {
  const found = judge('8400', '50');
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain('8400 kg/m³ with U 50 kg/m³ (measured), lies outside the limits of class E2');
  expect(judge('7700', '50').outcome).toBe('fails');
});

it('cannot be judged where U reaches across, or is missing outside', () => {
  expect(judge('7950', '140', { class: 'E1' })).toMatchObject({ sentence: 'reaches', severity: 'minor' });
  expect(judge('8220', '20')).toMatchObject({ outcome: 'cannot be judged', sentence: 'reaches' });
  expect(judge('8400', null).sentence).toBe('no uncertainty');
  expect(judgedBy(densityWithinClass, valueFacts({ density: null }))).toMatchObject({
    outcome: 'cannot be judged',
    severity: 'information',
  });
});

it('has no upper limit where the table has none', () => {
  expect(judge('11300', '60', { class: 'M1' }).text).toContain('4400 or more');
  expect(judge('4000', '60', { class: 'M1' }).outcome).toBe('fails');
});

it('goes by the class claimed where the certificate states none, and does not apply without any', () => {
  expect(judge('8400', '50', { class: null }).outcome).toBe('fails');
  const unclassed = { class: null, weight: { ...WEIGHT, classClaimed: null } };
  expect(judge('8400', '50', unclassed).sentence).toBe('no class');
  expect(judge('8400', '50', { class: 'M3' }).sentence).toBe('no limit');
});

import { expect, it } from 'vitest';
import { entersResultsFor, opensHoldingsOf } from './holdings.ts';
import type { Person } from './session.ts';

const person = (role: Person['roles'][number]['role'], id: string | null) =>
  ({ roles: [{ role, laboratory: id && { id, code: '', name: '', isNationalInstitute: false } }] }) as Person;

it('opens the weights of a laboratory to its people, its assessor and the registrar', () => {
  expect(opensHoldingsOf(person('reader', 'holder'), 'holder')).toBe(true);
  expect(opensHoldingsOf(person('assessor', 'holder'), 'holder')).toBe(true);
  expect(opensHoldingsOf(person('registrar', null), 'holder')).toBe(true);
  expect(opensHoldingsOf(person('metrologist', 'issuer'), 'holder')).toBe(false);
  expect(opensHoldingsOf(person('comparison pilot', null), 'holder')).toBe(false);
});

it('lets the holder enter results of its weight, and who calibrated it not', () => {
  expect(entersResultsFor(person('metrologist', 'holder'), 'holder')).toBe('holder');
  expect(entersResultsFor(person('registrar', null), 'holder')).toBe('holder');
  expect(entersResultsFor(person('signatory', 'holder'), 'holder')).toBeNull();
  expect(entersResultsFor(person('metrologist', 'issuer'), 'holder')).toBeNull();
  expect(entersResultsFor(person('registrar', null), null)).toBeNull();
});

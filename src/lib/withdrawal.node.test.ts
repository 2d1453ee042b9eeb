import { expect, it } from 'vitest';
import type { Person } from './session.ts';
import { withdrawalOf, withdrawalText } from './withdrawal.ts';

const signatoryOf = (...ids: string[]) =>
  ({
    roles: ids.map((id) => ({
      role: 'signatory',
      laboratory: { id, code: '', name: '', isNationalInstitute: false },
    })),
  }) as Person;

it('lets who signs for the issuer withdraw the certificate, and who entered it the entry', () => {
  expect(withdrawalOf(signatoryOf('issuer'), 'issuer')).toBe('certificate');
  expect(withdrawalOf(signatoryOf('customer'), 'issuer')).toBe('entry');
  expect(withdrawalOf(signatoryOf('customer', 'issuer'), 'issuer')).toBe('certificate');
});

it('names the certificate either way', () => {
  expect(withdrawalText('certificate', 'C-1')).toBe('Withdraw certificate C-1');
  expect(withdrawalText('entry', 'C-1')).toBe('Withdraw the entry of certificate C-1');
});

import { expect, it } from 'vitest';
import { withSigns } from './signs.ts';

it('sets comparisons and differences as type, and leaves hyphens', () => {
  expect(withSigns('OIML R 111-1:2004, 5.3.1: |deviation| <= MPE - U, with U at k = 2')).toBe(
    'OIML R 111-1:2004, 5.3.1: |deviation| ≤ MPE − U, with U at k = 2',
  );
});

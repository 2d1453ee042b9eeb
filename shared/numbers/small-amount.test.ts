import { expect, it } from 'vitest';
import { quantityText } from './quantity-text.ts';
import { belowDigits, twoDigits } from './small-amount.ts';

const style = { decimalMark: '.', uncertainty: 'plus-minus' } as const;

it('gives an amount two significant digits, zero as zero, and nothing where it is below 0.01 µg', () => {
  expect(twoDigits('0.00003')).toBe('0.00003');
  expect(twoDigits('-0.00012345')).toBe('-0.00012');
  expect(twoDigits('0')).toBe('0');
  expect(twoDigits('0.00000001')).toBe('0.00000001');
  expect(twoDigits('-0.0000000099')).toBeNull();
});

it('tells zero from what is below the digits shown', () => {
  const shown = (value: string) =>
    belowDigits(
      value,
      quantityText({ value, expandedUncertainty: '0.00000012', kind: 'deviation', shownIn: 'auto' }, style),
    );
  expect(shown('0.000000002')).toBe('below 0.01\u2009µg');
  expect(shown('-0.000000002')).toBe('below 0.01\u2009µg');
  expect(shown('0')).toBeNull();
  expect(shown('0.00000002')).toBeNull();
});

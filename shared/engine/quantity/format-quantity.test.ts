import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { formatQuantity } from './format-quantity.ts';

describe('formatQuantity', () => {
  it('gives the pieces by the one rounding rule', () => {
    expect(
      formatQuantity({ value: new Decimal('1000.00001234'), unit: 'g', expandedUncertainty: 0.0000015 }),
    ).toEqual({
      sign: '',
      value: '1\u2009000.000\u2009012\u20093',
      uncertainty: '0.000\u2009001\u20095',
      unit: 'g',
      text: '(1\u2009000.000\u2009012\u20093 ± 0.000\u2009001\u20095)\u2009g',
    });
  });

  it('shows the sign of a deviation, in print minus', () => {
    const deviation = (text: string) =>
      formatQuantity({ value: new Decimal(text), unit: 'mg', showPlus: true });
    expect(deviation('0.212').text).toBe('+0.212\u2009mg');
    expect(deviation('-0.212').text).toBe('\u22120.212\u2009mg');
    expect(deviation('0').text).toBe('0\u2009mg');
    expect(formatQuantity({ value: new Decimal('0.212'), unit: 'mg' }).sign).toBe('');
  });

  it('shows the decimals asked for and the decimal comma', () => {
    const parts = formatQuantity({ value: new Decimal('20.1'), unit: 'degC', decimals: 2, decimalMark: ',' });
    expect(parts.text).toBe('20,10\u2009°C');
  });

  it('writes a value that rounds to zero without a sign', () => {
    expect(formatQuantity({ value: new Decimal('-0.0001'), unit: 'mg', decimals: 2 }).text).toBe(
      '0.00\u2009mg',
    );
  });

  it('refuses decimals and units that are none', () => {
    expect(() => formatQuantity({ value: new Decimal(1), unit: 'mg', decimals: -1 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'decimals' }),
    );
    expect(() => formatQuantity({ value: new Decimal(1), unit: 'stone' as 'kg' })).toThrow(
      expect.objectContaining({ code: 'unknown-choice', field: 'unit' }),
    );
  });
});

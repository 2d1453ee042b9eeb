import { describe, expect, it } from 'vitest';
import {
  quantityLine,
  quantityText,
  unitSymbol,
  type NumberStyle,
  type QuantityInput,
} from './quantity-text.ts';

const POINT: NumberStyle = { decimalMark: '.', uncertainty: 'plus-minus' };
const CONCISE: NumberStyle = { decimalMark: '.', uncertainty: 'concise' };

const line = (input: QuantityInput, style = POINT): string =>
  quantityLine(quantityText(input, style))
    .replace(/\u2009/g, '_')
    .replace(/\u2212/g, 'minus');

describe('quantityText', () => {
  it('rounds U to two significant digits and the value to the same place', () => {
    expect(line({ value: '1000.000212437', expandedUncertainty: '0.0000804' })).toBe(
      '1_000.000_212 ± 0.000_080_g',
    );
  });

  it('keeps two digits where rounding carries over', () => {
    expect(line({ value: '1.23456', expandedUncertainty: '0.00996' })).toBe('1.235 ± 0.010_g');
    expect(line({ value: '1.23456', expandedUncertainty: 0.0996 })).toBe('1.23 ± 0.10_g');
  });

  it('rounds the value half to even', () => {
    expect(line({ value: '0.0125', expandedUncertainty: '0.010' })).toBe('0.012 ± 0.010_g');
    expect(line({ value: '0.0135', expandedUncertainty: '0.010' })).toBe('0.014 ± 0.010_g');
  });

  it('splits both numbers at the standard uncertainty', () => {
    const text = quantityText(
      { value: '1000.000212', expandedUncertainty: '0.00008', coverageFactor: '2' },
      POINT,
    );
    expect(text.value.beyond).toBe('12');
    expect(text.uncertainty?.beyond).toBe('80');
  });

  it('takes k from the certificate: a larger k leaves more digits known', () => {
    const known = (k: string): string =>
      quantityText({ value: '1.0000', expandedUncertainty: '0.0011', coverageFactor: k }, POINT).value.known;
    expect(known('1')).toBe('1.00');
    expect(known('2')).toBe('1.000\u2009');
  });

  it('shows a deviation with its sign, in the unit in which it reads best', () => {
    const shownIn = 'auto' as const;
    expect(line({ value: '0.000212', expandedUncertainty: '0.00008', kind: 'deviation', shownIn })).toBe(
      '+212 ± 80_µg',
    );
    expect(line({ value: '-0.0000142', expandedUncertainty: '0.0000022', kind: 'deviation', shownIn })).toBe(
      'minus14.2 ± 2.2_µg',
    );
    expect(line({ value: '0.001217', expandedUncertainty: '0.000022', kind: 'deviation', shownIn })).toBe(
      '+1.217 ± 0.022_mg',
    );
  });

  it('rounds left of the decimal sign where U is large', () => {
    expect(line({ value: '12345', expandedUncertainty: '1234', unit: 'kg' })).toBe('12_300 ± 1_200_kg');
  });

  it('writes the standard uncertainty in brackets, in the last places (JCGM 100:2008, 7.2.2)', () => {
    expect(
      line({ value: '1000.0000123', expandedUncertainty: '0.000003', coverageFactor: '2' }, CONCISE),
    ).toBe('1_000.000_012_3(15)_g');
    expect(line({ value: '12.34', expandedUncertainty: '3', coverageFactor: '2' }, CONCISE)).toBe(
      '12.3(15)_g',
    );
    expect(line({ value: '1234', expandedUncertainty: '240', coverageFactor: '2' }, CONCISE)).toBe(
      '1_230(120)_g',
    );
  });

  it('gives the published example of JCGM 100:2008, 7.2.2: 100.021 47(35) g', () => {
    expect(line({ value: '100.02147', expandedUncertainty: '0.00035', coverageFactor: '1' }, CONCISE)).toBe(
      '100.021_47(35)_g',
    );
  });

  it('takes the decimal sign of the reader', () => {
    expect(line({ value: '1.5', expandedUncertainty: '0.1' }, { ...POINT, decimalMark: ',' })).toBe(
      '1,50 ± 0,10_g',
    );
  });

  it('shows every digit where nothing is known about the uncertainty', () => {
    expect(line({ value: '0.0032', unit: '' })).toBe('0.003_2');
    expect(line({ value: '7998.6', unit: 'kg/m3' })).toBe('7_998.6_kg/m³');
    expect(line({ value: '20.13', unit: 'degC', decimals: 1 })).toBe('20.1_°C');
  });

  it('draws a U on its own by the same rule', () => {
    const text = quantityText({ value: '0.0000312', coverageFactor: '2', kind: 'uncertainty' }, CONCISE);
    expect(quantityLine(text).replace(/\u2009/g, '_')).toBe('0.000_031_g');
    expect(text.value.beyond).toBe('31');
  });

  it('shares one power of ten between value and U', () => {
    expect(
      line({ value: '0.00001234', expandedUncertainty: '0.00000012', unit: '', isScientific: true }),
    ).toBe('(1.234 ± 0.012) × 10⁻⁵');
  });
});

describe('unitSymbol', () => {
  it('knows the units of the wire and sets exponents written with a caret', () => {
    expect(unitSymbol('ug')).toBe('\u00b5g');
    expect(unitSymbol('m^-3')).toBe('m⁻³');
    expect(unitSymbol('ppm')).toBe('ppm');
  });
});

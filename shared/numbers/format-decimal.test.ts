import { describe, expect, it } from 'vitest';
import {
  convertText,
  deviationUnit,
  formatDecimal,
  groupDigits,
  splitAtUncertainty,
  withSign,
} from './format-decimal.ts';

/** Makes the thin space and the minus sign proper visible in an expectation. */
const seen = (text: string): string => text.replace(/\u2009/g, '_').replace(/\u2212/g, 'minus');

describe('groupDigits', () => {
  it.each([
    ['1000.0000123', '1_000.000_012_3'],
    ['7998.6', '7_998.6'],
    ['125.0219', '125.021_9'],
    ['0.0032', '0.003_2'],
    ['-14.2', 'minus14.2'],
    ['+212', '+212'],
    ['50000000', '50_000_000'],
  ])('sets %s as %s', (plain, expected) => {
    expect(seen(groupDigits(plain))).toBe(expected);
  });

  it('takes the decimal sign of the reader', () => {
    expect(seen(groupDigits('1000.0002', ','))).toBe('1_000,000_2');
  });

  it('leaves what is no plain decimal as it is', () => {
    expect(groupDigits('1e-7')).toBe('1e-7');
  });
});

describe('withSign', () => {
  it('gives a deviation its plus and zero no sign', () => {
    expect(withSign('0.2', true)).toBe('+0.2');
    expect(withSign('0.2', false)).toBe('0.2');
    expect(withSign('-0.2', true)).toBe('-0.2');
    expect(withSign('-0.000', true)).toBe('0.000');
  });
});

describe('formatDecimal', () => {
  it('keeps every digit of the wire', () => {
    expect(seen(formatDecimal('-0.000000000000000001'))).toBe('minus0.000_000_000_000_000_001');
  });

  it('rounds half to even where decimals are asked for', () => {
    expect(formatDecimal('0.125', { decimals: 2 })).toBe('0.12');
    expect(formatDecimal('0.375', { decimals: 2 })).toBe('0.38');
  });
});

describe('splitAtUncertainty', () => {
  it.each([
    ['1000.000212', 0.00004, '1_000.000_2', '12'],
    ['0.000080', 0.00004, '0.000_0', '80'],
    ['1.19062', 0.000095, '1.190_6', '2'],
    ['7998.6', 0.4, '7_998.', '6'],
    ['+212', 40, '+2', '12'],
    ['-41', 22, 'minus', '41'],
    ['1234567', 12000, '1_2', '34_567'],
    ['12.345', 1e-9, '12.345', ''],
    ['12.345', 0, '12.345', ''],
  ])('splits %s at u = %s', (plain, standard, known, beyond) => {
    const parts = splitAtUncertainty(plain, standard);
    expect([seen(parts.known), seen(parts.beyond)]).toEqual([known, beyond]);
  });

  it('counts a digit as known only while one unit of its place is larger than u', () => {
    expect(splitAtUncertainty('1.234', 0.01).known).toBe('1.2');
    expect(splitAtUncertainty('1.234', 0.0099).known).toBe('1.23');
  });
});

describe('deviationUnit', () => {
  it.each([
    ['0.000212', '0.00008', 'ug'],
    ['0.001217', '0.000022', 'mg'],
    ['0.00001', '0.002', 'mg'],
    ['-1.5', null, 'g'],
    ['-0.0009999', undefined, 'ug'],
    ['0', null, 'ug'],
  ])('reads %s ± %s in %s', (deviation, uncertainty, unit) => {
    expect(deviationUnit(deviation, uncertainty)).toBe(unit);
  });
});

describe('convertText', () => {
  it('shifts the decimal sign and nothing else', () => {
    expect(convertText('0.000000000001', 'g', 'ug')).toBe('0.000001');
    expect(convertText('-123.456', 'mg', 'kg')).toBe('-0.000123456');
  });
});

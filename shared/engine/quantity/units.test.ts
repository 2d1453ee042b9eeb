import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { convertDecimals, convertUnit, UNIT_DEFINITIONS, UNITS, unitOfText } from './units.ts';

describe('convertUnit', () => {
  it('moves only the decimal sign', () => {
    expect(convertUnit(new Decimal('1.0000000123'), 'kg', 'ug').toFixed()).toBe('1000000012.3');
    expect(convertUnit(new Decimal('-212'), 'ug', 'mg').toFixed()).toBe('-0.212');
    expect(convertUnit(new Decimal('1013.25'), 'hPa', 'Pa').toFixed()).toBe('101325');
  });

  it('refuses another dimension and says which two', () => {
    expect(() => convertUnit(new Decimal(1), 'kg', 'cm3')).toThrow(
      expect.objectContaining({ code: 'unit-mismatch', message: expect.stringContaining('volume') }),
    );
  });

  it('refuses a unit it does not know and a value that is none', () => {
    expect(() => convertUnit(new Decimal(1), 'lb' as 'kg', 'g')).toThrow(
      expect.objectContaining({ code: 'unknown-choice', field: 'from' }),
    );
    expect(() => convertUnit(new Decimal(NaN), 'kg', 'g')).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'value' }),
    );
  });

  it('comes back to the same digits', () => {
    const mass = fc.constantFrom('kg' as const, 'g' as const, 'mg' as const, 'ug' as const);
    fc.assert(
      fc.property(fc.bigInt({ min: -(10n ** 30n), max: 10n ** 30n }), mass, mass, (digits, from, to) => {
        const value = new Decimal(digits.toString()).times('1e-15');
        expect(convertUnit(convertUnit(value, from, to), to, from).eq(value)).toBe(true);
      }),
    );
  });
});

describe('convertDecimals', () => {
  it('follows the decimal sign and stops at none', () => {
    expect(convertDecimals(3, 'mg', 'ug')).toBe(0);
    expect(convertDecimals(3, 'mg', 'g')).toBe(6);
    expect(convertDecimals(1, 'mg', 'ug')).toBe(0);
  });
});

describe('unitOfText', () => {
  it('knows every code and every symbol', () => {
    for (const unit of UNITS) {
      expect(unitOfText(unit)).toBe(unit);
      expect(unitOfText(UNIT_DEFINITIONS[unit].symbol)).toBe(unit);
    }
  });

  it('reads micro in its three forms', () => {
    expect(['\u00b5g', '\u03bcg', 'ug'].map(unitOfText)).toEqual(['ug', 'ug', 'ug']);
  });

  it('does not guess at letters in the wrong case', () => {
    expect(['Mg', 'MG', 'KG', 'Kg'].map(unitOfText)).toEqual([null, null, null, null]);
  });
});

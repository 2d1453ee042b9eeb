import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { EngineError } from '../errors.ts';
import { formatQuantity } from './format-quantity.ts';
import { parseQuantity, type ParseOptions } from './parse-quantity.ts';

/** What was read, in plain text, so that one line shows everything. */
function read(text: string, options: Partial<ParseOptions> = {}): string {
  const parsed = parseQuantity(text, { field: 'deviation', ...options });
  const own = `${parsed.value.toFixed(parsed.decimals)} ${parsed.unit ?? '-'}`;
  const uncertainty = parsed.uncertainty;
  if (uncertainty === null) return own;
  return `${own} | ${uncertainty.value.toFixed(uncertainty.decimals)} ${uncertainty.unit ?? '-'} ${uncertainty.form}`;
}

function codeOf(text: string, options: Partial<ParseOptions> = {}): string {
  try {
    return `read as ${read(text, options)}`;
  } catch (error) {
    expect(error).toBeInstanceOf(EngineError);
    expect((error as EngineError).field).toBe('deviation');
    return (error as EngineError).code;
  }
}

describe('parseQuantity reads', () => {
  it.each([
    ['0.212', '0.212 -'],
    ['0,212 mg', '0.212 mg'],
    ['.5 mg', '0.5 mg'],
    ['1000', '1000 -'],
    ['1 000.000 012 30 g', '1000.00001230 g'],
    ['+ 0.30 mg', '0.30 mg'],
    ['-0.30mg', '-0.30 mg'],
    ['\u22120.30 mg', '-0.30 mg'],
    ['1\u2009000.000\u2009012\u20093 g', '1000.0000123 g'],
    ['1\u202f000,000\u202f012\u202f3\u202fg', '1000.0000123 g'],
    ['1\u00a0000 kg', '1000 kg'],
    ['12.5 \u00b5g', '12.5 ug'],
    ['12.5 \u03bcg', '12.5 ug'],
    ['12.5 ug', '12.5 ug'],
    ['7950 kg/m\u00b3', '7950 kg/m3'],
    ['20.1 \u00b0C', '20.1 degC'],
    ['50 %', '50 %'],
    ['1,234 567 g', '1.234567 g'],
    ['1000,123 g', '1000.123 g'],
  ])('%s', (text, expected) => {
    expect(read(text)).toBe(expected);
  });

  it.each([
    ['1 000.000 012 3(15) g', '1000.0000123 g | 0.0000015 g brackets'],
    ['100,021 47(35) g', '100.02147 g | 0.00035 g brackets'],
    ['100.02147(0.00035) g', '100.02147 g | 0.00035 g brackets'],
    ['12(3) mg', '12 mg | 3 mg brackets'],
    ['(100.021 47 ± 0.000 79) g', '100.02147 g | 0.00079 g plus-minus'],
    ['100.021 47 g ± 0.79 mg', '100.02147 g | 0.79 mg plus-minus'],
    ['-0.3 +/- 0.1 mg', '-0.3 mg | 0.1 mg plus-minus'],
    ['7950 ± 140', '7950 - | 140 - plus-minus'],
  ])('%s', (text, expected) => {
    expect(read(text)).toBe(expected);
  });

  it('takes the default unit only where none is written', () => {
    expect(read('0.5', { defaultUnit: 'mg' })).toBe('0.5 mg');
    expect(read('0.5 g', { defaultUnit: 'mg' })).toBe('0.5 g');
    expect(read('0.5 ± 0.1', { defaultUnit: 'mg' })).toBe('0.5 mg | 0.1 mg plus-minus');
  });

  it('settles a comma by the other number, or by what the field declares', () => {
    expect(read('1,234 ± 0,015 mg')).toBe('1.234 mg | 0.015 mg plus-minus');
    expect(read('1,234', { decimalMark: ',' })).toBe('1.234 -');
    expect(read('1,234(0,015) mg')).toBe('1.234 mg | 0.015 mg brackets');
  });
});

describe('parseQuantity refuses', () => {
  it.each([
    ['', 'empty'],
    ['  ', 'empty'],
    ['abc', 'not-a-number'],
    ['5.', 'not-a-number'],
    ['--5', 'not-a-number'],
    ['1,234.5', 'mixed-separators'],
    ['1.234,5', 'mixed-separators'],
    ['1,234', 'ambiguous-comma'],
    ['1,234(15) g', 'ambiguous-comma'],
    ['1,234,567', 'repeated-separator'],
    ['1.234.567', 'repeated-separator'],
    ['1 00.5', 'irregular-grouping'],
    ['1000 000', 'irregular-grouping'],
    ['0.000 01 2', 'irregular-grouping'],
    ['1  000', 'irregular-grouping'],
    ['1.5e-3', 'unknown-unit'],
    ['5 Mg', 'unknown-unit'],
    ['5 lb', 'unknown-unit'],
    ['100 g ± 0.5', 'missing-unit'],
    ['(100 g ± 0.5) g', 'repeated-unit'],
    ['(100 g) g', 'repeated-unit'],
    ['100 g ± 5 %', 'unit-mismatch'],
    ['100(x) g', 'unreadable-brackets'],
    ['100.0(12345) g', 'unreadable-brackets'],
    ['100.0() g', 'unreadable-brackets'],
    ['100 ± -0.5 g', 'unreadable-uncertainty'],
    ['100 ± 0.5 ± 0.5 g', 'unreadable-uncertainty'],
    ['100(3) ± 0.5 g', 'repeated-uncertainty'],
    ['100,5 ± 0.5 g', 'mixed-separators'],
    ['1'.repeat(41), 'too-many-digits'],
    ['1'.repeat(200), 'too-long'],
  ])('%s', (text, code) => {
    expect(codeOf(text)).toBe(code);
  });

  it('a unit that the field does not take, with those it takes', () => {
    expect(() => parseQuantity('5 kg', { field: 'deviation', units: ['mg', 'ug'] })).toThrow('mg, µg');
  });

  it('the other decimal sign where the field declares one', () => {
    expect(codeOf('1,5', { decimalMark: '.' })).toBe('mixed-separators');
    expect(codeOf('1.5', { decimalMark: ',' })).toBe('mixed-separators');
  });

  it('with the text received and the way out', () => {
    expect(() => parseQuantity('1,234', { field: 'deviation' })).toThrow(
      'deviation: received "1,234". It can be read in two ways. Write 1.234 for the decimal or 1 234 for the thousands.',
    );
  });
});

describe('formatQuantity then parseQuantity', () => {
  it('gives back the digits printed', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: -(10n ** 15n), max: 10n ** 15n }),
        fc.double({ min: 1e-8, max: 1e-2, noNaN: true }),
        fc.constantFrom('.' as const, ',' as const),
        (digits, expandedUncertainty, decimalMark) => {
          const value = new Decimal(digits.toString()).times('1e-10');
          const printed = formatQuantity({
            value,
            unit: 'g',
            expandedUncertainty,
            decimalMark,
            showPlus: true,
          });
          const parsed = parseQuantity(printed.text, { field: 'mass', decimalMark });
          expect(parsed.unit).toBe('g');
          const again = formatQuantity({
            value: parsed.value,
            unit: 'g',
            expandedUncertainty: parsed.uncertainty?.value.toNumber(),
            decimalMark,
            showPlus: true,
          });
          expect(again).toEqual(printed);
        },
      ),
    );
  });
});

describe('parseQuantity: length', () => {
  it('takes 160 characters and shortens a longer text in its message', () => {
    const spaced = (length: number) => `${' '.repeat(length - 3)}1 g`;
    expect(parseQuantity(spaced(160), { field: 'value' }).value.toFixed()).toBe('1');
    expect(() => parseQuantity('x'.repeat(160), { field: 'value' })).toThrow(`"${'x'.repeat(160)}"`);
    expect(() => parseQuantity(spaced(161), { field: 'value' })).toThrow(
      expect.objectContaining({ code: 'too-long', field: 'value' }),
    );
  });
});

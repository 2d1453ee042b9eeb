import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { roundResult } from './round-result.ts';

const round = (value: string, expandedUncertainty: number, rounding?: 'half-even' | 'up') =>
  roundResult({ value: new Decimal(value), expandedUncertainty, rounding });

describe('roundResult', () => {
  it('GUM-7.2.4: writes (100.02147 ± 0.00079) g', () => {
    // JCGM 100:2008, 7.2.4: read in the document. U = 2.26 x 0.35 mg.
    expect(round('100.02147', 2.26 * 0.35e-3)).toEqual({
      value: '100.02147',
      expandedUncertainty: '0.00079',
    });
  });

  it('rounds a tie to the even digit, in uncertainty and value', () => {
    expect(round('1.0005', 0.125)).toEqual({ value: '1.00', expandedUncertainty: '0.12' });
    expect(round('1.015', 0.135)).toEqual({ value: '1.02', expandedUncertainty: '0.14' });
    expect(round('1.025', 0.145)).toEqual({ value: '1.02', expandedUncertainty: '0.14' });
  });

  it('rounds the uncertainty up where asked, and the value never', () => {
    expect(round('1.0249', 0.121, 'up')).toEqual({ value: '1.02', expandedUncertainty: '0.13' });
  });

  it('takes the noise of a double for what it is', () => {
    expect(round('0', 0.12000000000000001, 'up').expandedUncertainty).toBe('0.12');
    expect(round('0', 0.14500000000000002).expandedUncertainty).toBe('0.14');
  });

  it('keeps two digits where rounding carries into a new one', () => {
    expect(round('12.34567', 0.0996)).toEqual({ value: '12.35', expandedUncertainty: '0.10' });
    expect(round('12.34567', 0.0991, 'up')).toEqual({ value: '12.35', expandedUncertainty: '0.10' });
  });

  it('rounds before the decimal sign where the uncertainty is that large', () => {
    expect(round('1000149', 1249)).toEqual({ value: '1000100', expandedUncertainty: '1200' });
    expect(round('149.6', 12.4)).toEqual({ value: '150', expandedUncertainty: '12' });
  });

  it('writes zero without a sign', () => {
    expect(round('-0.0004', 0.12).value).toBe('0.00');
    expect(round('-0.12', 0.12).value).toBe('-0.12');
  });

  it('leaves a value that is exact by definition as it is', () => {
    expect(round('1000.00', 0)).toEqual({ value: '1000', expandedUncertainty: '0' });
    expect(round('-0.250', 0)).toEqual({ value: '-0.25', expandedUncertainty: '0' });
  });

  it('loses no digit of a kilogram written to the nanogram', () => {
    expect(round('1000.000000012345678', 1.2e-14).value).toBe('1000.000000012345678');
  });

  it('refuses an uncertainty below zero, no number, and an unknown rounding', () => {
    expect(() => round('1', -1)).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'expandedUncertainty' }),
    );
    expect(() => round('1', NaN)).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'expandedUncertainty' }),
    );
    expect(() => round('1', 1, 'down' as 'up')).toThrow(
      expect.objectContaining({ code: 'unknown-choice', field: 'rounding' }),
    );
    expect(() => roundResult({ value: new Decimal(Infinity), expandedUncertainty: 1 })).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'value' }),
    );
  });

  const value = fc
    .tuple(fc.bigInt({ min: -(10n ** 18n), max: 10n ** 18n }), fc.integer({ min: 0, max: 15 }))
    .map(([digits, places]) => new Decimal(digits.toString()).times(new Decimal(10).pow(-places)));
  const uncertainty = fc
    .tuple(fc.double({ min: 1, max: 9.9999999, noNaN: true }), fc.integer({ min: -9, max: 6 }))
    .map(([mantissa, exponent]) => mantissa * 10 ** exponent);

  it('changes nothing when it is applied twice', () => {
    fc.assert(
      fc.property(
        value,
        uncertainty,
        fc.constantFrom('half-even' as const, 'up' as const),
        (x, u, rounding) => {
          const once = roundResult({ value: x, expandedUncertainty: u, rounding });
          const again = roundResult({
            value: new Decimal(once.value),
            expandedUncertainty: Number(once.expandedUncertainty),
            rounding,
          });
          expect(again).toEqual(once);
        },
      ),
    );
  });

  it('moves neither number by more than its last place allows', () => {
    fc.assert(
      fc.property(value, uncertainty, (x, u) => {
        const rounded = roundResult({ value: x, expandedUncertainty: u });
        expect(Math.abs(Number(rounded.expandedUncertainty) / u - 1)).toBeLessThanOrEqual(0.05 + 1e-12);
        expect(new Decimal(rounded.value).minus(x).abs().lte(new Decimal(u).times('0.0501'))).toBe(true);
      }),
    );
  });

  it('never rounds down where rounding up is asked for', () => {
    fc.assert(
      fc.property(uncertainty, (u) => {
        const { expandedUncertainty } = roundResult({
          value: new Decimal(0),
          expandedUncertainty: u,
          rounding: 'up',
        });
        expect(Number(expandedUncertainty)).toBeGreaterThanOrEqual(u * (1 - 1e-13));
      }),
    );
  });
});

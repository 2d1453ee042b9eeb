import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { densityLimits, densityLimitsByRule } from './density-limits.ts';
import { polarizationLimit, susceptibilityLimit } from './magnetic-limits.ts';
import { maximumPermissibleError } from './maximum-permissible-error.ts';
import { DENSITY_SOURCE, DENSITY_TABLE, WEIGHT_CLASSES, type WeightClass } from './r111-2004.ts';

const density = (weightClass: WeightClass, nominal: string) =>
  densityLimits(weightClass, new Decimal(nominal));

describe('densityLimits', () => {
  it('R111-T5: gives the table, which is from memory and says so', () => {
    // OIML R 111-1:2004, 10, Table 5, from memory.
    expect(DENSITY_SOURCE.evidence).toBe('memory');
    expect(density('E1', '1000')).toEqual([7934, 8067]);
    expect(density('E1', '100')).toEqual([7934, 8067]);
    expect(density('F2', '10')).toEqual([4000, null]);
    expect(density('E2', '0.2')).toEqual([3000, null]);
  });

  it('has no limit where the table has none', () => {
    expect(density('M3', '1000')).toBeNull();
    expect(density('M2-3', '50000')).toBeNull();
    expect(density('E1', '0.001')).toBeNull();
    expect(density('E1', '30')).toBeNull();
  });

  it('refuses a class or a nominal that is none', () => {
    expect(() => density('X' as 'E1', '1')).toThrow(expect.objectContaining({ field: 'class' }));
    expect(() => density('E1', '-1')).toThrow(expect.objectContaining({ code: 'out-of-range' }));
  });

  /** Rows the rule does not reproduce to the digits remembered: 5 g throughout, M1 at 10 g and F2 at 2 g. */
  const offRule = (row: string, weightClass: string) =>
    row === '5' || (row === '10' && weightClass === 'M1') || (row === '2' && weightClass === 'F2');

  it('R111-T5: agrees with the rule of clause 10.1 to its 2 or 3 digits, known exceptions apart', () => {
    for (const [row, cells] of Object.entries(DENSITY_TABLE)) {
      for (const [name, [lower, upper]] of Object.entries(cells)) {
        if (offRule(row, name)) continue;
        // The row from 100 g up is held where the relative MPE is smallest: 20 kg, or 50 kg for M1-2.
        const largest = name === 'M1-2' ? '50000' : '20000';
        const nominal = new Decimal(row === '100' ? largest : row);
        const mpe = maximumPermissibleError(name as WeightClass, nominal) ?? new Decimal(NaN);
        const [byRule, upperByRule] = densityLimitsByRule(mpe, nominal);
        expect(lower / byRule, `${name} ${row} g, lower`).toBeGreaterThan(0.99);
        expect(lower / byRule, `${name} ${row} g, lower`).toBeLessThan(1.03);
        // No solid reaches 30 000 kg/m3, so the table leaves such an upper limit out.
        if (upper === null) expect(upperByRule ?? Infinity).toBeGreaterThan(30_000);
        else expect(Math.abs(upper / (upperByRule ?? NaN) - 1), `${name} ${row} g, upper`).toBeLessThan(0.02);
      }
    }
  });
});

describe('densityLimitsByRule', () => {
  it.each([
    // Rule recomputed beside R111-T5, kg/m3.
    ['E1', '0.5', '1000', 7934, 8067],
    ['E2', '1.5', '1000', 7805, 8205],
    ['F2', '15', '1000', 6400, 10667],
  ])('%s: MPE %s mg at %s g', (_class, mpe, nominal, lower, upper) => {
    const limits = densityLimitsByRule(new Decimal(mpe), new Decimal(nominal));
    expect(limits[0]).toBeCloseTo(lower, -0.5);
    expect(limits[1]).toBeCloseTo(upper, -0.5);
  });

  it('moves the result by exactly a quarter of the MPE at either limit', () => {
    const [lower, upper] = densityLimitsByRule(new Decimal('0.5'), new Decimal(1000));
    // 10 % of 1.2 kg/m3 over the difference of the inverse densities, times 1 kg, in mg.
    expect(0.12 * (1 / lower - 1 / 8000) * 1e6).toBeCloseTo(0.125, 9);
    expect(0.12 * (1 / 8000 - 1 / (upper ?? NaN)) * 1e6).toBeCloseTo(0.125, 9);
  });

  it('has no upper limit once the limit is wide', () => {
    expect(densityLimitsByRule(new Decimal(100), new Decimal(1000))[1]).toBeNull();
    expect(() => densityLimitsByRule(new Decimal(0), new Decimal(1))).toThrow(
      expect.objectContaining({ field: 'mpe' }),
    );
  });
});

describe('magnetic limits', () => {
  it('R111-T3: polarization in microtesla', () => {
    // OIML R 111-1:2004, 9.1, Table 3, read in a reproduction. Exact.
    expect(WEIGHT_CLASSES.map(polarizationLimit)).toEqual([2.5, 8, 25, 80, 250, 500, 800, 1600, 2500]);
    expect(() => polarizationLimit('X' as 'E1')).toThrow(expect.objectContaining({ field: 'class' }));
  });

  it.each([
    // R111-T4. OIML R 111-1:2004, 9.1, Table 4, read in a reproduction. Exact.
    ['0.001', [0.25, 0.9, 10, null, null]],
    ['1', [0.25, 0.9, 10, null, null]],
    ['2', [0.06, 0.18, 0.7, 4, null]],
    ['10', [0.06, 0.18, 0.7, 4, null]],
    ['20', [0.02, 0.07, 0.2, 0.8, null]],
    ['50000', [0.02, 0.07, 0.2, 0.8, null]],
  ])('R111-T4: susceptibility at %s g', (nominal, expected) => {
    const classes: WeightClass[] = ['E1', 'E2', 'F1', 'F2', 'M1'];
    expect(classes.map((one) => susceptibilityLimit(one, new Decimal(nominal)))).toEqual(expected);
  });

  it('refuses a class or a nominal that is none', () => {
    expect(() => susceptibilityLimit('X' as 'E1', new Decimal(1))).toThrow(
      expect.objectContaining({ field: 'class' }),
    );
    expect(() => susceptibilityLimit('E1', new Decimal(0))).toThrow(
      expect.objectContaining({ field: 'nominal' }),
    );
  });
});

import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { maximumPermissibleError } from './maximum-permissible-error.ts';
import { MPE_TABLE, WEIGHT_CLASSES, type WeightClass } from './r111-2004.ts';

/**
 * R111-T1. OIML R 111-1:2004, 5.1, Table 1, read in a reproduction: nominal in g, then the maximum permissible
 * errors in mg of E1, E2, F1, F2, M1, M1-2, M2, M2-3 and M3; a dash where the class is not defined. Exact.
 */
const TABLE = `
   5000000       -       -   25000   80000  250000  500000  800000 1600000 2500000
   2000000       -       -   10000   30000  100000  200000  300000  600000 1000000
   1000000       -    1600    5000   16000   50000  100000  160000  300000  500000
    500000       -     800    2500    8000   25000   50000   80000  160000  250000
    200000       -     300    1000    3000   10000   20000   30000   60000  100000
    100000       -     160     500    1600    5000   10000   16000   30000   50000
     50000      25      80     250     800    2500    5000    8000   16000   25000
     20000      10      30     100     300    1000       -    3000       -   10000
     10000     5.0      16      50     160     500       -    1600       -    5000
      5000     2.5     8.0      25      80     250       -     800       -    2500
      2000     1.0     3.0      10      30     100       -     300       -    1000
      1000     0.5     1.6     5.0      16      50       -     160       -     500
       500    0.25     0.8     2.5     8.0      25       -      80       -     250
       200    0.10     0.3     1.0     3.0      10       -      30       -     100
       100    0.05    0.16     0.5     1.6     5.0       -      16       -      50
        50    0.03    0.10     0.3     1.0     3.0       -      10       -      30
        20   0.025    0.08    0.25     0.8     2.5       -     8.0       -      25
        10   0.020    0.06    0.20     0.6     2.0       -     6.0       -      20
         5   0.016    0.05    0.16     0.5     1.6       -     5.0       -      16
         2   0.012    0.04    0.12     0.4     1.2       -     4.0       -      12
         1   0.010    0.03    0.10     0.3     1.0       -     3.0       -      10
       0.5   0.008   0.025    0.08    0.25     0.8       -     2.5       -       -
       0.2   0.006   0.020    0.06    0.20     0.6       -     2.0       -       -
       0.1   0.005   0.016    0.05    0.16     0.5       -     1.6       -       -
      0.05   0.004   0.012    0.04    0.12     0.4       -       -       -       -
      0.02   0.003   0.010    0.03    0.10     0.3       -       -       -       -
      0.01   0.003   0.008   0.025    0.08    0.25       -       -       -       -
     0.005   0.003   0.006   0.020    0.06    0.20       -       -       -       -
     0.002   0.003   0.006   0.020    0.06    0.20       -       -       -       -
     0.001   0.003   0.006   0.020    0.06    0.20       -       -       -       -
`;

const rows = TABLE.trim()
  .split('\n')
  .map((line) => line.trim().split(/ +/));

const mpe = (weightClass: WeightClass, nominal: string) =>
  maximumPermissibleError(weightClass, new Decimal(nominal))?.toFixed() ?? null;

describe('maximumPermissibleError', () => {
  it.each(rows)('R111-T1: row of %s g', (nominal, ...cells) => {
    WEIGHT_CLASSES.forEach((weightClass, i) => {
      const printed = cells[i] ?? '';
      const expected = printed === '-' ? null : new Decimal(printed).toFixed();
      expect(mpe(weightClass, nominal ?? '')).toBe(expected);
    });
  });

  it('R111-T1: has 30 rows and 201 cells', () => {
    expect(Object.keys(MPE_TABLE)).toHaveLength(30);
    expect(Object.values(MPE_TABLE).flatMap((row) => Object.keys(row))).toHaveLength(201);
  });

  it('J106-5.3-ex3: 1 kg of E1 has 500 ug, an independent anchor', () => {
    // JCGM 106:2012, 5.3, EXAMPLE 3, read in the document: [0.999 999 5, 1.000 000 5] kg. Exact.
    const limit = maximumPermissibleError('E1', new Decimal(1000))?.div('1e6') ?? new Decimal(NaN);
    expect(new Decimal(1).minus(limit).toFixed()).toBe('0.9999995');
    expect(new Decimal(1).plus(limit).toFixed()).toBe('1.0000005');
  });

  it('does not matter how the nominal is written', () => {
    expect(mpe('F1', '0.100')).toBe('0.05');
    expect(mpe('F1', '1e3')).toBe('5');
  });

  it('is null beside the 1, 2, 5 series', () => {
    expect(mpe('F1', '3000')).toBeNull();
    expect(mpe('E1', '100000')).toBeNull();
  });

  it('rises from class to class and with the nominal value', () => {
    for (const row of Object.values(MPE_TABLE)) {
      const limits = WEIGHT_CLASSES.flatMap((weightClass) => Number(row[weightClass] ?? []));
      const defined = limits.filter((limit) => limit > 0);
      expect([...defined].sort((a, b) => a - b)).toEqual(defined);
    }
    for (const weightClass of WEIGHT_CLASSES) {
      const limits = Object.entries(MPE_TABLE)
        .sort(([a], [b]) => Number(a) - Number(b))
        .flatMap(([, row]) => row[weightClass] ?? [])
        .map(Number);
      expect([...limits].sort((a, b) => a - b)).toEqual(limits);
    }
  });

  it('refuses a class or a nominal that is none', () => {
    expect(() => mpe('E3' as 'E1', '1000')).toThrow(
      expect.objectContaining({ code: 'unknown-choice', field: 'class' }),
    );
    expect(() => mpe('E1', '0')).toThrow(expect.objectContaining({ code: 'out-of-range', field: 'nominal' }));
    expect(() => mpe('E1', 'NaN')).toThrow(expect.objectContaining({ code: 'not-finite', field: 'nominal' }));
  });
});

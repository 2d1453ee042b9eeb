import { describe, expect, it } from 'vitest';
import { CoverageFactor, CoverageProbability, Day, Deviation, ExpandedU, Nominal } from './common.ts';

describe('texts that become numbers of the register', () => {
  it.each([
    [
      'Nominal',
      Nominal,
      ['0.001', '1000', '50000000', '0.000000000001'],
      ['0', '-1', '50000000.1', '0.0000000000001'],
    ],
    [
      'Deviation',
      Deviation,
      ['0', '-0.000212', '99999999'],
      ['100000000', '0.0000000000001', '1e-3', '0,5', ''],
    ],
    ['ExpandedU', ExpandedU, ['0.0005'], ['0', '-0.1', '0.0000000000001']],
    ['CoverageFactor', CoverageFactor, ['1', '2', '2.0000', '2.1315', '20'], ['0.99', '20.1', '2.00001']],
    ['CoverageProbability', CoverageProbability, ['0.95', '0.95450'], ['0.5', '1', '95', '0.954500001']],
  ])('%s takes what the column can keep digit for digit, and nothing else', (_name, schema, good, bad) => {
    expect(good.filter((text) => !schema.safeParse(text).success)).toEqual([]);
    expect(bad.filter((text) => schema.safeParse(text).success)).toEqual([]);
  });

  it('refuses a JSON number, which has already lost digits', () => {
    expect(Deviation.safeParse(0.1).success).toBe(false);
  });

  it('knows the calendar', () => {
    expect(Day.safeParse('2024-02-29').success).toBe(true);
    expect(Day.safeParse('2025-02-29').success).toBe(false);
  });
});

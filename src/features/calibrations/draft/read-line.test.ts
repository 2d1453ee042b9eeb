import { describe, expect, it } from 'vitest';
import { DraftLine } from '#shared/contracts/drafts.ts';
import type { KnownStandard } from './known.ts';
import { readLine } from './read-line.ts';

const KILOGRAM: KnownStandard = {
  id: '0190f0aa-1111-7abc-8000-000000000001',
  registryNo: 'TV 0112',
  marking: '1 kg',
  nominal: '1000',
  class: 'E2',
  lastValue: { deviation: '0.0003', expandedU: '0.0004', performedEnd: '2023-05-04' },
};
const line = (changes: Partial<DraftLine>) => DraftLine.parse({ key: 'a', ...changes });

describe('readLine', () => {
  it('reads a deviation in its unit and a whole value against the nominal alike', () => {
    const asDeviation = readLine(line({ value: '+0.41', unit: 'mg' }), KILOGRAM);
    const asWhole = readLine(line({ value: '1 000.000 41', unit: 'g', valueIs: 'whole value' }), KILOGRAM);
    expect(asDeviation.deviation).toBe('0.00041');
    expect(asWhole.deviation).toBe('0.00041');
  });

  it('keeps unit and decimals as written, zeros included', () => {
    const { written, writtenU } = readLine(line({ value: '+0.410', expandedU: '50 µg' }), KILOGRAM);
    expect([written, writtenU]).toEqual([
      { unit: 'mg', decimals: 3 },
      { unit: 'ug', decimals: 0 },
    ]);
  });

  it('lets a unit written beside the number win', () => {
    expect(readLine(line({ value: '-31 µg', unit: 'mg' }), KILOGRAM).deviation).toBe('-0.000031');
  });

  it('says nothing about what cannot be read, and invents no U', () => {
    const reading = readLine(line({ value: '0.1 2', expandedU: 'small' }), KILOGRAM);
    expect(reading).toMatchObject({ deviation: null, expandedU: null, k: '2', change: null, third: null });
    expect(readLine(line({ value: '1', expandedU: '1', uNotStated: true }), KILOGRAM).expandedU).toBeNull();
  });

  it('holds a whole value without a weight back, since there is no nominal to take off', () => {
    expect(
      readLine(line({ value: '1000.1', unit: 'g', valueIs: 'whole value' }), undefined).deviation,
    ).toBeNull();
  });

  it('gives the change since the last value in the U of the change: 0.6 mg over 0.5 mg', () => {
    const { change } = readLine(line({ value: '0.9', expandedU: '0.3' }), KILOGRAM);
    expect(change?.deviation).toBe('0.0006');
    expect(change?.ratio).toBeCloseTo(1.2, 12);
  });

  it('holds U at k = 2 against a third of the E2 limit at 1 kg, 1.6 mg (OIML R 111-1:2004, Table 1)', () => {
    const third = (expandedU: string, k = '2') =>
      readLine(line({ value: '0', expandedU, k }), KILOGRAM).third?.isWithin;
    expect(third('0.53')).toBe(true);
    expect(third('0.54')).toBe(false);
    expect(third('0.54', '3')).toBe(true);
    expect(readLine(line({ value: '0', expandedU: '1', quantity: 'mass' }), KILOGRAM).third).toBeNull();
  });
});

import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { reachableClasses } from './reachable-classes.ts';

const reach = (nominal: string, expandedU: number) => reachableClasses(new Decimal(nominal), expandedU);

describe('reachableClasses', () => {
  it('are those with U <= MPE/3 at the nominal, the exact third included', () => {
    // OIML R 111-1:2004, table 1 at 1 kg: E1 0.5 mg, E2 1.6 mg, F1 5.0 mg.
    expect(reach('1000', 0.5 / 3)[0]).toBe('E1');
    expect(reach('1000', 0.17)[0]).toBe('E2');
    expect(reach('1000', 0.6)).toEqual(['F1', 'F2', 'M1', 'M2', 'M3']);
  });

  it('are none above the widest, and none at a nominal without limits', () => {
    expect(reach('1000', 167)).toEqual([]);
    expect(reach('300', 0)).toEqual([]);
  });

  it('leave out classes that are not defined at the nominal', () => {
    expect(reach('5000000', 0)[0]).toBe('F1');
  });

  it('refuse an uncertainty below zero', () => {
    expect(() => reach('1000', -1)).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'expandedUncertainty' }),
    );
  });
});

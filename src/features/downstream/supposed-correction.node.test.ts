import { describe, expect, it } from 'vitest';
import { supposedCorrection } from './supposed-correction.ts';

const VALUE = { deviation: '0.00062', expandedU: '0.00011', k: '2' };

describe('supposedCorrection', () => {
  it('adds a shift to the deviation and leaves U', () => {
    expect(supposedCorrection({ kind: 'shift', valueUid: 'v', shift: '-0.00002' }, VALUE)).toEqual({
      deviation: '0.0006',
      expandedU: '0.00011',
    });
  });

  it('adds a larger u in quadrature, to two digits, never less than it is', () => {
    // 2 * hypot(0.055, 0.05) mg = 0.14866 mg.
    expect(supposedCorrection({ kind: 'raise', valueUid: 'v', addedU: 0.00005 }, VALUE)).toEqual({
      deviation: '0.00062',
      expandedU: '0.00015',
    });
  });

  it('states no U where the certificate states none', () => {
    const bare = { deviation: '0.00062', expandedU: null, k: null };
    expect(supposedCorrection({ kind: 'raise', valueUid: 'v', addedU: 0.00005 }, bare)).toEqual({
      deviation: '0.00062',
      expandedU: null,
    });
  });
});

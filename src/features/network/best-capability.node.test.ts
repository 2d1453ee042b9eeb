import { describe, expect, it } from 'vitest';
import { nominalUnit } from '#shared/numbers/nominal.ts';
import { bestU, partsOfBestU } from './best-capability.ts';

const line = { bestUConstant: '0.0000008', bestURelative: 5e-8 };

describe('best capability', () => {
  it('grows with the nominal, digit for digit', () => {
    expect(bestU(line, '1')).toBe('0.00000085');
    expect(bestU(line, '500')).toBe('0.0000258');
  });

  it('leaves out a part that is zero', () => {
    expect(partsOfBestU(line)).toEqual({ constant: '0.0000008', relative: '0.00000005' });
    expect(partsOfBestU({ bestUConstant: '0', bestURelative: 4.5e-8 })).toEqual({
      constant: null,
      relative: '0.000000045',
    });
    expect(partsOfBestU({ bestUConstant: '0.000045', bestURelative: 0 })).toEqual({
      constant: '0.000045',
      relative: null,
    });
    expect(partsOfBestU({ bestUConstant: '0', bestURelative: 0 })).toEqual({ constant: '0', relative: null });
  });
});

it('says nominals in the unit engraved', () => {
  expect(['0.5', '1', '1000'].map(nominalUnit)).toEqual(['mg', 'g', 'kg']);
});

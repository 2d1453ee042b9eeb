import { describe, expect, it } from 'vitest';
import type { ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { KnownStandard } from './known.ts';
import { defaultSensitivity } from './sensitivity.ts';

const weight = (marking: string, nominal: string) => ({ marking, nominal }) as KnownStandard;
const reference = (marking: string, nominal: string) => ({ marking, nominal }) as ReferenceChoice;

describe('defaultSensitivity', () => {
  it('is the ratio of the nominals for one reference, said in words', () => {
    expect(defaultSensitivity(weight('500 g', '500'), [reference('1 kg', '1000')])).toEqual({
      value: '0.5',
      why: '500 g from 1 kg',
    });
    expect(defaultSensitivity(weight('1 kg', '1000'), [reference('1 kg R', '1000')])?.value).toBe('1');
  });

  it('is 1 for several that make up the weight, and nobody’s guess otherwise', () => {
    const parts = [reference('200 g', '200'), reference('300 g', '300')];
    expect(defaultSensitivity(weight('500 g', '500'), parts)?.value).toBe('1');
    expect(defaultSensitivity(weight('1 kg', '1000'), parts)).toBeNull();
    expect(defaultSensitivity(undefined, parts)).toBeNull();
    expect(defaultSensitivity(weight('1 kg', '1000'), [undefined])).toBeNull();
  });
});

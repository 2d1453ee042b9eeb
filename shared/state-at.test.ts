import { describe, expect, it } from 'vitest';
import { endOfDay, stateAt } from './state-at.ts';

describe('the last instant that counts', () => {
  it('is the end of a day, or an instant itself', () => {
    expect(endOfDay('2026-12-01')).toBe('2026-12-01T23:59:59.999999Z');
    expect(endOfDay('2026-12-01T16:00:00.123000Z')).toBe('2026-12-01T16:00:00.123000Z');
  });

  it('leaves out what the same day brought after it', () => {
    const value = { effectiveFrom: '2026-11-01', recordedAt: '2026-11-01T09:00:00.000000Z' };
    const recordedAt = '2026-12-01T16:00:00.124000Z';
    const end = { kind: 'withdrawn', effectiveOn: '2026-11-15', recordedAt } as const;
    const standing = (known: string) => stateAt(value, [end], '2026-12-01', known).state;
    expect(standing('2026-12-01T16:00:00.123000Z')).toBe('in force');
    expect(standing(recordedAt)).toBe('withdrawn');
    expect(standing('2026-12-01')).toBe('withdrawn');
  });
});

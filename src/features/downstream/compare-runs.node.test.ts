import { describe, expect, it } from 'vitest';
import type { WhatIfGroup } from '#shared/contracts/downstream.ts';
import { differenceOf, measured, pairGroups, tellingMeasure, wholeOf } from './compare-runs.ts';

const group = (key: string, rest: Partial<WhatIfGroup> = {}): WhatIfGroup => ({
  key,
  laboratory: null,
  count: 1,
  warned: 0,
  words: { none: 0, material: 1, verdictChanges: 0 },
  largestShift: 0.001,
  largestRatio: null,
  ...rest,
});

describe('two dry runs side by side', () => {
  it('pair their groups by key, those of the second alone at the end', () => {
    const pairs = pairGroups([group('E2'), group('F1')], [group('M1'), group('F1')]);
    expect(pairs.map(({ key, one, other }) => [key, one !== null, other !== null])).toEqual([
      ['E2', true, false],
      ['F1', true, true],
      ['M1', false, true],
    ]);
  });

  it('measure the whole by its words and its largest group', () => {
    const groups = [
      group('E2'),
      group('F1', { largestShift: 0.003, largestRatio: 0.4 }),
      group('M1', { largestShift: null }),
    ];
    const total = { count: 3, warned: 0, words: { none: 0, material: 3, verdictChanges: 0 } };
    const whole = wholeOf({ total, groups });
    expect(measured(whole, 'material')).toBe(3);
    expect(measured(whole, 'largest shift')).toBe(0.003);
    expect(measured(whole, 'largest shift/U')).toBe(0.4);
  });

  it('take the second less the first', () => {
    expect(differenceOf(2, 5)).toBe(3);
    expect(differenceOf(2, null)).toBe(-2);
    expect(differenceOf(null, null)).toBeNull();
  });

  it('are compared by the first measure that tells them apart', () => {
    const answer = (rest: Partial<WhatIfGroup>) => {
      const groups = [group('E2', rest)];
      return { total: { count: 1, warned: 0, words: groups[0]!.words }, groups };
    };
    const one = answer({});
    const changed = { none: 0, material: 0, verdictChanges: 1 };
    expect(tellingMeasure(one, answer({ words: changed }))).toBe('verdict changes');
    expect(tellingMeasure(one, answer({ words: { ...changed, verdictChanges: 0 } }))).toBe('material');
    expect(tellingMeasure(one, answer({ largestShift: 0.002 }))).toBe('largest shift');
    expect(tellingMeasure(one, answer({ largestRatio: 0.1 }))).toBe('largest shift/U');
    expect(tellingMeasure(one, one)).toBe('verdict changes');
  });
});

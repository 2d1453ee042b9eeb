import { describe, expect, it } from 'vitest';
import type { WhatIfChange } from '#shared/contracts/downstream.ts';
import { readWhatIfSearch, withWhatIfChange } from './what-if-search.ts';

const SHIFT: WhatIfChange = {
  kind: 'shift',
  valueUid: '01a01e2f-2000-7738-adb1-8fcf65fde7c6',
  shift: '-0.00002',
};

describe('the question of several changes in the address', () => {
  it('is the same after it was written and read again', () => {
    const asked = {
      ...readWhatIfSearch(new URLSearchParams('by=class&beyond=5&day=2025-01-01')),
      changes: [SHIFT],
    };
    expect(readWhatIfSearch(new URLSearchParams(withWhatIfChange(asked, {})))).toEqual(asked);
  });

  it('takes changes that it cannot read for none', () => {
    for (const text of ['', '{', '[{"kind":"melt"}]', '[{"kind":"shift","valueUid":"x","shift":"0"}]']) {
      expect(readWhatIfSearch(new URLSearchParams({ changes: text })).changes).toEqual([]);
    }
  });

  it('closes the open group when other changes are asked', () => {
    const asked = { ...readWhatIfSearch(new URLSearchParams('group=E2&by=class')), changes: [SHIFT] };
    expect(withWhatIfChange(asked, { sort: 'shift' })).toMatchObject({ group: 'E2', sort: 'shift' });
    expect(withWhatIfChange(asked, { changes: [] })).toEqual({ by: 'class' });
  });
});

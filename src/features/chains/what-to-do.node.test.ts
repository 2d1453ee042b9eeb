import { expect, it } from 'vitest';
import type { AsNowKnown } from '#shared/contracts/chains.ts';
import { whatToDo } from './what-to-do.ts';

const now = (changes: Partial<AsNowKnown> = {}): AsNowKnown => ({
  shift: '0.000027',
  deviation: '0.000227',
  expandedU: 0.0005,
  because: null,
  keepsClass: null,
  replaced: [],
  notices: [],
  ...changes,
});

it('says that a shift below a tenth of U calls for nothing, and from there on that it has to be judged', () => {
  expect(whatToDo(now(), 0.0999, '.')).toBe('No action needed, because the shift is 10.0\u2009% of U.');
  expect(whatToDo(now(), 0.1, '.')).toBe(
    'The shift is 10.0\u2009% of U: judge what was done with this value.',
  );
  expect(whatToDo(now(), 0.054, ',')).toContain('5,4\u2009%');
});

it('never passes over a small shift that changes whether the class is accepted', () => {
  const lost = whatToDo(now({ keepsClass: { certified: true, now: false } }), 0.01, '.');
  expect(lost).toContain('no longer accepts the class');
  expect(whatToDo(now({ keepsClass: { certified: true, now: true } }), 0.01, '.')).toContain(
    'No action needed',
  );
});

it('says why nothing can be said', () => {
  expect(whatToDo(now({ shift: null, because: 'certificate C-1 was withdrawn' }), null, '.')).toBe(
    'Not computable, because certificate C-1 was withdrawn.',
  );
  expect(whatToDo(now(), null, '.')).toContain('states no U');
  expect(whatToDo(now({ shift: '0' }), 0, '.')).toContain('did not move');
});

import { expect, it } from 'vitest';
import { dueDistance, dueState } from './due-state.ts';

it.each([
  ['2026-09-12', '2026-07-13', null, 'in 61 days'],
  ['2026-09-12', '2026-07-14', 'caution', 'in 60 days'],
  ['2026-09-12', '2026-09-11', 'caution', 'in 1 day'],
  ['2026-09-12', '2026-09-12', 'caution', 'today'],
  ['2026-09-12', '2026-09-13', 'broken', '1 day ago'],
])('due %s stands on %s as %s, %s', (dueOn, today, state, distance) => {
  expect([dueState(dueOn, today), dueDistance(dueOn, today)]).toEqual([state, distance]);
});

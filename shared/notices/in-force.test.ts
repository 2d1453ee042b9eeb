import { describe, expect, it } from 'vitest';
import { noticeOn, noticesInForce, type NoticeState } from './in-force.ts';

/** Made known in 2020; of effect from 2021, and earlier than it was known for the back-dated one. */
const first = {
  id: 'first',
  effectiveOn: '2021-03-01',
  recordedAt: '2020-11-05T10:00:00.000000Z',
  replacesId: null,
};
const backDated = { ...first, id: 'back', effectiveOn: '2020-06-01' };
const later = {
  ...first,
  id: 'later',
  effectiveOn: '2023-01-01',
  recordedAt: '2022-10-01T10:00:00.000000Z',
  replacesId: 'first',
};
const all = [later, first, backDated];

describe('a notice on a day, as known on a day', () => {
  it.each<[string, typeof first, string, string, NoticeState]>([
    ['recorded after the knowledge day', first, '2024-01-01', '2020-11-04', 'unknown'],
    ['recorded on it', first, '2024-01-01', '2020-11-05', 'in force'],
    ['announced', first, '2021-02-28', '2024-01-01', 'not yet in force'],
    ['its first day', first, '2021-03-01', '2024-01-01', 'in force'],
    ['back-dated, before anybody knew', backDated, '2020-07-01', '2020-07-01', 'unknown'],
    ['back-dated, looking back', backDated, '2020-07-01', '2020-12-01', 'in force'],
    ['the day before it is replaced', first, '2022-12-31', '2024-01-01', 'in force'],
    ['replaced', first, '2023-01-01', '2024-01-01', 'replaced'],
    ['replaced, but nobody knew yet', first, '2023-01-01', '2022-09-30', 'in force'],
  ])('%s', (_, notice, day, known, state) => {
    expect(noticeOn(notice, all, day, known)).toBe(state);
  });

  it('are given in the order in which they take effect', () => {
    expect(noticesInForce(all, '2022-01-01', '2024-01-01').map((notice) => notice.id)).toEqual([
      'back',
      'first',
    ]);
    expect(noticesInForce(all, '2023-01-01', '2024-01-01').map((notice) => notice.id)).toEqual([
      'back',
      'later',
    ]);
  });
});

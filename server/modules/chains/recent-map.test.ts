import { describe, expect, it } from 'vitest';
import { RecentMap } from './recent-map.ts';

describe('RecentMap', () => {
  it('forgets what was unused for longest', () => {
    const map = new RecentMap<string, number>(2);
    map.set('a', 1);
    map.set('b', 2);
    expect(map.get('a')).toBe(1);
    map.set('c', 3);
    expect([map.get('a'), map.get('b'), map.get('c')]).toEqual([1, undefined, 3]);
  });

  it('counts a look as a use, and an entry set again once', () => {
    const map = new RecentMap<string, number>(2);
    map.set('a', 1);
    map.set('b', 2);
    expect(map.has('a')).toBe(true);
    map.set('a', 4);
    expect(map.size).toBe(2);
    map.set('c', 3);
    expect([map.has('b'), map.get('a')]).toEqual([false, 4]);
    map.delete('a');
    expect([map.has('a'), map.size]).toEqual([false, 1]);
  });
});

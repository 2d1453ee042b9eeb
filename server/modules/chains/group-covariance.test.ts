import { describe, expect, it } from 'vitest';
import { GroupCovariance } from './group-covariance.ts';

describe('GroupCovariance', () => {
  const group = new GroupCovariance('7 7 4,7 9 -1.5e-15,9 9 2.25,9 12 0.3333333333333333,12 12 1');

  it('gives a pair in either order', () => {
    expect(group.between(7, 9)).toBe(-1.5e-15);
    expect(group.between(9, 7)).toBe(-1.5e-15);
    expect(group.between(12, 9)).toBe(1 / 3);
    expect([7, 9, 12].map((id) => group.between(id, id))).toEqual([4, 2.25, 1]);
  });

  it('gives 0 for a pair that is not stated and for a value that is no member', () => {
    expect(group.between(7, 12)).toBe(0);
    expect(group.between(7, 8)).toBe(0);
  });
});

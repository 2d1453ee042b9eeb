import { describe, expect, it } from 'vitest';
import { placedPath } from './placed-path.ts';

describe('path in its place', () => {
  it('moves points and lines across and down', () => {
    expect(placedPath('M2 3L4 5H6V7Z', { x: 10, y: 20 })).toBe('M12 23L14 25H16V27Z');
    expect(placedPath('M0 0 8 4,2,-1.5', { x: 1, y: 2, scale: 2 })).toBe('M1 2 17 10 5 -1');
  });

  it('scales what is relative, but not the turn and the flags of an arc', () => {
    expect(placedPath('M7 2.2a4.8 4.8 0 1 0 .01 0Z', { x: 100, y: 50, scale: 2 })).toBe(
      'M114 54.4a9.6 9.6 0 1 0 0.02 0Z',
    );
  });
});

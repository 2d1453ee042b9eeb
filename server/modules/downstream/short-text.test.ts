import { describe, expect, it } from 'vitest';
import { shortText } from './short-text.ts';

describe('shortText', () => {
  it.each([
    [0.000219, 'down', '0.21 mg'],
    [0.000219, 'up', '0.22 mg'],
    [0.000021, 'down', '21 µg'],
    [0.0123, 'down', '12 mg'],
    [0.25, 'down', '0.25 g'],
    [1234, 'down', '1200 g'],
    [0, 'down', '0 µg'],
  ] as const)('%s g, %s: %s', (grams, rounding, expected) => {
    expect(shortText(grams, rounding)).toBe(expected);
  });
});

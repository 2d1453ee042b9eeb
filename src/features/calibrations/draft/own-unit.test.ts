import { describe, expect, it } from 'vitest';
import { ownUnit } from './own-unit.ts';

describe('ownUnit', () => {
  it.each([
    ['80 g', 'mg', '80', 'g'],
    ['-0,031µg', 'mg', '-0,031', 'ug'],
    ['+1 000.000 41 kg ', 'g', '+1 000.000 41', 'kg'],
    ['80', 'mg', '80', 'mg'],
    ['80 m', 'mg', '80 m', 'mg'],
    ['80 cm3', 'mg', '80 cm3', 'mg'],
    ['small', 'mg', 'small', 'mg'],
  ] as const)('parts "%s", chosen %s, into %s and %s', (entry, chosen, text, unit) => {
    expect(ownUnit(entry, chosen)).toEqual({ text, unit });
  });
});

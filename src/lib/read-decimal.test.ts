import { describe, expect, it } from 'vitest';
import { readDecimal } from './read-decimal.ts';

const value = (typed: string, mark: '.' | ',' = '.'): string => {
  const read = readDecimal(typed, mark);
  return read.kind === 'number' ? read.value : read.kind;
};

describe('readDecimal', () => {
  it.each([
    ['0.000 212', '0.000212'],
    ['1\u202f000.5', '1000.5'],
    ['\u22120.41218', '-0.41218'],
    ['-0.412 18', '-0.41218'],
    ['+12', '12'],
    ['0,5', '0.5'],
    ['1.500', '1.500'],
  ])('reads "%s" as %s', (typed, expected) => {
    expect(value(typed)).toBe(expected);
  });

  it('takes a comma for the decimal sign where that is the reader’s', () => {
    expect(value('1,234', ',')).toBe('1.234');
    expect(value('1.5', ',')).toBe('1.5');
  });

  it.each(['1,234', '1.2,3', '12 34', '1.2.3', 'abc', '12 g', '1.2(3)'])(
    'does not guess at "%s"',
    (typed) => {
      expect(value(typed)).toBe('unreadable');
    },
  );

  it('says what it received', () => {
    const read = readDecimal('12 34', '.');
    expect(read.kind === 'unreadable' && read.why).toMatch(/^Received "12 34"/);
  });

  it.each(['1e999', 'abc', '10 %', '-', '5 hPa x'])(
    'advises a plain number where "%s" stands, and no unit',
    (typed) => {
      const read = readDecimal(typed, '.');
      expect(read.kind === 'unreadable' && read.why).toBe(
        `Write a plain decimal number, such as 10 or 0.5; received "${typed}".`,
      );
    },
  );

  it('tells nothing from empty', () => {
    expect(value('  ')).toBe('empty');
  });
});

import { describe, expect, it } from 'vitest';
import { graphValue } from './example-graph.ts';
import { GraphArrays, type GraphValueRow } from './graph-arrays.ts';
import { groupOrder } from './group-order.ts';
import { groupKeyOf, NO_CLASS, WITHHELD } from './groups.ts';
import { dayNumber } from './day-number.ts';
import { SIGHT } from './sight.ts';

function key(
  by: Parameters<typeof groupKeyOf>[1],
  changes: Partial<GraphValueRow>,
  sight: number = SIGHT.full,
) {
  const graph = new GraphArrays();
  graph.addValue(graphValue(1, changes));
  return groupKeyOf(graph, by)(0, sight);
}

describe('groupKeyOf', () => {
  it.each([
    ['1000.000000000000', '3'],
    ['999.999999999999', '2'],
    ['20000', '4'],
    ['1', '0'],
    ['0.500000000000', '-1'],
    ['0.001', '-3'],
    ['0.099', '-2'],
  ])('nominal %s g: decade %s', (nominal, decade) => {
    expect(key('nominal', { nominal })).toBe(decade);
  });

  it('names who holds a weight of one’s own or of a customer, who calibrated one of others', () => {
    const value = { holderId: 'holder', issuerId: 'issuer' };
    expect(key('laboratory', value, SIGHT.full)).toBe('holder');
    expect(key('laboratory', value, SIGHT.issued)).toBe('holder');
    expect(key('laboratory', value, SIGHT.warning)).toBe('issuer');
  });

  it('tells years of what one sees in full, and classes', () => {
    const value = { performedDay: dayNumber('2023-12-31') };
    expect(key('year', value, SIGHT.issued)).toBe('2023');
    expect(key('year', value, SIGHT.warning)).toBe(WITHHELD);
    expect(key('class', { class: 'F1' }, SIGHT.warning)).toBe('F1');
    expect(key('class', { class: null })).toBe(NO_CLASS);
  });
});

describe('groupOrder', () => {
  const sorted = (by: Parameters<typeof groupOrder>[0], keys: [string, number][]) =>
    keys
      .map(([name, count]) => ({ key: name, count }))
      .sort(groupOrder(by))
      .map((group) => group.key);

  it.each<[Parameters<typeof groupOrder>[0], [string, number][], string[]]>([
    [
      'laboratory',
      [
        ['b', 1],
        ['a', 1],
        ['c', 9],
      ],
      ['c', 'a', 'b'],
    ],
    [
      'class',
      [
        ['none', 9],
        ['F1', 1],
        ['E1', 1],
      ],
      ['E1', 'F1', 'none'],
    ],
    [
      'nominal',
      [
        ['-1', 1],
        ['3', 1],
        ['0', 1],
      ],
      ['3', '0', '-1'],
    ],
    [
      'year',
      [
        ['withheld', 9],
        ['2023', 1],
        ['2024', 1],
      ],
      ['2024', '2023', 'withheld'],
    ],
  ])('%s', (by, keys, expected) => {
    expect(sorted(by, keys)).toEqual(expected);
  });
});

import { describe, expect, it } from 'vitest';
import { newLine } from './draft-values.ts';
import type { KnownStandard } from './known.ts';
import { putRows, turned, understandRows, whyLeftOut } from './paste-lines.ts';
import type { PastedRow } from './read-paste.ts';

const weight = (id: string, marking: string, nominal: string): KnownStandard => ({
  id: `0190f0aa-1111-7abc-8000-00000000000${id}`,
  registryNo: `TV 030${id}`,
  marking,
  nominal,
  class: 'E2',
  lastValue: null,
});
const TWO_HUNDRED = weight('1', '200 g', '200');
const ONE_HUNDRED = weight('2', '100 g', '100');
const row = (name: string, value: string, expandedU = '0.016'): PastedRow => ({
  weight: name,
  value: { text: value, unit: 'mg' },
  expandedU: { text: expandedU, unit: 'mg' },
  k: '',
});

describe('putRows', () => {
  it('fills the line of the weight, adds a line for another, and keeps a row without a weight', () => {
    const before = [{ ...newLine(TWO_HUNDRED.id), class: 'E2' as const }];
    const rows = understandRows(
      [row('200 g', '-0.031'), row('100 g', '0.011'), row('unknown', '0.5')],
      [TWO_HUNDRED],
      [ONE_HUNDRED],
    );
    const names = new Map<string, string>();
    const lines = putRows(before, rows, false, names);
    expect(lines.map(({ standardId, value, class: stated }) => [standardId, value, stated])).toEqual([
      [TWO_HUNDRED.id, '-0.031', 'E2'],
      [ONE_HUNDRED.id, '0.011', 'E2'],
      [null, '0.5', 'E2'],
    ]);
    expect(lines[0]?.key).toBe(before[0]?.key);
    expect([...names]).toEqual([[lines[2]?.key, 'unknown']]);
  });

  it('turns corrections into deviations, and leaves whole values alone', () => {
    const whole: PastedRow = { ...row('100 g', ''), value: { text: '100.000011', unit: 'g' } };
    const rows = understandRows([row('200 g', '-0.031'), whole], [], [TWO_HUNDRED, ONE_HUNDRED]);
    const lines = putRows([], rows, true);
    expect(lines.map(({ value, valueIs }) => [value, valueIs])).toEqual([
      ['0.031', 'deviation'],
      ['100.000011', 'whole value'],
    ]);
  });

  it('leaves what was typed where the pasted cell cannot be read', () => {
    const before = [{ ...newLine(TWO_HUNDRED.id), value: '0.030' }];
    const bad: PastedRow = { ...row('200 g', ''), value: { problem: 'Received "n/a".' } };
    expect(putRows(before, understandRows([bad], [TWO_HUNDRED], []), false)[0]?.value).toBe('0.030');
  });
});

describe('whyLeftOut', () => {
  it('leaves out a row whose value cannot be read, and lets one go in that names a weight only', () => {
    const bad: PastedRow = { ...row('200 g', ''), value: { problem: 'Received "n/a".' } };
    const bare: PastedRow = { weight: '100 g', value: null, expandedU: null, k: '' };
    const empty: PastedRow = { ...bare, weight: ' ' };
    const why = understandRows([bad, row('200 g', '0.1'), bare, empty], [], []).map(whyLeftOut);
    expect(why).toEqual(['Received "n/a".', null, null, 'The row says nothing.']);
  });
});

describe('turned', () => {
  it.each([
    ['0.120', '-0.120'],
    ['-0.120', '0.120'],
    ['\u22121', '1'],
    ['+1', '-1'],
  ])('turns %s into %s', (text, expected) => expect(turned(text)).toBe(expected));
});

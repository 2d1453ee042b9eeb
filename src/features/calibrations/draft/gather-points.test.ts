import { describe, expect, it } from 'vitest';
import type { OpenPoint } from '#shared/contracts/drafts.ts';
import { gatherPoints } from './gather-points.ts';

const point = (field: string, message: string): OpenPoint => ({
  field,
  message,
  received: null,
  expected: null,
  clause: null,
  kind: 'missing',
});
const gather = (points: OpenPoint[]) =>
  gatherPoints(points, (line) => `weight ${line + 1}`).map(({ where, point: { field } }) => [where, field]);

describe('gatherPoints', () => {
  it('says once what is missing in several lines, and leads to the first', () => {
    const lines = [0, 1, 2, 4, 6, 7].map((at) => point(`lines.${at}.expandedU`, 'Copy U.'));
    expect(gather([point('method', 'Name it.'), ...lines])).toEqual([
      ['Method', 'method'],
      ['Lines 1 to 3, 5, 7, 8: U', 'lines.0.expandedU'],
    ]);
  });

  it('keeps apart what differs, and names the weight where it is one line', () => {
    expect(gather([point('lines.0.value', 'Copy it.'), point('lines.1.value', 'No number.')])).toEqual([
      ['Line 1, weight 1: Value', 'lines.0.value'],
      ['Line 2, weight 2: Value', 'lines.1.value'],
    ]);
  });
});

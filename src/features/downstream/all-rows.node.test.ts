import { describe, expect, it } from 'vitest';
import { allRows } from './all-rows.ts';

const GROUPS: Record<string, number[]> = { a: [1, 2, 3], b: [], c: [4] };

describe('allRows', () => {
  it('hands on every row of every group once, in order, however small the pages', async () => {
    const asked: [string, string | undefined][] = [];
    const pageOf = async (group: string, cursor: string | undefined) => {
      asked.push([group, cursor]);
      const from = Number(cursor ?? 0);
      const rows = GROUPS[group]!.slice(from, from + 2);
      return { rows, nextCursor: from + 2 < GROUPS[group]!.length ? String(from + 2) : null };
    };
    const seen: number[] = [];
    for await (const rows of allRows(Object.keys(GROUPS), pageOf)) seen.push(...rows);
    expect(seen).toEqual([1, 2, 3, 4]);
    expect(asked).toEqual([
      ['a', undefined],
      ['a', '2'],
      ['b', undefined],
      ['c', undefined],
    ]);
  });
});

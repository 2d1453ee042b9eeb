import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { pageAfter, type Standing } from './keyset.ts';

const rows = fc.uniqueArray(
  fc.record({
    keys: fc.tuple(fc.integer({ min: 0, max: 2 }), fc.constantFrom(0, 0.1, 1e-300, Infinity, -1)),
    id: fc.integer({ min: 1, max: 10_000 }),
  }),
  { selector: (row) => row.id },
);

describe('pageAfter', () => {
  it('walks through every row once, in one order, page by page', () => {
    fc.assert(
      fc.property(rows, fc.integer({ min: 1, max: 5 }), (all, limit) => {
        const seen: Standing[] = [];
        let cursor: string | undefined;
        do {
          const page = pageAfter(all, { order: 'test', cursor, limit });
          seen.push(...page.rows);
          cursor = page.nextCursor ?? undefined;
        } while (cursor !== undefined);
        expect(seen.map((row) => row.id).sort()).toEqual(all.map((row) => row.id).sort());
        const whole = pageAfter(all, { order: 'test', cursor: undefined, limit: 10_000 });
        expect(seen).toEqual(whole.rows);
      }),
    );
  });

  it('puts the larger key first, then the smaller id', () => {
    const all = [
      { keys: [1], id: 3 },
      { keys: [2], id: 9 },
      { keys: [1], id: 2 },
    ];
    const { rows: shown } = pageAfter(all, { order: 'test', cursor: undefined, limit: 9 });
    expect(shown.map((row) => row.id)).toEqual([9, 2, 3]);
  });

  it('refuses a cursor of another order', () => {
    const { nextCursor } = pageAfter(
      [1, 2].map((id) => ({ keys: [0], id })),
      {
        order: 'shift',
        cursor: undefined,
        limit: 1,
      },
    );
    expect(() => pageAfter([], { order: 'word', cursor: nextCursor!, limit: 1 })).toThrow(
      expect.objectContaining({ id: 'malformed' }),
    );
  });
});

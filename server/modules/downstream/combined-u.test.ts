import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { combinedU, type KnownPair } from './combined-u.ts';

const pair = (changes: Partial<KnownPair>): KnownPair => ({
  i: 0,
  j: 1,
  covariance: 0,
  known: 0,
  unknown: 0,
  because: null,
  ...changes,
});

describe('combinedU', () => {
  it('is s V s with the whole covariance matrix', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 12, maxLength: 12 }),
        (parts) => {
          // Three values of four independent parts each: V = A A'.
          const rows = [0, 1, 2].map((at) => parts.slice(4 * at, 4 * at + 4));
          const dot = (a: number[], b: number[]) => a.reduce((sum, value, at) => sum + value * b[at]!, 0);
          const us = rows.map((row) => Math.sqrt(dot(row, row)));
          const pairs = [
            [0, 1],
            [0, 2],
            [1, 2],
          ].map(([i, j]) => {
            const shared = dot(rows[i!]!, rows[j!]!);
            return pair({ i: i!, j: j!, covariance: shared, known: shared });
          });
          const signs = [1, -1, 1];
          const total = [0, 1, 2, 3].map((part) =>
            rows.reduce((sum, row, at) => sum + signs[at]! * row[part]!, 0),
          );
          const { u, bound, linear } = combinedU(us, pairs, signs);
          expect(u).toBeCloseTo(Math.sqrt(dot(total, total)), 7);
          expect(bound).toBe(u);
          expect(linear! + 1e-12).toBeGreaterThanOrEqual(u!);
        },
      ),
    );
  });

  it('takes an undeclared covariance at its largest, whatever the signs, and never above the linear sum', () => {
    const undeclared = pair({ covariance: null, known: 1, unknown: 2, because: 'not stated' });
    expect(combinedU([2, 3], [undeclared], [1, 1])).toEqual({ u: null, bound: Math.sqrt(13 + 6), linear: 5 });
    expect(combinedU([2, 3], [undeclared], [1, -1]).bound).toBeCloseTo(Math.sqrt(13 + 2), 12);
    expect(combinedU([2, 3], [{ ...undeclared, unknown: 100 }], [1, -1]).bound).toBe(5);
  });

  it('gives nothing where an uncertainty is not known', () => {
    expect(combinedU([2, null], [pair({})], [1, 1])).toEqual({ u: null, bound: null, linear: null });
  });
});

import { describe, expect, it } from 'vitest';
import { covariance, covarianceMatrix } from './covariance.ts';
import results from './independent/results.json' with { type: 'json' };
import type { Network } from './network.ts';
import { shift } from './shift.ts';
import { variances } from './variances.ts';

/**
 * Random networks with sources, groups, class limits and doubled links (`randomNetwork`, seeds 71 to 74), worked out
 * once by `independent/work-out.py` in exact fractions and stored with the results.
 */
interface Stored extends Network {
  covariance: number[][];
  /** By the node that moves by one unit. */
  shifts: Record<string, Record<string, number>>;
}

const stored = results as unknown as Stored[];
/** Of the largest number beside which a result is held: sums of a hundred terms of either sign. */
const ROUNDING = 1e-12;

describe.each(stored.map((network, at) => [at, network] as const))('stored network %i', (_, network) => {
  const ids = network.values.map((value) => value.id);

  it('has the covariances that an independent program finds', () => {
    const matrix = covarianceMatrix(network, ids);
    const largest = Math.max(...network.covariance.flat().map(Math.abs));
    matrix.forEach((row, i) =>
      row.forEach((entry, j) => {
        expect(Math.abs(entry - network.covariance[i]![j]!)).toBeLessThanOrEqual(ROUNDING * largest);
      }),
    );
    expect(matrix.flat().some((entry) => entry < 0)).toBe(true);
    const one = covariance(network, ids[3]!, ids[7]!) - network.covariance[3]![7]!;
    expect(Math.abs(one)).toBeLessThanOrEqual(ROUNDING * largest);
    variances(network).forEach((variance, i) => {
      expect(Math.abs(variance - network.covariance[i]![i]!)).toBeLessThanOrEqual(ROUNDING * largest);
    });
  });

  it('has the shifts that an independent program finds', () => {
    for (const [from, expected] of Object.entries(network.shifts)) {
      const found = shift(network, from, 2);
      expect(Object.keys(found).sort()).toEqual(Object.keys(expected).sort());
      const largest = Math.max(1, ...Object.values(expected).map(Math.abs));
      for (const [id, moved] of Object.entries(expected)) {
        expect(Math.abs(found[id]! - 2 * moved)).toBeLessThanOrEqual(ROUNDING * largest);
      }
    }
    expect(
      Object.values(network.shifts).filter((moved) => Object.keys(moved).length > 2).length,
    ).toBeGreaterThan(1);
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { distanceToLimit } from './distance-to-limit.ts';
import { randomNetwork } from './test-support/random-network.ts';
import { propagate } from './propagate.ts';
import { shift } from './shift.ts';

const distance = (deviation: string, largest: string, sensitivity: number) =>
  distanceToLimit({ deviation: new Decimal(deviation), largest: new Decimal(largest), sensitivity });

describe('distanceToLimit', () => {
  it('is the room on each side over the sensitivity', () => {
    expect(distance('0.3', '0.5', 0.5)).toEqual({ upwards: 0.4, downwards: 1.6 });
  });

  it('changes sides with the sign of the sensitivity', () => {
    expect(distance('0.3', '0.5', -0.5)).toEqual({ upwards: 1.6, downwards: 0.4 });
  });

  it('has no limit where nothing flows, and none left on the limit itself', () => {
    expect(distance('0.3', '0.5', 0)).toEqual({ upwards: null, downwards: null });
    expect(distance('0.5', '0.5', 1).upwards).toBe(0);
  });

  it('refuses a value beyond its limit, and a sensitivity that is no number', () => {
    expect(() => distance('-0.6', '0.5', 1)).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'deviation' }),
    );
    expect(() => distance('0', '0.5', NaN)).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'sensitivity' }),
    );
  });

  it('an ancestor that is wrong by the distance brings the focus to its limit, in random networks', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 10_000 }), (seed) => {
        const network = randomNetwork(seed);
        const { sensitivities } = propagate(network, 'v11');
        for (const { id } of network.values.filter((value) => value.id !== 'v11')) {
          const found = distance('1', '5', sensitivities[id] ?? 0);
          if (found.upwards === null || found.downwards === null) continue;
          const up = 1 + (shift(network, id, found.upwards)['v11'] ?? 0);
          const down = 1 + (shift(network, id, -found.downwards)['v11'] ?? 0);
          expect(Math.abs(up)).toBeCloseTo(5, 6);
          expect(Math.abs(down)).toBeCloseTo(5, 6);
          expect(Math.sign(up)).toBe(-Math.sign(down));
        }
      }),
      { numRuns: 40 },
    );
  });
});

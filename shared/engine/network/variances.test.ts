import { describe, expect, it } from 'vitest';
import { networkFromArrays } from './network-from-arrays.ts';
import { propagate } from './propagate.ts';
import { fullMatrix } from './test-support/full-matrix.ts';
import { randomNetwork } from './test-support/random-network.ts';
import { variances } from './variances.ts';

const arrays = {
  local: Float64Array.of(3, 4, 1, -1, 2),
  child: Int32Array.of(1, 2, 2, 4, 2),
  parent: Int32Array.of(0, 0, 1, 3, 5),
  sensitivity: Float64Array.of(1, 0.5, 0.5, 1, -2),
  sourceUncertainty: Float64Array.of(0.5),
};

describe('variances', () => {
  it('gives every value in the order given, infinite where a local part is not known', () => {
    // x2 = 0.5 x0 + 0.5 x1 - 2 s + d, x1 = x0 + d: variance 9 + 0.25 * 16 + 4 * 0.25 + 1 = 15.
    expect(Array.from(variances(networkFromArrays(arrays)))).toEqual([9, 25, 15, Infinity, Infinity]);
  });

  it('does not depend on an unknown part that enters with sensitivity 0', () => {
    const zero = { ...arrays, sensitivity: Float64Array.of(1, 0.5, 0.5, 0, -2) };
    expect(variances(networkFromArrays(zero))[4]).toBe(4);
  });

  it('sees an unknown root cancel on two roads as exactly as propagate does', () => {
    const network = {
      values: [
        { id: 'root', local: null },
        { id: 'a', local: 1 },
        { id: 'b', local: 2 },
      ],
      links: [
        { child: 'a', parent: 'root', sensitivity: 1 },
        { child: 'b', parent: 'a', sensitivity: 1 },
        { child: 'b', parent: 'root', sensitivity: -1 },
      ],
    };
    expect(Array.from(variances(network))).toEqual([Infinity, Infinity, 5]);
    expect(propagate(network, 'b')).toMatchObject({ missing: [], standardUncertainty: Math.sqrt(5) });
  });

  it('keeps walking where a member of the same group stands among the ancestors', () => {
    // b leans on a, and both local parts are anticorrelated: 1 + 1 - 2 * 0.9.
    const network = {
      values: [
        { id: 'a', local: null },
        { id: 'middle', local: 0 },
        { id: 'b', local: null },
      ],
      groups: [
        {
          members: ['a', 'b'],
          covariance: [
            [1, -0.9],
            [-0.9, 1],
          ],
        },
      ],
      links: [
        { child: 'middle', parent: 'a', sensitivity: 1 },
        { child: 'b', parent: 'middle', sensitivity: 1 },
      ],
    };
    expect(variances(network)[2]).toBeCloseTo(0.2, 14);
  });

  it.each([101, 102, 103, 104, 105])('equals the full matrix on a network of 60 values (seed %i)', (seed) => {
    const network = randomNetwork(seed, 60);
    const { matrix } = fullMatrix(network);
    variances(network).forEach((variance, i) => expect(variance / matrix[i]![i]!).toBeCloseTo(1, 9));
  });
});

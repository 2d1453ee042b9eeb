import { describe, expect, it } from 'vitest';
import { covariance, covarianceMatrix } from './covariance.ts';
import type { Network } from './network.ts';
import { propagate } from './propagate.ts';
import { shift } from './shift.ts';

const network: Network = {
  values: [
    { id: 'root', local: 2 },
    { id: 'left', local: 1 },
    { id: 'right', local: 1 },
    { id: 'end', local: 1 },
    { id: 'apart', local: null },
    { id: 'by limit', local: 1 },
  ],
  links: [
    { child: 'left', parent: 'root', sensitivity: 0.5 },
    { child: 'right', parent: 'root', sensitivity: -2 },
    { child: 'end', parent: 'left', sensitivity: 3 },
    { child: 'end', parent: 'right', sensitivity: 1 },
    { child: 'left', parent: 'apart', sensitivity: 1 },
    { child: 'by limit', parent: 'root', sensitivity: 1, classLimit: { standardUncertainty: 1 } },
  ],
};

describe('covariance', () => {
  it('comes from what both share, of either sign', () => {
    expect(covariance(network, 'root', 'right')).toBe(-8);
    expect(covariance(network, 'right', 'root')).toBe(-8);
    expect(covariance(network, 'right', 'by limit')).toBe(0);
    expect(covariance(network, 'left', 'right')).toBe(-4);
  });

  it('is the variance for one value with itself, class limit included', () => {
    expect(covariance(network, 'by limit', 'by limit')).toBe(2);
    expect(covarianceMatrix(network, ['root', 'right'])).toEqual([
      [4, -8],
      [-8, 17],
    ]);
  });

  it('refuses to answer where an unknown local part is shared, and names it', () => {
    expect(() => covariance(network, 'left', 'end')).toThrow(
      expect.objectContaining({ code: 'unknown-local', field: 'apart' }),
    );
  });

  it('refuses unknown names', () => {
    expect(() => covariance(network, 'root', 'x')).toThrow(expect.objectContaining({ field: 'b' }));
    expect(() => covariance(network, 'x', 'root')).toThrow(expect.objectContaining({ field: 'a' }));
    expect(() => covarianceMatrix(network, ['root', 'x'])).toThrow(
      expect.objectContaining({ field: 'ids[1]' }),
    );
  });
});

describe('shift', () => {
  it('moves every descendant by its sensitivity, and none through a class limit', () => {
    const shifts = shift(network, 'root', 10);
    expect(shifts).toEqual({ left: 5, right: -20, end: -5, 'by limit': 0 });
  });

  it('agrees with the sensitivities found from below', () => {
    expect(shift(network, 'root', 1).end).toBe(propagate(network, 'end').sensitivities.root);
  });

  it('refuses a shift that is no number, and an unknown value', () => {
    expect(() => shift(network, 'root', NaN)).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'delta' }),
    );
    expect(() => shift(network, 'x', 1)).toThrow(
      expect.objectContaining({ code: 'unknown-node', field: 'from' }),
    );
  });
});

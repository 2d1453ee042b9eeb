import { describe, expect, it } from 'vitest';
import type { Network } from './network.ts';
import { groupKey } from './network.ts';
import { propagate } from './propagate.ts';

/** A primary value, a reference and a weight that leans on the reference; one volume enters with both signs. */
function chain(): Network {
  return {
    values: [
      { id: 'primary', local: 3 },
      { id: 'reference', local: 4 },
      { id: 'weight', local: 2 },
    ],
    sources: [{ id: 'volume', standardUncertainty: 5 }],
    links: [
      { child: 'reference', parent: 'primary', sensitivity: 1 },
      { child: 'weight', parent: 'reference', sensitivity: 0.5 },
      { child: 'reference', parent: 'volume', sensitivity: 0.8 },
      { child: 'weight', parent: 'volume', sensitivity: -1 },
    ],
  };
}

describe('propagate', () => {
  it('gives uncertainty, sensitivities, origins and flows of a small chain worked by hand', () => {
    const result = propagate(chain(), 'weight');
    // g(volume) = 0.5 * 0.8 - 1 = -0.6: variance 9; primary 0.25 * 9, reference 0.25 * 16, weight 4.
    expect(result.sensitivities).toEqual({
      weight: 1,
      reference: 0.5,
      primary: 0.5,
      volume: expect.closeTo(-0.6, 14),
    });
    expect(result.contributions).toEqual({
      weight: 4,
      reference: 4,
      primary: 2.25,
      volume: expect.closeTo(9, 12),
    });
    expect(result.standardUncertainty).toBeCloseTo(Math.sqrt(19.25), 12);
    expect(result.missing).toEqual([]);
    expect(result.degreesOfFreedom).toBe(Infinity);
    // C(volume) = -0.6 * 25 = -15; C(reference) = C(primary) + 0.8 C(volume) + 0.5 * 16 = 4.5 - 12 + 8 = 0.5.
    expect(result.covarianceWithFocus.volume).toBeCloseTo(-15, 12);
    expect(result.covarianceWithFocus.reference).toBeCloseTo(0.5, 12);
    const flow = (child: string, parent: string) =>
      result.flows.find((each) => each.child === child && each.parent === parent)?.variance;
    expect(flow('weight', 'volume')).toBeCloseTo(15, 12);
    expect(flow('reference', 'volume')).toBeCloseTo(-6, 12);
    expect(flow('weight', 'reference')).toBeCloseTo(0.25, 12);
    expect(result.localFlows.weight).toBe(4);
  });

  it('lets the negative third term of OIML R 111-1 C.6.3-1 emerge from the shared volume of the reference', () => {
    // R 111-1:2004 C.6.3-1 (formula from memory): m^2 (ra - r0)[(ra - r0) - 2 (ra1 - r0)] u^2(rho_r)/rho_r^4.
    const [mass, density, uDensity] = [1, 7950, 70]; // kg, kg/m3
    const [inUse, atCalibration] = [1.16 - 1.2, 1.15 - 1.2]; // air density less 1.2 kg/m3
    const uVolume = (mass * uDensity) / density ** 2;
    const result = propagate(
      {
        values: [
          { id: 'reference', local: 1e-8 },
          { id: 'test', local: 2e-8 },
        ],
        sources: [{ id: 'volume of the reference', standardUncertainty: uVolume }],
        links: [
          { child: 'reference', parent: 'volume of the reference', sensitivity: atCalibration },
          { child: 'test', parent: 'reference', sensitivity: 1 },
          { child: 'test', parent: 'volume of the reference', sensitivity: -inUse },
        ],
      },
      'test',
    );
    const ofReference = 1e-8 ** 2 + (atCalibration * uVolume) ** 2;
    const third = (mass ** 2 * inUse * (inUse - 2 * atCalibration) * uDensity ** 2) / density ** 4;
    expect(third).toBeLessThan(0);
    const variance = 2e-8 ** 2 + ofReference + third;
    expect(result.standardUncertainty! ** 2 / variance).toBeCloseTo(1, 12);
    expect(result.standardUncertainty! ** 2).toBeLessThan(2e-8 ** 2 + ofReference);
  });

  it('gives the restraint sum of one weighing design zero local variance, out of the covariance of the design', () => {
    // Three weights of one design whose local errors cancel in the sum: 1 + 1 + 1 = reference.
    const third = 1 / 3;
    const covariance = [0, 1, 2].map((i) => [0, 1, 2].map((j) => (i === j ? 2 : -1) * 0.01));
    const result = propagate(
      {
        values: [
          { id: 'reference', local: 0.3 },
          ...['a', 'b', 'c', 'sum'].map((id) => ({ id, local: id === 'sum' ? 0 : null })),
        ],
        groups: [{ members: ['a', 'b', 'c'], covariance }],
        links: ['a', 'b', 'c'].flatMap((id) => [
          { child: id, parent: 'reference', sensitivity: third },
          { child: 'sum', parent: id, sensitivity: 1 },
        ]),
      },
      'sum',
    );
    expect(result.standardUncertainty).toBeCloseTo(0.3, 14);
    expect(result.contributions[groupKey(0)]).toBeCloseTo(0, 15);
    expect(result.missing).toEqual([]);
  });

  it('adds duplicate links', () => {
    const once = propagate(
      { ...chain(), links: [{ child: 'weight', parent: 'primary', sensitivity: 0.7 }] },
      'weight',
    );
    const twice = propagate(
      {
        ...chain(),
        links: [
          { child: 'weight', parent: 'primary', sensitivity: 0.3 },
          { child: 'weight', parent: 'primary', sensitivity: 0.4 },
        ],
      },
      'weight',
    );
    expect(twice.standardUncertainty).toBeCloseTo(once.standardUncertainty!, 14);
    expect(twice.flows).toHaveLength(1);
  });

  it('names unknown local parts and keeps what is known', () => {
    const network = chain();
    network.values[1]!.local = null;
    const result = propagate(network, 'weight');
    expect(result.standardUncertainty).toBeNull();
    expect(result.missing).toEqual(['reference']);
    expect(result.contributions).not.toHaveProperty('reference');
    expect(result.contributions.primary).toBeCloseTo(2.25, 14);
    expect(propagate(network, 'primary').standardUncertainty).toBe(3);
  });

  it('stops at a class limit: the limit counts, the parent and all above it do not', () => {
    const network = chain();
    network.values[1]!.local = null;
    network.links[1] = {
      child: 'weight',
      parent: 'reference',
      sensitivity: 0.5,
      classLimit: { standardUncertainty: 6 },
    };
    const result = propagate(network, 'weight');
    expect(result.standardUncertainty).toBeCloseTo(Math.sqrt(4 + 9 + 25), 13);
    expect(result.missing).toEqual([]);
    expect(result.sensitivities).toMatchObject({ reference: 0, primary: 0, volume: -1 });
    expect(result.contributions.reference).toBe(9);
    expect(result.flows).toContainEqual({ child: 'weight', parent: 'reference', variance: 9 });
  });

  it('adds a class limit to the own part of a parent that is also leaned on by value', () => {
    const network = chain();
    network.links.push({
      child: 'weight',
      parent: 'primary',
      sensitivity: 1,
      classLimit: { standardUncertainty: 2 },
    });
    const result = propagate(network, 'weight');
    expect(result.contributions.primary).toBeCloseTo(2.25 + 4, 13);
    expect(result.localFlows.primary).toBeCloseTo(2.25 + 4, 13);
  });

  it('answers for a source and for a lone value', () => {
    expect(propagate(chain(), 'volume').standardUncertainty).toBe(5);
    expect(propagate({ values: [{ id: 'a', local: 0 }], links: [] }, 'a')).toMatchObject({
      standardUncertainty: 0,
      degreesOfFreedom: Infinity,
      flows: [],
    });
  });

  it('refuses a focus that is not there', () => {
    expect(() => propagate(chain(), 'nobody')).toThrow(
      expect.objectContaining({ code: 'unknown-node', field: 'focus' }),
    );
  });
});

describe('degrees of freedom along a network', () => {
  it('follows Welch-Satterthwaite (JCGM 100 G.4.1) and truncates', () => {
    // u = 1, 2 with 3 and 8 degrees: 25 / (1/3 + 16/8) = 10.71.
    const result = propagate(
      {
        values: [
          { id: 'a', local: 1, degreesOfFreedom: 3 },
          { id: 'b', local: 2, degreesOfFreedom: 8 },
        ],
        links: [{ child: 'b', parent: 'a', sensitivity: 1 }],
      },
      'b',
    );
    expect(result.degreesOfFreedom).toBe(10);
  });

  it('counts one pooled standard deviation once along the chain, also where a group rests on it', () => {
    const shared = { degreesOfFreedom: 6, estimate: 'balance' };
    const network: Network = {
      values: [
        { id: 'a', local: 1, ...shared },
        { id: 'b', local: null },
      ],
      groups: [{ members: ['b'], covariance: [[1]], ...shared }],
      links: [{ child: 'b', parent: 'a', sensitivity: 1 }],
    };
    expect(propagate(network, 'b').degreesOfFreedom).toBe(6);
    network.groups![0]!.estimate = 'another';
    expect(propagate(network, 'b').degreesOfFreedom).toBe(12);
  });
});

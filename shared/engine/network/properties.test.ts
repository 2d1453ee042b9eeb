import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { isPositiveSemidefinite } from '../linear/matrix.ts';
import { covarianceMatrix } from './covariance.ts';
import type { Network } from './network.ts';
import { propagate } from './propagate.ts';
import { shift } from './shift.ts';
import { randomNetwork } from './test-support/random-network.ts';
import { variances } from './variances.ts';

const networks = fc.integer({ min: 1, max: 1_000_000 }).map((seed) => randomNetwork(seed, 10));
const SETTINGS = { seed: 20261201, numRuns: 60 };

function scaledBy(network: Network, factor: number): Network {
  return {
    values: network.values.map((value) => ({ ...value, local: value.local! * factor })),
    sources: network.sources!.map((source) => ({
      ...source,
      standardUncertainty: source.standardUncertainty * factor,
    })),
    groups: network.groups!.map((group) => ({
      ...group,
      covariance: group.covariance.map((row) => row.map((value) => value * factor ** 2)),
    })),
    links: network.links.map((link) =>
      link.classLimit
        ? { ...link, classLimit: { standardUncertainty: link.classLimit.standardUncertainty * factor } }
        : link,
    ),
  };
}

describe('properties of a network', () => {
  it('every uncertainty scales with its inputs', () => {
    fc.assert(
      fc.property(networks, fc.double({ min: 1e-6, max: 1e6, noNaN: true }), (network, factor) => {
        const once = variances(network);
        variances(scaledBy(network, factor)).forEach((variance, i) => {
          expect(variance).toBeCloseTo(
            once[i]! * factor ** 2,
            9 - Math.ceil(Math.log10(1 + once[i]! * factor ** 2)),
          );
        });
      }),
      SETTINGS,
    );
  });

  it('the order in which values, links and groups are given does not matter', () => {
    fc.assert(
      fc.property(networks, (network) => {
        const turned: Network = {
          values: network.values.toReversed(),
          sources: network.sources!.toReversed(),
          groups: network.groups!.toReversed(),
          links: network.links.toReversed(),
        };
        const [one, other] = [propagate(network, 'v9'), propagate(turned, 'v9')];
        expect(other.standardUncertainty! / one.standardUncertainty!).toBeCloseTo(1, 9);
        for (const [id, gain] of Object.entries(one.sensitivities)) {
          expect(other.sensitivities[id]).toBeCloseTo(gain, 8);
        }
      }),
      SETTINGS,
    );
  });

  it('shifts are linear, and reach the end as its sensitivities say', () => {
    fc.assert(
      fc.property(networks, fc.double({ min: -1e3, max: 1e3, noNaN: true }), (network, delta) => {
        const { sensitivities } = propagate(network, 'v9');
        for (const id of Object.keys(sensitivities)) {
          if (id !== 'v9') expect(shift(network, id, delta).v9).toBeCloseTo(sensitivities[id]! * delta, 6);
        }
      }),
      SETTINGS,
    );
  });

  it('covariance matrices are positive semidefinite', () => {
    fc.assert(
      fc.property(networks, (network) => {
        const ids = network.values.map((value) => value.id);
        expect(isPositiveSemidefinite(covarianceMatrix(network, ids)).ok).toBe(true);
      }),
      SETTINGS,
    );
  });

  it('one more independent source never lowers an uncertainty', () => {
    fc.assert(
      fc.property(networks, fc.double({ min: -3, max: 3, noNaN: true }), (network, sensitivity) => {
        const more: Network = {
          ...network,
          sources: [...network.sources!, { id: 'fresh', standardUncertainty: 1 }],
          links: [...network.links, { child: 'v2', parent: 'fresh', sensitivity }],
        };
        const before = propagate(network, 'v9').standardUncertainty!;
        expect(propagate(more, 'v9').standardUncertainty!).toBeGreaterThanOrEqual(before * (1 - 1e-12));
      }),
      SETTINGS,
    );
  });
});

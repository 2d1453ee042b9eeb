import { describe, expect, it } from 'vitest';
import { covariance, covarianceMatrix } from './covariance.ts';
import { propagate } from './propagate.ts';
import { fullMatrix } from './test-support/full-matrix.ts';
import { normalDraws, seededRandom } from './test-support/random.ts';
import { randomNetwork } from './test-support/random-network.ts';
import { variances } from './variances.ts';

const SEEDS = Array.from({ length: 60 }, (_, i) => i + 1);

function near(value: number, expected: number, scale: number): void {
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(1e-11 * scale);
}

describe('the walks against the full matrix V = J S J′ on random networks', () => {
  it.each(SEEDS)('agree in every variance, covariance and contribution (seed %i)', (seed) => {
    const network = randomNetwork(seed);
    const { ids, matrix } = fullMatrix(network);
    const all = variances(network);
    const byWalk = covarianceMatrix(network, ids);
    const scale = Math.max(...matrix.map((row, i) => row[i]!));
    network.values.forEach(({ id }, i) => {
      const result = propagate(network, id);
      near(result.standardUncertainty! ** 2, matrix[i]![i]!, scale);
      near(all[i]!, matrix[i]![i]!, scale);
      const sum = Object.values(result.contributions).reduce((total, part) => total + part, 0);
      near(sum, matrix[i]![i]!, scale);
      for (const [ancestor, shared] of Object.entries(result.covarianceWithFocus)) {
        near(shared, matrix[i]![ids.indexOf(ancestor)]!, scale);
      }
      ids.forEach((_, j) => near(byWalk[i]![j]!, matrix[i]![j]!, scale));
    });
    near(covariance(network, 'v3', 'v11'), matrix[3]![11]!, scale);
  });

  it.each(SEEDS)('conserve flow at every node to 1e-12 of the flow through all links (seed %i)', (seed) => {
    const network = randomNetwork(seed, 16);
    const result = propagate(network, 'v15');
    const size = result.flows.reduce((sum, flow) => sum + Math.abs(flow.variance), 0);
    for (const node of Object.keys(result.sensitivities)) {
      const inward = result.flows.filter((flow) => flow.child === node);
      const outward = result.flows.filter((flow) => flow.parent === node);
      const sum = (flows: typeof inward) => flows.reduce((total, flow) => total + flow.variance, 0);
      const leaving = node === 'v15' ? result.standardUncertainty! ** 2 : sum(outward);
      const entering = sum(inward) + (result.localFlows[node] ?? 0);
      expect(Math.abs(entering - leaving)).toBeLessThanOrEqual(1e-12 * (size + leaving));
    }
  });

  it('has networks with flows below zero and shares above the whole among those tried', () => {
    const flows = SEEDS.flatMap((seed) => {
      const result = propagate(randomNetwork(seed), 'v11');
      return result.flows.map((flow) => flow.variance / result.standardUncertainty! ** 2);
    });
    expect(flows.some((share) => share < -0.01)).toBe(true);
    expect(flows.some((share) => share > 1)).toBe(true);
  });
});

describe('the walks against a Monte Carlo of the same model (JCGM 101 clause 7)', () => {
  it('agree within five standard errors of the simulated variance', () => {
    const normal = normalDraws(seededRandom(20261));
    const [k11, k12, k22] = [0.5, -0.3, 0.4];
    const network = {
      values: [
        { id: 'a', local: 0.3 },
        { id: 'b', local: null },
        { id: 'c', local: null },
        { id: 'd', local: 0.2 },
      ],
      sources: [{ id: 'v', standardUncertainty: 0.7 }],
      groups: [
        {
          members: ['b', 'c'],
          covariance: [
            [k11, k12],
            [k12, k22],
          ],
        },
      ],
      links: [
        { child: 'a', parent: 'v', sensitivity: 1 },
        { child: 'b', parent: 'a', sensitivity: 0.6 },
        { child: 'c', parent: 'a', sensitivity: 0.4 },
        { child: 'd', parent: 'b', sensitivity: 1 },
        { child: 'd', parent: 'c', sensitivity: 0.5 },
        { child: 'd', parent: 'v', sensitivity: -0.8 },
      ],
    };
    const trials = 200_000;
    let squares = 0;
    for (let trial = 0; trial < trials; trial += 1) {
      const v = 0.7 * normal();
      const a = v + 0.3 * normal();
      const z = normal();
      const b = 0.6 * a + Math.sqrt(k11) * z;
      const c = 0.4 * a + (k12 / Math.sqrt(k11)) * z + Math.sqrt(k22 - k12 ** 2 / k11) * normal();
      squares += (b + 0.5 * c - 0.8 * v + 0.2 * normal()) ** 2;
    }
    const simulated = squares / trials;
    const exact = propagate(network, 'd').standardUncertainty! ** 2;
    expect(Math.abs(simulated - exact)).toBeLessThan(5 * exact * Math.sqrt(2 / trials));
  });
});

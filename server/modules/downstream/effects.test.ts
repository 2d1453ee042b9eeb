import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { applyChanges } from '#shared/engine/network/apply-changes.ts';
import type { Network } from '#shared/engine/network/network.ts';
import { fullMatrix } from '#shared/engine/network/test-support/full-matrix.ts';
import { randomNetwork } from '#shared/engine/network/test-support/random-network.ts';
import { below } from './below.ts';
import { effectsOf, type GraphChange } from './effects.ts';
import { GraphArrays } from './graph-arrays.ts';
import { graphOf, graphValue } from './example-graph.ts';

const seeds = fc.integer({ min: 1, max: 100_000 });
const SIZE = 12;

/** What changes bring to each value of the network, in its order; what is not below them is 0. */
function effectsByValue(network: Network, starts: number[], changes: GraphChange[]) {
  const graph = graphOf(network);
  const found = below(graph, starts);
  const effects = effectsOf(graph, found, changes);
  const spread = (column: Float64Array | Uint8Array) =>
    network.values.map((_, node) => {
      const place = found.placeOf(node);
      return place < 0 ? 0 : column[place]!;
    });
  return {
    shift: spread(effects.shift),
    addedVariance: spread(effects.addedVariance),
    isLost: spread(effects.isLost),
  };
}

/** Sensitivities of all values to all, (1 - C)^-1 = sum C^n, by multiplying whole matrices. */
function allSensitivities(network: Network): number[][] {
  const at = new Map(network.values.map((value, index) => [value.id, index]));
  const direct = network.values.map(() => network.values.map(() => 0));
  for (const link of network.links) {
    const parent = at.get(link.parent);
    if (parent !== undefined && !link.classLimit) direct[at.get(link.child)!]![parent]! += link.sensitivity;
  }
  let sum = network.values.map((_, i) => network.values.map((__, j) => Number(i === j)));
  for (let n = 1; n < SIZE; n += 1) {
    sum = direct.map((row, i) =>
      row.map((_, j) => Number(i === j) + row.reduce((total, c, k) => total + c * sum[k]![j]!, 0)),
    );
  }
  return sum;
}

const close = (found: number[], expected: number[]) =>
  found.forEach((value, at) => {
    const scale = Math.max(1, ...expected.map(Math.abs));
    expect(Math.abs(value - expected[at]!) / scale, `value ${at}`).toBeLessThan(1e-9);
  });

/** The variance of each value by the whole matrix. */
const variancesOf = (network: Network) => {
  const { matrix } = fullMatrix(network);
  return network.values.map((_, at) => matrix[at]![at]!);
};

describe('effectsOf on random networks, against whole matrices', () => {
  it('shifts every descendant of two shifted values by its sensitivities', () => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const network = randomNetwork(seed, SIZE);
        const all = allSensitivities(network);
        const { shift } = effectsByValue(
          network,
          [1, 4],
          [
            { kind: 'shift', node: 1, shift: 0.7 },
            { kind: 'shift', node: 4, shift: -0.2 },
          ],
        );
        close(
          shift,
          all.map((row) => 0.7 * row[1]! - 0.2 * row[4]!),
        );
      }),
      { numRuns: 60 },
    );
  });

  it('adds to every variance what the whole matrix gains by a larger local part', () => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const network = { ...randomNetwork(seed, SIZE), groups: [] };
        const raised: Network = {
          ...network,
          values: network.values.map((value, at) =>
            at === 2 ? { ...value, local: Math.hypot(value.local!, 1.5) } : value,
          ),
        };
        const after = variancesOf(raised);
        const expected = variancesOf(network).map((variance, at) => after[at]! - variance);
        const { addedVariance } = effectsByValue(network, [2], [{ kind: 'raise', node: 2, addedU: 1.5 }]);
        close(addedVariance, expected);
      }),
      { numRuns: 60 },
    );
  });

  it('counts a notice once a path: shifts, added variance and losses as the engine has them, groups included', () => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const network = randomNetwork(seed, SIZE);
        const terms = [1, 3, 6].map((node, at) => ({ node, shift: 0.1 * (at + 1), sensitivity: 1 + at }));
        const changes: GraphChange[] = [
          { kind: 'notice', addedU: 0.8, covered: terms },
          { kind: 'raise', node: 5, addedU: 0.3 },
          { kind: 'withdraw', nodes: [8] },
        ];
        const found = effectsByValue(network, [1, 3, 6, 5, 8], changes);
        const engine = applyChanges(network, [
          {
            kind: 'notice',
            id: 'notice',
            standardUncertainty: 0.8,
            terms: terms.map(({ node, ...term }) => ({ ...term, value: `v${node}` })),
          },
          { kind: 'raise', value: 'v5', addedStandardUncertainty: 0.3 },
          { kind: 'withdraw', value: 'v8' },
        ]);
        const lost = new Set(engine.notComputable);
        expect(found.isLost).toEqual(network.values.map((value) => Number(lost.has(value.id))));
        const before = variancesOf(network);
        const isKept = network.values.map((value) => !lost.has(value.id));
        const kept = (column: ArrayLike<number>) => Array.from(column).filter((_, at) => isKept[at]);
        close(kept(found.shift), kept(engine.shifts));
        close(
          kept(found.addedVariance),
          kept(engine.variances.map((variance, at) => variance - before[at]!)),
        );
        expect(found.shift.filter((_, at) => !isKept[at]).every(Number.isNaN)).toBe(true);
      }),
      { numRuns: 60 },
    );
  });
});

describe('effectsOf and class limits', () => {
  /** W (E2, 1 kg: 1.6 mg) used by its class limit by A, on which B leans. */
  function limitChain(deviation: number, stated: number | null = null) {
    const graph = new GraphArrays();
    graph.addValue(graphValue(1, { deviation, class: stated === null ? 'E2' : null }));
    graph.addValue(graphValue(2, { class: 'M1' }));
    graph.addValue(graphValue(3, { class: 'M1' }));
    const day = { usedBeginDay: 738_000, usedEndDay: 738_000, sensitivity: 1 };
    graph.addLink({ childId: 2, parentId: 1, isClassLimit: true, usedExpandedU: stated, ...day });
    graph.addLink({ childId: 3, parentId: 2, isClassLimit: false, usedExpandedU: null, ...day });
    return graph;
  }
  const shifted = (graph: GraphArrays, shift: number) =>
    effectsOf(graph, below(graph, [0]), [{ kind: 'shift', node: 0, shift }]);

  it('hand no shift down while the reference stays within its class', () => {
    const effects = shifted(limitChain(0.001), 0.0006);
    expect([...effects.shift]).toEqual([0.0006, 0, 0]);
    expect([...effects.isBeyondLimit]).toEqual([0, 0, 0]);
    expect(effects.leaving).toEqual([]);
  });

  it('say so, for all below, when it leaves its class, and still hand nothing down', () => {
    const effects = shifted(limitChain(0.001), 0.00061);
    expect([...effects.shift]).toEqual([0.00061, 0, 0]);
    expect([...effects.isBeyondLimit]).toEqual([0, 1, 1]);
    expect(effects.leaving).toEqual([0]);
  });

  it('take the limit stated on the link where the reference has no class', () => {
    expect(shifted(limitChain(0, 0.01), 0.009).leaving).toEqual([]);
    expect(shifted(limitChain(0, 0.01), 0.011).leaving).toEqual([0]);
  });

  it('stop a withdrawal: the nominal was used', () => {
    const graph = limitChain(0);
    const effects = effectsOf(graph, below(graph, [0]), [{ kind: 'withdraw', nodes: [0] }]);
    expect([...effects.isLost]).toEqual([1, 0, 0]);
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { GAP, PLATE, SCALE } from './geometry.ts';
import type { LayoutInput } from './layout-input.ts';
import { layoutChain } from './layout.ts';

/** Each run lays a whole chain out: enough of them to meet every kind of crossing. */
const RUNS = { numRuns: 40 };

/** A random chain: each node leans on later ones, flows shared out among the references. */
const chains = fc.integer({ min: 2, max: 40 }).chain((count) =>
  fc
    .array(fc.array(fc.nat(count - 1), { minLength: 1, maxLength: 3 }), {
      minLength: count,
      maxLength: count,
    })
    .map((wishes) => chainOf(count, wishes)),
);

function chainOf(count: number, wishes: number[][]): LayoutInput {
  const parents = wishes.map((wish, node) =>
    [...new Set(wish.map((step) => node + 1 + (step % 4)))].filter((p) => p < count),
  );
  const tier = new Array<number>(count).fill(0);
  const reached = new Set([0]);
  for (let node = 0; node < count; node += 1) {
    if (!reached.has(node)) continue;
    for (const parent of parents[node]!) {
      reached.add(parent);
      tier[parent] = Math.max(tier[parent]!, tier[node]! + 1);
    }
  }
  const nodes = [...reached].map((node) => ({
    id: `n${node}`,
    tier: tier[node]!,
    isRoot: parents[node]!.length === 0,
    hasStub: node % 2 === 0,
  }));
  const links = [...reached].flatMap((node) =>
    parents[node]!.map((parent, at) => ({ child: `n${node}`, parent: `n${parent}`, flow: (at + 1) / 8 })),
  );
  return { nodes, links };
}

describe('layout of a chain', () => {
  it('lets no lane meet a plate, nor two plates overlap', () => {
    fc.assert(
      fc.property(chains, (input) => {
        const { plates, lanes } = layoutChain(input);
        for (const plate of plates) {
          for (const lane of lanes) {
            const isBeside =
              lane.top !== plate.y || lane.x + lane.width <= plate.x || lane.x >= plate.x + PLATE.width;
            expect(isBeside).toBe(true);
          }
          for (const other of plates) {
            if (other.id !== plate.id && other.y === plate.y)
              expect(Math.abs(other.x - plate.x)).toBeGreaterThanOrEqual(PLATE.width + GAP.between - 1e-6);
          }
        }
      }),
      RUNS,
    );
  });

  it('stacks at each plate ports whose widths sum to the flow through it', () => {
    fc.assert(
      fc.property(chains, (input) => {
        const { ribbons, plates } = layoutChain(input);
        for (const plate of plates) {
          const entering = ribbons.filter((ribbon) => ribbon.child === plate.id);
          const flow = input.links
            .filter((link) => link.child === plate.id)
            .reduce((sum, link) => sum + link.flow!, 0);
          const edges = entering.flatMap((ribbon) => {
            const end = ribbon.points.at(-1)!;
            return [end.x - ribbon.width / 2, end.x + ribbon.width / 2];
          });
          if (entering.length > 0)
            expect(Math.max(...edges) - Math.min(...edges)).toBeCloseTo(flow * SCALE, 6);
        }
      }),
      RUNS,
    );
  });

  it('keeps the whole at most 2.5 times as wide as the widest tier needs', () => {
    fc.assert(
      fc.property(chains, (input) => {
        const { plates, lanes, width } = layoutChain(input);
        const tops = new Set(plates.map((plate) => plate.y));
        const needs = [...tops].map((top) => {
          const inTier = plates.filter((plate) => plate.y === top).length * (PLATE.width + 66 + GAP.between);
          return (
            inTier +
            lanes.filter((lane) => lane.top === top).reduce((sum, lane) => sum + lane.width + GAP.between, 0)
          );
        });
        expect(width).toBeLessThanOrEqual(2.5 * Math.max(...needs));
      }),
      RUNS,
    );
  });

  it('puts the focus lowest and every root in the top tier', () => {
    fc.assert(
      fc.property(chains, (input) => {
        const { plates } = layoutChain(input);
        const yOf = new Map(plates.map((plate) => [plate.id, plate.y]));
        expect(yOf.get('n0')).toBe(Math.max(...yOf.values()));
        for (const node of input.nodes) {
          if (node.isRoot && node.id !== 'n0') expect(yOf.get(node.id)).toBe(Math.min(...yOf.values()));
        }
      }),
      RUNS,
    );
  });

  it('says which ribbons are too thin for the scale, and which flow back', () => {
    const { ribbons } = layoutChain({
      nodes: [
        { id: 'a', tier: 0, isRoot: false, hasStub: false },
        { id: 'b', tier: 1, isRoot: true, hasStub: false },
        { id: 'c', tier: 1, isRoot: true, hasStub: false },
      ],
      links: [
        { child: 'a', parent: 'b', flow: 0.004 },
        { child: 'a', parent: 'c', flow: -0.25 },
      ],
    });
    expect(ribbons[0]).toMatchObject({ width: 1, isToScale: false, isNegative: false });
    expect(ribbons[1]).toMatchObject({ width: 14, isToScale: true, isNegative: true });
  });

  it('lays out nothing without nodes', () => {
    expect(layoutChain({ nodes: [], links: [] })).toMatchObject({ plates: [], width: 0 });
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { randomNetwork } from '#shared/engine/network/test-support/random-network.ts';
import { below } from './below.ts';
import { graphOf } from './example-graph.ts';

describe('below', () => {
  it('gives the starts and all below them, each once, parents first', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 100_000 }), (seed) => {
        const network = randomNetwork(seed);
        const graph = graphOf(network);
        const { nodes, placeOf } = below(graph, [2, 5, 2, -1]);
        const expected = new Set([2, 5]);
        // Values are linked to earlier ones only: one pass in their order finds every descendant.
        network.values.forEach((value, node) => {
          const leansOnFound = network.links.some(
            (link) => link.child === value.id && expected.has(Number(link.parent.replace('v', ''))),
          );
          if (leansOnFound) expected.add(node);
        });
        expect([...nodes].sort((a, b) => a - b)).toEqual([...expected].sort((a, b) => a - b));
        for (const [place, node] of nodes.entries()) {
          expect(placeOf(node)).toBe(place);
          for (let link = graph.firstUp[node]!; link >= 0; link = graph.nextUp[link]!) {
            expect(placeOf(graph.linkParent[link]!)).toBeLessThan(place);
          }
        }
        expect(network.values.filter((_, node) => placeOf(node) >= 0)).toHaveLength(expected.size);
      }),
      { numRuns: 60 },
    );
  });
});

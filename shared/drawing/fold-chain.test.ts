import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ChainResponse } from '#shared/contracts/chains.ts';
import { asDrawn } from './as-drawn.ts';
import { drawnWhole, type DrawnChain } from './drawn-chain.ts';
import { foldChain, groupsOf } from './fold-chain.ts';
import type { FoldBy } from './fold-kind.ts';
import { generatedChain } from './generated-chain.ts';
import { GAP, PLATE, SCALE } from './geometry.ts';
import { layoutInput } from './layout-of.ts';
import { layoutChain } from './layout.ts';

const RUNS = { numRuns: 25 };
/** Each lays a whole chain out. */
const LAYOUT_RUNS = { numRuns: 12 };
const ways = fc.constantFrom<FoldBy>('laboratory', 'laboratory, class and nominal');
const chains = fc
  .record({
    plates: fc.integer({ min: 2, max: 90 }),
    seed: fc.nat(10_000),
    tierWidth: fc.integer({ min: 1, max: 9 }),
  })
  .map((wanted) => drawnWhole(generatedChain(wanted)));
/** A fold, with some of its groups opened. */
const folds = fc
  .record({ chain: chains, by: ways, pick: fc.array(fc.boolean(), { minLength: 30, maxLength: 30 }) })
  .map(({ chain, by, pick }) => {
    const keys = [...groupsOf(chain, { by, opened: new Set() }).keys()];
    const opened = new Set(keys.filter((_, index) => pick[index % pick.length]));
    return { whole: chain, opened, folded: foldChain(chain, { by, opened, verdict: 'today' }) };
  });

/** What flows into a node and what it adds, less what flows out of it; the weight itself passes on the whole. */
function imbalance(chain: DrawnChain, uid: string): number {
  const sum = (end: 'childUid' | 'parentUid') =>
    chain.links.filter((link) => link[end] === uid).reduce((total, link) => total + link.flow!, 0);
  const node = chain.nodes.find((one) => one.uid === uid)!;
  const local = node.type === 'source' ? 0 : node.localShare!;
  return sum('childUid') + local - (uid === chain.focusUid ? 1 : sum('parentUid'));
}

describe('a generated chain', () => {
  it('passes the contract of a reply', () => {
    expect(() => ChainResponse.parse(generatedChain({ plates: 300 }))).not.toThrow();
  });

  it('conserves its flow', () => {
    fc.assert(
      fc.property(chains, (chain) => {
        for (const node of chain.nodes) {
          if (node.type !== 'source') expect(imbalance(chain, node.uid)).toBeCloseTo(0, 9);
        }
      }),
      RUNS,
    );
  });
});

describe('folded chain', () => {
  it('conserves its flow in groups as in plates, opened or not', () => {
    fc.assert(
      fc.property(folds, ({ folded }) => {
        for (const node of folded.nodes) {
          if (node.type !== 'source') expect(imbalance(folded, node.uid)).toBeCloseTo(0, 9);
        }
      }),
      RUNS,
    );
  });

  it('has no circle: every link leads to a higher tier', () => {
    fc.assert(
      fc.property(folds, ({ folded }) => {
        const tiers = new Map(folded.nodes.map((node) => [node.uid, node.tier]));
        for (const link of folded.links)
          expect(tiers.get(link.parentUid)!).toBeGreaterThan(tiers.get(link.childUid)!);
      }),
      RUNS,
    );
  });

  it('loses no value and no link', () => {
    fc.assert(
      fc.property(folds, ({ whole, folded }) => {
        const values = folded.nodes.flatMap((node) => (node.type === 'group' ? node.members : node.uid));
        const absorbed = whole.nodes.filter((node) => node.type === 'source' && !values.includes(node.uid));
        expect(values.length + absorbed.length).toBe(whole.nodes.length);
        const links = [
          ...folded.links.flatMap((link) => link.of),
          ...folded.nodes.flatMap((node) => (node.type === 'group' ? node.innerLinks : [])),
        ];
        expect(links.toSorted()).toEqual(whole.links.flatMap((link) => link.of).toSorted());
      }),
      RUNS,
    );
  });

  it('keeps the weight itself and opened groups plate by plate', () => {
    fc.assert(
      fc.property(folds, ({ folded, opened }) => {
        expect(folded.nodes.some((node) => node.uid === folded.focusUid && node.type === 'value')).toBe(true);
        expect(folded.nodes.some((node) => opened.has(node.uid))).toBe(false);
      }),
      RUNS,
    );
  });

  it('is laid out without a lane over a plate, ports as wide as the flow, and narrow', () => {
    fc.assert(
      fc.property(folds, ({ folded }) => {
        const input = layoutInput(folded, 'flow');
        const { plates, lanes, ribbons, width } = layoutChain(input);
        // Counted, not expected one by one: there are thousands of pairs.
        const met = plates.flatMap((plate) =>
          lanes.filter(
            (lane) => lane.top === plate.y && lane.x + lane.width > plate.x && lane.x < plate.x + PLATE.width,
          ),
        );
        expect(met).toEqual([]);
        for (const plate of plates) {
          const entering = ribbons.filter((ribbon) => ribbon.child === plate.id);
          const drawn = entering.reduce((sum, ribbon) => sum + ribbon.width, 0);
          const flows = input.links
            .filter((link) => link.child === plate.id)
            .map(({ flow }) => Math.abs(flow!));
          const wanted = flows.reduce((sum, flow) => sum + Math.max(1, flow * SCALE), 0);
          expect(drawn).toBeCloseTo(wanted, 6);
        }
        const needs = [...new Set(plates.map((plate) => plate.y))].map(
          (top) =>
            plates.filter((plate) => plate.y === top).length * (PLATE.width + 66 + GAP.between) +
            lanes.filter((lane) => lane.top === top).reduce((sum, lane) => sum + lane.width + GAP.between, 0),
        );
        expect(width).toBeLessThanOrEqual(2.5 * Math.max(...needs));
      }),
      LAYOUT_RUNS,
    );
  });

  it('makes two groups of a laboratory that the chain leaves and comes back to', () => {
    const answer = generatedChain({ plates: 8, tierWidth: 1 });
    const values = answer.nodes.filter((node) => node.type === 'value');
    const [focus, ...above] = values;
    const issuerOf = ['A', 'A', 'B', 'B', 'A', 'A'];
    const nodes = [
      focus!,
      ...above.slice(0, 6).map((node, index) => ({
        ...node,
        rootKind: null,
        issuer: { ...node.issuer, code: issuerOf[index]! },
      })),
    ];
    const links = nodes.slice(1).map((node, index) => ({
      ...answer.links[0]!,
      childUid: nodes[index]!.uid,
      parentUid: node.uid,
    }));
    const folded = foldChain(drawnWhole({ ...answer, nodes, links }), {
      by: 'laboratory',
      opened: new Set(),
      verdict: 'today',
    });
    expect(folded.nodes.map((node) => node.uid)).toEqual([focus!.uid, 'A__1', 'B__2', 'A__3']);
  });

  it('goes by the laboratory that a plate names: who holds the weight, where that is told', () => {
    const answer = generatedChain({ plates: 8, tierWidth: 1 });
    const values = answer.nodes.filter((node) => node.type === 'value').slice(0, 5);
    const nodes = values.map((node, index) => ({
      ...node,
      rootKind: null,
      issuer: { ...node.issuer, code: 'A', name: 'Issuer' },
      holder: index > 2 ? { ...node.issuer, code: 'H', name: 'Holder' } : null,
    }));
    const links = nodes.slice(1).map((node, index) => ({
      ...answer.links[0]!,
      childUid: nodes[index]!.uid,
      parentUid: node.uid,
    }));
    const fold = { by: 'laboratory', opened: new Set<string>(), verdict: 'today' } as const;
    const folded = foldChain(drawnWhole({ ...answer, nodes, links }), fold);
    expect(folded.nodes.flatMap((node) => (node.type === 'group' ? [node.laboratory.name] : []))).toEqual([
      'Issuer',
      'Holder',
    ]);
  });
});

describe('a chain as it is drawn', () => {
  const question = { draw: 'flow', verdict: 'today', effects: 'all' } as const;

  it('is folded unasked above 300 plates, and its groups open in place', () => {
    expect(asDrawn(generatedChain({ plates: 300 }), question).foldedBy).toBeNull();
    const large = generatedChain({ plates: 700 });
    const folded = asDrawn(large, question);
    expect(folded.foldedBy).toBe('laboratory, class and nominal');
    expect(folded.chain.nodes.length).toBeLessThan(300);
    const group = folded.chain.nodes.find((node) => node.type === 'group')!;
    const opened = asDrawn(large, { ...question, open: group.uid });
    expect(opened.opened.has(group.uid)).toBe(true);
    expect(opened.chain.nodes.length).toBe(folded.chain.nodes.length + group.members.length - 1);
  });

  it('leaves out what is sound, but for the way from what fails down to the weight', () => {
    const answer = generatedChain({ plates: 120, seed: 5 });
    const { chain, soundLeftOut } = asDrawn(answer, { ...question, only: 'fails' });
    const failing = answer.links.filter((link) => link.today === 'broken' || link.today === 'caution');
    expect(failing.length).toBeGreaterThan(0);
    const drawn = new Set(chain.links.flatMap((link) => link.of));
    for (const link of failing) expect(drawn.has(`${link.childUid}.${link.parentUid}`)).toBe(true);
    expect(soundLeftOut).toBeGreaterThan(0);
    const tiers = new Set(chain.nodes.map((node) => node.tier));
    expect([...tiers].toSorted((a, b) => a - b)).toEqual([...tiers.keys()].map((_, index) => index));
    for (const node of chain.nodes) {
      const isLeanedOn = chain.links.some((link) => link.parentUid === node.uid);
      expect(isLeanedOn || node.uid === chain.focusUid).toBe(true);
    }
  });

  it('joins a second weight: what both lean on is shared, its own part has no flow', () => {
    const answer = generatedChain({ plates: 30 });
    const [, second] = answer.nodes;
    const other = { ...generatedChain({ plates: 30, seed: 3 }) };
    const renamed = (uid: string) => (uid === other.focusUid ? 'other' : uid);
    const moved = {
      ...other,
      focusUid: 'other',
      nodes: other.nodes.slice(0, 12).map((node) => ({ ...node, uid: renamed(node.uid) })),
      links: [{ ...other.links[0]!, childUid: 'other', parentUid: second!.uid }],
    };
    const { chain } = asDrawn(answer, question, moved);
    expect(chain.second!.shared.has(second!.uid)).toBe(true);
    expect(chain.second!.beside).toEqual(new Set(['other']));
    expect(chain.links.find((link) => link.childUid === 'other')!.flow).toBeNull();
  });
});

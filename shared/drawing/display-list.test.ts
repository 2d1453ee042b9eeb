import { describe, expect, it } from 'vitest';
import { asDrawn } from './as-drawn.ts';
import { displayList, type DisplayList, type Marks } from './display-list.ts';
import { generatedChain } from './generated-chain.ts';
import { layoutInput } from './layout-of.ts';
import { layoutChain } from './layout.ts';
import { legendOf } from './legend.ts';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { textWidth } from './text-width.ts';

const question = { draw: 'flow', verdict: 'today', effects: 'all' } as const;

function drawn(answer: ChainResponse, marks?: Marks): DisplayList {
  const { chain } = asDrawn(answer, question);
  return displayList(chain, layoutChain(layoutInput(chain, 'flow')), question, marks);
}

/** A small chain whose first links are as told. */
function chainWith(change: Partial<ChainResponse['links'][number]>): ChainResponse {
  const answer = generatedChain({ plates: 11 });
  const links = answer.links.map((link, index) => (index === 0 ? { ...link, ...change } : link));
  return { ...answer, links };
}

describe('display list', () => {
  it('opens a broken link in its middle', () => {
    const [broken] = drawn(chainWith({ today: 'broken', flow: 0.4 })).ribbons;
    expect(broken!.strokes).toHaveLength(2);
    const ends = broken!.strokes.flatMap((d) => numbers(d));
    const distances = ends.map(({ x, y }) => Math.hypot(x - broken!.middle.x, y - broken!.middle.y));
    // Control points of the pieces lie beyond the opening as their ends do.
    expect(Math.min(...distances)).toBeGreaterThan(7);
  });

  it('hatches a link that warns and outlines a negative flow', () => {
    const [warned] = drawn(chainWith({ today: 'caution', flow: 0.4 })).ribbons;
    expect(warned!.hatching!.split('M').length).toBeGreaterThan(5);
    const [negative] = drawn(chainWith({ flow: -0.4 })).ribbons;
    expect(negative).toMatchObject({ look: 'negative', isNegative: true });
    expect(negative!.outline).not.toBeNull();
  });

  it('draws an unknown own part hatched, and says so in the legend', () => {
    const answer = generatedChain({ plates: 11 });
    const nodes = answer.nodes.map((node, index) =>
      index === 0 && node.type === 'value' ? { ...node, localShare: null } : node,
    );
    const list = drawn({ ...answer, nodes });
    expect(list.plates[0]!.stub).toMatchObject({ look: 'unknown', share: null });
    expect(list.plates[0]!.stub!.hatching).not.toBe('');
    expect(legendOf(list).map(({ sign }) => sign)).toContain('unknown part');
  });

  it('names a loose end, and none at a recognized stop', () => {
    const answer = generatedChain({ plates: 11 });
    expect(drawn(answer).plates.every((plate) => plate.looseEnd === null)).toBe(true);
    const nodes = answer.nodes.map((node) => (node.type === 'value' ? { ...node, rootKind: null } : node));
    const ends = drawn({ ...answer, nodes }).plates.filter((plate) => plate.looseEnd !== null);
    expect(ends.length).toBeGreaterThan(0);
    for (const { node } of ends) expect(answer.links.some((link) => link.childUid === node.uid)).toBe(false);
  });

  it('marks what is to be noticed, also inside a group', () => {
    const answer = generatedChain({ plates: 40 });
    const { chain } = asDrawn(answer, { ...question, fold: 'laboratory' });
    const group = chain.nodes.find((node) => node.type === 'group')!;
    const marks = new Map([[group.members[1]!, 'replaced']]);
    const list = displayList(chain, layoutChain(layoutInput(chain, 'flow')), question, marks);
    expect(list.plates.find((plate) => plate.id === group.uid)!.mark).toBe('replaced');
  });

  it('sets no label on another', () => {
    const list = drawn(generatedChain({ plates: 60 }));
    const boxes = list.ribbons.flatMap(({ label }) => {
      if (!label) return [];
      const width = textWidth(label.text, 'mono', 12);
      return [{ left: label.anchor === 'start' ? label.x : label.x - width / 2, width, y: label.y }];
    });
    expect(boxes.length).toBeGreaterThan(5);
    for (const [index, a] of boxes.entries())
      for (const b of boxes.slice(index + 1))
        expect(a.left + a.width <= b.left || b.left + b.width <= a.left || Math.abs(a.y - b.y) >= 15).toBe(
          true,
        );
  });
});

/** The points of an SVG path. */
function numbers(d: string): { x: number; y: number }[] {
  return [...d.matchAll(/(-?[\d.]+),(-?[\d.]+)/g)].map(([, x, y]) => ({ x: Number(x), y: Number(y) }));
}

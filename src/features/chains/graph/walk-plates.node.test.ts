import { describe, expect, it } from 'vitest';
import { asDrawn } from '#shared/drawing/as-drawn.ts';
import { displayList, type DisplayList } from '#shared/drawing/display-list.ts';
import { generatedChain } from '#shared/drawing/generated-chain.ts';
import { layoutInput } from '#shared/drawing/layout-of.ts';
import { layoutChain } from '#shared/drawing/layout.ts';
import { transformBetween } from './glide.ts';
import { closeGroup, openGroup } from './opened-groups.ts';
import { plateFrom } from './walk-plates.ts';

const question = { draw: 'flow', verdict: 'today', effects: 'all' } as const;

function listOf(seed: number): DisplayList {
  const { chain } = asDrawn(generatedChain({ plates: 40, seed }), question);
  return displayList(chain, layoutChain(layoutInput(chain, 'flow')), question);
}

describe('walk along the plates', () => {
  const list = listOf(2);
  const focus = list.plates.find((plate) => plate.isFocus)!.id;

  it('leads up along the widest link to a value, and to the end of the chain', () => {
    let here = focus;
    for (let next = plateFrom(list, here, 'ArrowUp'); next; next = plateFrom(list, here, 'ArrowUp')) {
      const ways = list.ribbons.filter(({ link }) => link.childUid === here && link.role === 'reference');
      const taken = ways.find(({ link }) => link.parentUid === next);
      if (ways.length > 0) expect(taken!.width).toBe(Math.max(...ways.map(({ width }) => width)));
      here = next;
    }
    expect(here).not.toBe(focus);
    expect(list.ribbons.some(({ link }) => link.childUid === here)).toBe(false);
    expect(plateFrom(list, here, 'Home')).toBe(focus);
  });

  it('reaches every plate with up, and sideways within a tier', () => {
    const reached = new Set([focus]);
    for (const from of reached)
      for (const key of ['ArrowUp', 'ArrowLeft', 'ArrowRight']) {
        const to = plateFrom(list, from, key);
        if (to) reached.add(to);
      }
    expect(reached.size).toBe(list.plates.length);
  });

  it('leads nowhere for another key, or from the weight downwards', () => {
    expect(plateFrom(list, focus, 'ArrowDown')).toBeNull();
    expect(plateFrom(list, focus, 'a')).toBeNull();
  });
});

describe('glide of a ribbon', () => {
  it('begins with its ends where the former ribbon had them', () => {
    const [before, after] = [listOf(2), listOf(2)];
    const from = before.ribbons.find(({ ends }) => Math.abs(ends[0].x - ends[1].x) > 80)!;
    const to = after.ribbons.find(({ id }) => id === from.id)!;
    const moved = {
      ...from,
      ends: from.ends.map(({ x, y }) => ({ x: x * 1.1 + 30, y: y - 12 })) as typeof from.ends,
    };
    const transform = transformBetween(moved, to, (point) => point, 1)!;
    const [a, , , d, e, f] = transform.slice(7, -1).split(', ').map(Number) as [
      number,
      number,
      number,
      number,
      number,
      number,
    ];
    for (const end of [0, 1] as const) {
      expect(a * to.ends[end].x + e).toBeCloseTo(moved.ends[end].x, 0);
      expect(d * to.ends[end].y + f).toBeCloseTo(moved.ends[end].y, 0);
    }
  });
});

describe('groups opened in place', () => {
  it('are kept in the address once each, and leave it with the last', () => {
    expect(openGroup(openGroup(undefined, 'a'), 'a')).toBe('a');
    expect(closeGroup('a,b', 'a')).toBe('b');
    expect(closeGroup('b', 'b')).toBeUndefined();
  });
});

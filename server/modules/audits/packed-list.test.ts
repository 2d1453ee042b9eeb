import { expect, it } from 'vitest';
import { PackedList, unpacked } from './packed-list.ts';

it('gives back what was added, in order and in blocks', () => {
  const list = new PackedList<{ at: number; text: string }>(3);
  const places = [0, 1, 2, 3, 4, 5, 6].map((at) => list.add({ at, text: `item ${at}, µ` }));
  expect(places).toEqual([0, 1, 2, 3, 4, 5, 6]);
  expect(list.length).toBe(7);
  const blocks = [...list.blocks()];
  expect(blocks.map((block) => block.length)).toEqual([3, 3, 1]);
  expect(blocks.flat().map((item) => item.at)).toEqual(places);
  expect(unpacked<{ text: string }>(list.packed()[2]!)[0]!.text).toBe('item 6, µ');
});

it('holds nothing where nothing was added', () => {
  expect([...new PackedList<number>(2).blocks()]).toEqual([]);
});

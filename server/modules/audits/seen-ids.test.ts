import { expect, it } from 'vitest';
import { SeenIds } from './seen-ids.ts';

it('says once of each id that it is new, far beyond its first size', () => {
  const seen = new SeenIds();
  const ids = [0, 1, 7, 8, 9, 524_287, 524_288, 9_000_001];
  expect(ids.map((id) => seen.add(id))).toEqual(ids.map(() => true));
  expect(ids.map((id) => seen.add(id))).toEqual(ids.map(() => false));
  expect(seen.add(2)).toBe(true);
});

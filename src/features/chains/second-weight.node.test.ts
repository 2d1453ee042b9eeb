import { expect, it } from 'vitest';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { isPracticallyNone, secondChosen } from './second-weight.ts';

const value = (uid: string, tier: number, standardId = uid) => ({
  type: 'value',
  uid,
  tier,
  standardId,
  registryNo: uid,
  quantity: 'mass',
});
const chain = (...nodes: object[]) =>
  ({ focusUid: (nodes[0] as { uid: string }).uid, nodes, links: [] }) as unknown as ChainResponse;

it('names the value chosen, the one of the same weight in this chain, and what is shared, the nearest first', () => {
  const shared = ['s4', 's3', 's2', 's1'].map((uid) => value(uid, Number(uid[1])));
  const effect = { type: 'source', uid: 'effect', tier: 1, name: 'Volume', kind: 'volume' };
  const first = chain(value('focus', 0), value('old', 1, 'weight'), effect, ...shared);
  const second = chain(value('new', 0, 'weight'), effect, ...shared);
  const found = secondChosen(first, second)!;
  expect(found.chosen.uid).toBe('new');
  expect(found.inThisChain.map(({ uid }) => uid)).toEqual(['old']);
  expect(found.shared).toEqual(['s1', 's2', 's3']);
  expect(found.more).toBe(2);
  expect(secondChosen(first, chain(value('other', 0)))).toMatchObject({
    inThisChain: [],
    shared: [],
    more: 0,
  });
});

it('takes a correlation below the digits shown, of either sign, as practically none', () => {
  expect([0.0004, -0.0004, 0].map(isPracticallyNone)).toEqual([true, true, true]);
  expect([0.0005, -0.2, null].map(isPracticallyNone)).toEqual([false, false, false]);
});

import { describe, expect, it } from 'vitest';
import type { Notice } from '#shared/notices/notice.ts';
import { chainNumbers } from './chain-numbers.ts';
import type { Closure } from './chain-store.ts';
import { noticeShifts, withNotices } from './noticed-closure.ts';
import type { StoredLink, StoredValue } from './stored.ts';

const NOTICE: Notice = {
  id: 'notice',
  number: 'N 1',
  title: 'A correction',
  issuerId: 'institute',
  fromScale: 'first',
  toScale: 'second',
  effectiveOn: '2025-01-01',
  madeKnownOn: '2024-11-01',
  recordedAt: '2024-11-01T09:00:00.000000Z',
  replacesId: null,
  terms: [
    {
      quantity: null,
      performedFrom: null,
      performedTo: '2024-12-31',
      nominalFrom: null,
      nominalTo: null,
      addedU: 0.00002,
      shifts: [{ on: '2020-01-01', shift: '-0.000007' }],
    },
  ],
};

const link = (parentId: number, sensitivity: number, changes: Partial<StoredLink> = {}): StoredLink => ({
  parentId,
  role: 'reference',
  sensitivity,
  usedBegin: '2024-06-01',
  usedEnd: '2024-06-01',
  usedAs: 'certificate',
  usedDeviation: null,
  usedExpandedU: null,
  usedK: null,
  ...changes,
});
const value = (id: number, issuerId: string, nominal: string, parents: StoredLink[]) =>
  ({
    id,
    uid: `v${id}`,
    issuerId,
    nominal,
    quantity: 'mass',
    performedEnd: '2024-03-01',
    scaleVersion: 'first',
    localU: 0.00001,
    localDegreesOfFreedom: null,
    localEstimate: null,
    groupId: null,
    class: 'E2',
    parents,
    sources: [],
  }) as unknown as StoredValue;
const closureOf = (...values: StoredValue[]): Closure => ({ values, sources: new Map(), groups: new Map() });

/** Kilogram and working standard of the institute; a set of a laboratory, and 100 g below it. */
const chain = (last: Partial<StoredLink> = {}) =>
  closureOf(
    value(1, 'institute', '1000', []),
    value(2, 'institute', '1000', [link(1, 1)]),
    value(3, 'laboratory', '500', [link(2, 0.5)]),
    value(4, 'laboratory', '100', [link(3, 0.2, last)]),
  );
const shiftsOf = (closure: Closure) =>
  Object.fromEntries(
    [...noticeShifts(closure, [NOTICE])].map(([uid, [effect]]) => [uid, [effect!.shift, effect!.u]]),
  );

describe('withNotices', () => {
  it('gives the closure itself where no notice touches it: it costs nothing', () => {
    const closure = chain();
    expect(withNotices(closure, [])).toBe(closure);
    expect(withNotices(closure, [{ ...NOTICE, issuerId: 'another institute' }])).toBe(closure);
    expect(withNotices(closure, [{ ...NOTICE, fromScale: 'third' }])).toBe(closure);
  });

  it('leaves the closure as it was, and adds one source on the oldest covered value', () => {
    const closure = chain();
    const noticed = withNotices(closure, [NOTICE]);
    expect(closure.sources.size).toBe(0);
    expect(closure.values.every(({ sources }) => sources.length === 0)).toBe(true);
    const [source] = [...noticed.sources.values()];
    expect(source).toMatchObject({
      uid: 'notice',
      kind: 'scale version',
      name: 'N 1, A correction',
      u: 0.00002,
    });
    expect(noticed.values.map(({ sources }) => sources.map(({ sensitivity }) => sensitivity))).toEqual([
      [1],
      [],
      [],
      [],
    ]);
  });

  it('makes u grow by the added u times the mass over 1 kg, at any depth, and what is carried by nothing', () => {
    const closure = chain();
    const noticed = withNotices(closure, [NOTICE]);
    const numbers = chainNumbers(closure, 'v4', noticed);
    closure.values.forEach((each) => {
      const kilograms = Number(each.nominal) / 1000;
      const gained = numbers.variance(each.uid)! - numbers.varianceAsCertified(each.uid)!;
      expect(Math.sqrt(gained) / kilograms).toBeCloseTo(0.00002, 12);
      const bare = chainNumbers(closure, 'v4').carried(each).variance;
      expect(numbers.carried(noticed.values.find(({ id }) => id === each.id)!).variance).toBe(bare);
    });
  });
});

describe('noticeShifts', () => {
  it('are in proportion to mass, through links only', () => {
    const shifts = shiftsOf(chain());
    expect(shifts.v1).toEqual([-0.000007, 0.00002]);
    expect(shifts.v3![0]).toBeCloseTo(-0.0000035, 15);
    expect(shifts.v4![0]).toBeCloseTo(-0.0000007, 15);
    expect(shifts.v4![1]).toBeCloseTo(0.000002, 15);
  });

  it('do not pass a link that used the corrected value, while the uncertainty does', () => {
    const used = { usedAs: 'by notice' as const, usedBegin: '2025-02-01', usedEnd: '2025-02-01' };
    const shifts = shiftsOf(chain(used));
    expect(shifts.v4![0]).toBe(0);
    expect(shifts.v4![1]).toBeCloseTo(0.000002, 15);
    // Used by notice, but by those of before.
    const early = shiftsOf(chain({ ...used, usedBegin: '2024-12-31', usedEnd: '2024-12-31' }));
    expect(early.v4![0]).toBeCloseTo(-0.0000007, 15);
  });

  it('do not pass a class limit, neither of the two', () => {
    expect(shiftsOf(chain({ usedAs: 'class limit' })).v4).toBeUndefined();
  });
});

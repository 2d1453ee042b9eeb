import { describe, expect, it } from 'vitest';
import { readAsNowKnown } from './chain-now.ts';
import type { Closure } from './chain-store.ts';
import type { Fate } from './fate.ts';
import type { StoredLink, StoredValue } from './stored.ts';

const link = (parentId: number, sensitivity: number, more: Partial<StoredLink> = {}): StoredLink => ({
  parentId,
  role: 'reference',
  sensitivity,
  usedBegin: '2020-01-01',
  usedEnd: '2020-01-01',
  usedAs: 'certificate',
  usedDeviation: null,
  usedExpandedU: null,
  usedK: null,
  ...more,
});

const value = (id: number, parents: StoredLink[], more: Partial<StoredValue> = {}) =>
  ({
    id,
    uid: `v${id}`,
    registryNo: `R-${id}`,
    certificateNo: `C-${id}`,
    revisionN: 1,
    nominal: '1000',
    class: null,
    deviation: '0',
    expandedU: '0.0002',
    k: '2',
    scaleVersion: null,
    localU: 1e-4,
    localDegreesOfFreedom: null,
    localEstimate: null,
    groupId: null,
    parents,
    sources: [],
    ...more,
  }) as unknown as StoredValue;

function closureOf(values: StoredValue[]): Closure {
  return { values, sources: new Map(), groups: new Map() };
}

function read(values: StoredValue[], fates: [number, Fate][], focusId = values.at(-1)!.id) {
  const focus = values.find(({ id }) => id === focusId)!;
  return readAsNowKnown(closureOf(values), focus, {
    closure: closureOf(values),
    fates: new Map(fates),
    ownEnd: null,
  });
}

const by = (byId: number): Fate => ({ kind: 'replaced', byId });

/** Numbers in [0, 1), the same every time (mulberry32, public domain). */
function draws(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** A random chain: each value leans on up to three earlier ones; some were superseded, some of these twice. */
function randomChain(seed: number): { values: StoredValue[]; fates: [number, Fate][] } {
  const draw = draws(seed);
  const values: StoredValue[] = [];
  const fates: [number, Fate][] = [];
  const references = (before: number[]) =>
    before
      .toSorted(() => draw() - 0.5)
      .slice(0, Math.floor(draw() * 4))
      .map((parentId) => link(parentId, 0.2 + draw()));
  const issue = (before: number[]) => {
    const id = values.length;
    const deviation = (Math.floor(draw() * 2000) - 1000) / 1e6;
    values.push(value(id, references(before), { deviation: deviation.toFixed(6), localU: draw() / 1e4 }));
    return id;
  };
  const first: number[] = [];
  while (first.length < 10) {
    // What is issued later may lean on first issues or on what has superseded them.
    const id = issue(values.map((each) => each.id).filter(() => draw() < 0.8));
    first.push(id);
    if (draw() < 0.4) {
      const again = issue(first.slice(0, -1));
      fates.push([id, by(again)]);
      if (draw() < 0.3) {
        const thrice = issue(first.slice(0, -1));
        fates.splice(-1, 1, [id, by(thrice)], [again, by(thrice)]);
      }
    }
  }
  values.push(value(values.length, [link(first.at(-1)!, 1), link(first.at(-2)!, 0.7)]));
  return { values, fates };
}

/** The same by matrices: every link to a superseded value as a link to its successor plus their difference. */
function byMatrices(values: StoredValue[], fates: [number, Fate][]) {
  const n = values.length;
  const place = new Map(values.map(({ id }, at) => [id, at]));
  const successor = new Map(
    fates.flatMap(([id, fate]) => (fate.kind === 'replaced' ? [[id, fate.byId]] : [])),
  );
  const links = values.map(() => new Array<number>(n).fill(0));
  const steps = new Array<number>(n).fill(0);
  values.forEach((each, row) => {
    for (const { parentId, sensitivity } of each.parents) {
      const seen = place.get(successor.get(parentId) ?? parentId)!;
      links[row]![seen]! += sensitivity;
      steps[row]! +=
        sensitivity * (Number(values[seen]!.deviation) - Number(values[place.get(parentId)!]!.deviation));
    }
  });
  // (I - C)^-1 = I + C + C^2 + ..., which ends: no value leans on itself.
  const total = Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => Number(i === j)));
  let power = total.map((row) => [...row]);
  for (let step = 0; step < n; step += 1) {
    power = power.map((row) =>
      row.map((_, j) => row.reduce((sum, cell, k) => sum + cell * links[k]![j]!, 0)),
    );
    power.forEach((row, i) => row.forEach((cell, j) => (total[i]![j]! += cell)));
  }
  const focus = total[n - 1]!;
  return {
    shift: focus.reduce((sum, gain, at) => sum + gain * steps[at]!, 0),
    variance: focus.reduce((sum, gain, at) => sum + (gain * (values[at]!.localU ?? 0)) ** 2, 0),
  };
}

describe('a chain as now known against matrices, on random chains', () => {
  const SEEDS = Array.from({ length: 60 }, (_, at) => at + 1);

  it.each(SEEDS)('moves as far and is as uncertain (seed %i)', (seed) => {
    const { values, fates } = randomChain(seed);
    const expected = byMatrices(values, fates);
    const now = read(values, fates);
    const scale = Math.max(1e-3, Math.abs(expected.shift));
    expect(Math.abs(now.focus.shift!.toNumber() - expected.shift)).toBeLessThan(1e-12 * scale);
    const u = now.numbers!.propagation.standardUncertainty!;
    expect(u ** 2 / expected.variance).toBeCloseTo(1, 11);
    const parts = now.replaced.reduce((sum, { shift }) => sum + shift!.toNumber(), 0);
    expect(Math.abs(parts - expected.shift)).toBeLessThan(1e-12 * scale);
  });

  it('has chains among them that move, and chains with a twice replaced value', () => {
    const shifts = SEEDS.map((seed) => {
      const { values, fates } = randomChain(seed);
      return Math.abs(byMatrices(values, fates).shift);
    });
    expect(shifts.filter((shift) => shift > 1e-5).length).toBeGreaterThan(30);
    expect(
      SEEDS.some(
        (seed) =>
          new Set(randomChain(seed).fates.map(([, fate]) => JSON.stringify(fate))).size <
          randomChain(seed).fates.length,
      ),
    ).toBe(true);
  });
});

describe('a chain as now known', () => {
  const root = value(1, [], { deviation: '0.0001' });
  const corrected = value(2, [], { deviation: '0.00025' });

  it('moves by the difference through the sensitivity, to the last digit', () => {
    const now = read([root, corrected, value(3, [link(1, 0.5)])], [[1, by(2)]]);
    expect(now.focus.shift!.toFixed()).toBe('0.000075');
    expect(now.closure.values.map(({ id }) => id)).toEqual([2, 3]);
  });

  it('counts of a replaced value its replacement only, not what was replaced above it', () => {
    const middle = value(3, [link(1, 1)], { deviation: '0.001' });
    const middleAgain = value(4, [link(2, 1)], { deviation: '0.00115' });
    const now = read(
      [root, corrected, middle, middleAgain, value(5, [link(3, 1)])],
      [
        [1, by(2)],
        [3, by(4)],
      ],
    );
    expect(now.focus.shift!.toFixed()).toBe('0.00015');
    expect(now.replaced.map(({ value: { id }, by: next }) => [id, next!.id])).toEqual([[3, 4]]);
  });

  it('moves nothing through a class limit while the reference keeps its class (F1: 5 mg at 1 kg)', () => {
    const used = value(1, [], { deviation: '0.001', class: 'F1' });
    const focus = value(3, [link(1, 1, { usedAs: 'class limit' })]);
    const within = read([used, value(2, [], { deviation: '0.005' }), focus], [[1, by(2)]]);
    expect(within.focus).toMatchObject({ because: null, isTouched: false });
    const outside = read([used, value(2, [], { deviation: '0.0051' }), focus], [[1, by(2)]]);
    expect(outside.focus).toMatchObject({
      shift: null,
      because: 'R-1, used by its class limit, lies outside it by certificate C-2',
    });
  });

  it('is not computable below a withdrawn certificate, and says which; beside it all stays computable', () => {
    const because = 'certificate C-1 for R-1 was withdrawn on 2024-05-02, and nothing has taken its place';
    const beside = value(4, [link(2, 1)]);
    const values = [root, corrected, value(3, [link(1, 1)]), beside, value(5, [link(3, 1), link(4, 1)])];
    const now = read(values, [[1, { kind: 'lost', because }]]);
    expect(now.focus).toMatchObject({ shift: null, because });
    expect(now.moves.of(beside)).toMatchObject({ because: null, isTouched: false });
    expect(now.numbers!.propagation).toMatchObject({ standardUncertainty: null, missing: ['v1'] });
    expect(now.replaced).toMatchObject([{ by: null, shift: null }]);
  });

  it('compares what was used by a notice with the successor on the newer scale as it was used', () => {
    const old = value(1, [], { deviation: '0.0001', scaleVersion: 'first' });
    const renewed = value(2, [], { deviation: '0.00009', scaleVersion: 'second' });
    const noticed = link(1, 1, { usedAs: 'by notice', usedDeviation: '0.000093' });
    const now = read([old, renewed, value(3, [noticed])], [[1, by(2)]]);
    expect(now.focus.shift!.toFixed()).toBe('-0.000003');
  });

  it('is touched, and moves by nothing, where only U changed; by words alone it is not touched', () => {
    const focus = value(3, [link(1, 1)]);
    const wider = read(
      [root, value(2, [], { deviation: '0.0001', expandedU: '0.0009' }), focus],
      [[1, by(2)]],
    );
    expect(wider.focus.isTouched).toBe(true);
    expect(wider.focus.shift!.isZero()).toBe(true);
    const reworded = read([root, value(2, [], { deviation: '0.0001' }), focus], [[1, by(2)]]);
    expect(reworded.focus.isTouched).toBe(false);
    expect(reworded.replaced.map(({ shift }) => shift!.toFixed())).toEqual(['0']);
  });

  it('says so where what took the place of a reference leans on what leaned on it, and draws the links as used', () => {
    const leaning = value(3, [link(1, 1)]);
    const circular = value(4, [link(3, 1)]);
    const now = read([root, leaning, circular, value(5, [link(3, 1)])], [[1, by(4)]]);
    expect(now.focus.shift).toBeNull();
    expect(now.focus.because).toMatch(/leans in turn/);
    expect(now.closure.values).toHaveLength(4);
  });
});

import { describe, expect, it } from 'vitest';
import { WORDS, type Consequence } from './what-if-word.ts';
import { bandOf, wordOfOthers } from './word-of-others.ts';

describe('bandOf', () => {
  it.each<[number, number, number]>([
    [0, 0, 0],
    [1, 0.5, 1],
    [1.01, 1, 2],
    [2e-5, 1e-5, 2e-5],
    [0.0000200001, 2e-5, 5e-5],
    [-7e-4, -5e-4, -1e-3],
    [1e6, 5e5, 1e6],
    [3e-13, 2e-13, 5e-13],
  ])('%d lies from %d to %d', (size, from, to) => {
    const band = bandOf(size);
    expect(band.from).toBeCloseTo(from, 18);
    expect(band.to).toBeCloseTo(to, 18);
  });

  it('gives no number for what cannot be computed', () => {
    expect(bandOf(NaN)).toEqual({ from: NaN, to: NaN });
  });
});

/** A value with u = U/2 that keeps its class up to a limit. */
function weight({ u = 1, deviation = 0, limit = 100 }) {
  const keeps = (shift: number, added: number) =>
    Math.abs(deviation + shift) + 2 * Math.sqrt(u * u + added) <= limit ? 'keeps' : 'does not keep';
  const at = (shift: number, added: number): Consequence => ({
    shift,
    expandedU: 2 * u,
    expandedUAfter: 2 * Math.sqrt(u * u + added),
    isRaised: added > 0,
    isLost: false,
    isBeyondLimit: false,
    before: keeps(0, 0),
    after: keeps(shift, added),
  });
  const others = (shift: number, addedU = 0) => WORDS[wordOfOthers({ shift, addedU, deviation }, at)]!;
  return { at, others };
}

describe('wordOfOthers', () => {
  it('turns at the ends of bands only, so that two U of one band read alike at every shift', () => {
    const shifts = Array.from({ length: 200 }, (_, at) => (at + 1) / 100);
    const words = (expandedU: number) => shifts.map((shift) => weight({ u: expandedU / 2 }).others(shift));
    expect(words(2.1)).toEqual(words(4.9));
    expect(words(2.1)).not.toEqual(words(5.1));
  });

  it('turns by bands for an added u and for a verdict alike', () => {
    const sizes = Array.from({ length: 300 }, (_, at) => (at + 1) / 10);
    const raised = (u: number) => sizes.map((size) => weight({ u }).others(0, size));
    expect(raised(2.3)).toEqual(raised(4.1));
    const lost = (deviation: number) => sizes.map((size) => weight({ deviation, limit: 22 }).others(size));
    expect(lost(1)).toEqual(lost(9));
  });

  it('is never weaker than what is true, in either direction', () => {
    const strength = (word: string) => WORDS.indexOf(word as (typeof WORDS)[number]);
    for (const deviation of [0, -3, 40, -130, 130]) {
      const { at, others } = weight({ u: 1.7, deviation, limit: 60 });
      for (let shift = -260; shift <= 260; shift += 0.7) {
        const { before, after } = at(shift, 0);
        const truth = before !== after ? 2 : Math.abs(shift) > 0.34 ? 1 : 0;
        expect(strength(others(shift)), `${deviation} ${shift}`).toBeGreaterThanOrEqual(truth);
      }
    }
  });

  it('says nothing of a change of nothing', () => {
    expect(weight({}).others(0, 0)).toBe('none');
  });
});

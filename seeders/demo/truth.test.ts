import { describe, expect, it } from 'vitest';
import { drawsFor } from './draws.ts';
import { drawTruth, trueDeviation } from './truth.ts';
import { makeWeight, trueValue } from './weight.ts';

describe('the true mass of a weight', () => {
  it('of a 1 kg E1 moves by a few micrograms a year', () => {
    for (let n = 0; n < 50; n += 1) {
      const truth = drawTruth(drawsFor(`weight ${n}`), 'E1', 0.0005, 0);
      const moved = trueDeviation(truth, '2026-01-01') - trueDeviation(truth, '2016-01-01');
      expect(Math.abs(moved)).toBeLessThan(10 * 5e-6);
    }
  });

  it('of an M1 wears on average', () => {
    const moves = Array.from({ length: 200 }, (_, n) => {
      const truth = drawTruth(drawsFor(`weight ${n}`), 'M1', 0.05, 0);
      return trueDeviation(truth, '2026-01-01');
    });
    expect(moves.reduce((sum, move) => sum + move, 0) / moves.length).toBeLessThan(0);
  });

  it('steps on the day of an adjustment', () => {
    const truth = drawTruth(drawsFor('stepped'), 'M1', 0.05, 0.01);
    const before = trueDeviation(truth, '2020-05-04');
    truth.steps.push({ from: '2020-05-04', by: -0.02 });
    expect(trueDeviation(truth, '2020-05-04')).toBeCloseTo(before - 0.02, 12);
    expect(trueDeviation(truth, '2020-05-03')).toBeGreaterThan(trueDeviation(truth, '2020-05-04'));
  });

  it('differs from the conventional mass by about 0.94 mg per kilogram at 7950 kg/m3', () => {
    const weight = makeWeight({
      registryNo: 'XX 0001',
      owner: 'OI',
      nominal: '1000',
      class: 'E1',
      inServiceFrom: '2016-01-01',
      density: { value: '7950', expandedU: '0.1', origin: 'measured' },
    });
    const gap =
      trueValue(weight, 'mass', '2020-01-01') - trueValue(weight, 'conventional mass', '2020-01-01');
    expect(gap * 1000).toBeCloseTo(0.943, 2);
  });
});

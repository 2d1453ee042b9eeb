import { describe, expect, it } from 'vitest';
import { buildUp, designEffects, drawErrors, solved, subdivision } from './weighing.ts';
import { drawsFor } from './draws.ts';
import { covarianceOf } from './effects.ts';

describe('the weighing designs of the network', () => {
  it('share out the kilogram by nominal', () => {
    const design = solved(subdivision());
    for (const [at, column] of design.columns.entries()) {
      if (column === 'R' || column === 'check') continue;
      const nominal = Number(column.replace('*', ''));
      expect(design.toRestraints[at]![0]! / (nominal / 1000)).toBeCloseTo(1, 9);
    }
  });

  it('build 20 kg up from both kilograms alike', () => {
    const design = solved(buildUp());
    const [a, b] = design.toRestraints[design.columns.indexOf('20000')]!;
    expect(a! + b!).toBeCloseTo(20, 9);
    expect(a! / b!).toBeCloseTo(1, 9);
  });

  it('draw errors with the covariance that their effects have', () => {
    const design = solved(subdivision());
    const draws = drawsFor('designs');
    const [one, other] = ['200', '200*'];
    let [square, product] = [0, 0];
    const times = 20_000;
    for (let n = 0; n < times; n += 1) {
      const errors = drawErrors(design, draws);
      square += errors.get(one)! ** 2;
      product += errors.get(one)! * errors.get(other)!;
    }
    const own = designEffects(design, one, '');
    const variance = covarianceOf(own, own);
    // Draws are cut at 2.2 standard deviations, which takes about a tenth off the variance.
    expect(square / times / variance).toBeGreaterThan(0.82);
    expect(square / times / variance).toBeLessThan(0.98);
    const covariance = covarianceOf(own, designEffects(design, other, ''));
    expect(Math.abs(product / times - covariance) / variance).toBeLessThan(0.12);
  });
});

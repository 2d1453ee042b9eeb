import { describe, expect, it } from 'vitest';
import { consensusValue } from './consensus-value.ts';
import { referenceValue } from './reference-value.ts';

describe('consensusValue', () => {
  // P02, KG-rule: CCM-TGPfD-kg, Calculation of the Consensus Value for the Kilogram 2020, 2023, 2026; second-hand copy, in ug.
  it.each([
    [[0, 12.4, -18.8], 0, -2.1333, -2],
    [[12.4, -18.8, -15.2], -2, -7.2, -7],
    [[-18.8, -15.2, -10.7], -7, -14.9, -12],
  ])('window %j after %d: mean %d, published %d', (window, previousPublished, mean, published) => {
    const found = consensusValue({
      window,
      previousPublished,
      limit: 5,
      agreedUncertainty: 20,
      resolution: 1,
    });
    expect(found.calculated).toBeCloseTo(mean, 3);
    expect(found.published).toBe(published);
    expect(found.standardUncertainty).toBe(20);
  });

  // The mean's own uncertainty, which the agreed 20 ug replaces: 6.0 printed in 2020, the others recomputed.
  it.each([
    [[0, 12.4, -18.8], [11.7, 11.4, 7.5], 5.991660871578097],
    [[12.4, -18.8, -15.2], [11.4, 8.1, 7.4], 5.273940125223687],
    [[-18.8, -15.2, -10.7], [8.1, 7.4, 6.4], 4.233858235174574],
  ])('the mean of %j has u = %j combined: %d', (values, uncertainties, u) => {
    expect(referenceValue({ values, uncertainties }, 'arithmetic-mean').standardUncertainty).toBeCloseTo(
      u,
      12,
    );
  });

  it('limits the change from the published value, not from the calculated one, in both directions (trap 18)', () => {
    const chained = consensusValue({
      window: [-14.9],
      previousPublished: -7,
      limit: 5,
      agreedUncertainty: 20,
    });
    expect(chained).toEqual({ calculated: -14.9, published: -12, standardUncertainty: 20 });
    expect(
      consensusValue({ window: [9], previousPublished: 1, limit: 5, agreedUncertainty: 20 }).published,
    ).toBe(6);
    expect(
      consensusValue({ window: [3.5], previousPublished: 1, limit: 5, agreedUncertainty: 20 }).published,
    ).toBe(3.5);
    expect(consensusValue({ window: [3.3], previousPublished: 1, limit: 5, agreedUncertainty: 20, resolution: 0.5 }).published).toBe(3.5); // prettier-ignore
  });

  it.each([
    [{ window: [] }, 'too-few-values', 'window'],
    [{ window: [NaN] }, 'not-finite', 'window[0]'],
    [{ previousPublished: NaN }, 'not-finite', 'previousPublished'],
    [{ limit: -1 }, 'out-of-range', 'limit'],
    [{ agreedUncertainty: -1 }, 'out-of-range', 'agreedUncertainty'],
    [{ resolution: 0 }, 'out-of-range', 'resolution'],
  ])('refuses %j', (wrong, code, field) => {
    const right = { window: [1], previousPublished: 0, limit: 5, agreedUncertainty: 20 };
    expect(() => consensusValue({ ...right, ...wrong })).toThrow(expect.objectContaining({ code, field }));
  });
});

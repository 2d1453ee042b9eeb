import { requireNumber } from '../quantity/domain.ts';
import { requireNumbers } from '../linear/requirements.ts';

/**
 * The consensus value of the kilogram after a key comparison of realizations: the unweighted mean of the results in
 * the window, its change from the value published before limited, and an uncertainty that is agreed, not computed.
 * Source: CCM detailed note on the dissemination process after the redefinition, 17th CCM 2019 (second-hand).
 * @param a.window results of the last comparisons, one unit throughout
 * @param a.previousPublished the value published before, as published
 * @param a.limit greatest change from it
 * @param a.resolution step to which the value is published; left out = not rounded
 * @throws EngineError `too-few-values`, `not-finite`, `out-of-range`
 */
export function consensusValue(a: {
  window: number[];
  previousPublished: number;
  limit: number;
  agreedUncertainty: number;
  resolution?: number;
}): { calculated: number; published: number; standardUncertainty: number } {
  requireNumbers(a.window, 'window');
  requireNumber(a.previousPublished, 'previousPublished');
  requireNumber(a.limit, 'limit', { min: 0 });
  requireNumber(a.agreedUncertainty, 'agreedUncertainty', { min: 0 });
  const calculated = a.window.reduce((sum, value) => sum + value, 0) / a.window.length;
  const change = calculated - a.previousPublished;
  const limited =
    Math.abs(change) <= a.limit ? calculated : a.previousPublished + Math.sign(change) * a.limit;
  const step =
    a.resolution === undefined ? undefined : requireNumber(a.resolution, 'resolution', { above: 0 });
  const published = step === undefined ? limited : Math.round(limited / step) * step;
  return { calculated, published, standardUncertainty: a.agreedUncertainty };
}

import { EngineError } from '../errors.ts';
import { requireNumber } from '../quantity/domain.ts';

/** A weighing with and without a small weight of known mass on the load. */
export type SensitivityWeighing = {
  /** Reading before and after the sensitivity weight was added. */
  readingWithout: number;
  readingWith: number;
  /** Mass of the sensitivity weight in mg, with its standard uncertainty. */
  mass: number;
  massUncertainty: number;
  /** Density of the sensitivity weight and of the air in kg/m3: the weight is buoyed up like any other. */
  density: number;
  airDensity: number;
  /** Standard uncertainty of the difference of the two readings, in units of reading. */
  readingUncertainty: number;
};

/**
 * Mass in mg for one unit of reading, from a small weight of known mass added to the load. Multiply differences
 * by it; its uncertainty counts in proportion to the difference, so it matters little near balance.
 * Source: OIML R 111-1:2004, C.6.4 (from memory).
 * @throws EngineError `out-of-range`, `not-finite`, `no-response`
 */
export function sensitivityFromWeight(a: SensitivityWeighing): {
  sensitivity: number;
  standardUncertainty: number;
} {
  requireNumber(a.readingWithout, 'readingWithout');
  requireNumber(a.readingWith, 'readingWith');
  requireNumber(a.mass, 'mass', { above: 0 });
  for (const field of ['massUncertainty', 'airDensity', 'readingUncertainty'] as const)
    requireNumber(a[field], field, { min: 0 });
  // A weight no denser than the air would float.
  requireNumber(a.density, 'density', { above: a.airDensity, unit: 'kg/m3' });
  const change = a.readingWith - a.readingWithout;
  if (change === 0) {
    throw new EngineError(
      'no-response',
      'readingWith',
      a.readingWith,
      'Another reading than without the weight is expected; the comparator did not answer.',
    );
  }
  const sensitivity = (a.mass * (1 - a.airDensity / a.density)) / change;
  const relative = Math.hypot(a.massUncertainty / a.mass, a.readingUncertainty / change);
  return { sensitivity, standardUncertainty: Math.abs(sensitivity) * relative };
}

import { EngineError } from '../errors.ts';
import { requireChoice, requireNumber } from '../quantity/domain.ts';

/** Distributions a half-width may be stated for. */
export const HALF_WIDTH_DISTRIBUTIONS = ['normal', 'rectangular', 'triangular', 'u-shaped'] as const;

/** Distribution a half-width is stated for. */
export type HalfWidthDistribution = (typeof HALF_WIDTH_DISTRIBUTIONS)[number];

/** What the half-width of a bounded distribution is divided by. */
const DIVISORS: Readonly<Record<Exclude<HalfWidthDistribution, 'normal'>, number>> = {
  rectangular: Math.sqrt(3),
  triangular: Math.sqrt(6),
  'u-shaped': Math.SQRT2,
};

/**
 * The standard uncertainty that a half-width stands for. A normal half-width is an expanded uncertainty and needs
 * its coverage factor; the others have none.
 *
 * Source: JCGM 100:2008, 4.3.3 (normal), 4.3.7 (rectangular), 4.3.9 (triangular); U-shaped (arc sine):
 * JCGM 101:2008, 6.4.6.
 *
 * @param a.halfWidth any unit, not negative
 * @param a.distribution its distribution
 * @param a.coverageFactor for `normal` only, more than zero
 * @returns in the unit of the half-width
 * @throws EngineError `unknown-choice`, `not-finite`, `out-of-range`, `missing-coverage-factor` or
 *   `needless-coverage-factor`
 */
export function standardUncertainty(a: {
  halfWidth: number;
  distribution: HalfWidthDistribution;
  coverageFactor?: number;
}): number {
  const halfWidth = requireNumber(a.halfWidth, 'halfWidth', { min: 0 });
  const distribution = requireChoice(a.distribution, 'distribution', HALF_WIDTH_DISTRIBUTIONS);
  if (distribution === 'normal') return halfWidth / requireFactor(a.coverageFactor);
  if (a.coverageFactor !== undefined) {
    throw new EngineError(
      'needless-coverage-factor',
      'coverageFactor',
      a.coverageFactor,
      `A ${distribution} half-width has no coverage factor. Leave it out, or choose normal.`,
    );
  }
  return halfWidth / DIVISORS[distribution];
}

function requireFactor(coverageFactor: number | undefined): number {
  if (coverageFactor === undefined) {
    throw new EngineError(
      'missing-coverage-factor',
      'coverageFactor',
      'nothing',
      'A normal half-width is an expanded uncertainty: give its coverage factor, 2 for most certificates.',
    );
  }
  return requireNumber(coverageFactor, 'coverageFactor', { above: 0 });
}

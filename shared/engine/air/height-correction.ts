import type { Decimal } from '#shared/decimal.ts';
import { requireDecimal, requireNumber } from '../quantity/domain.ts';

/** A correction to a weighing and how it changes with the height difference and the gradient. */
export interface HeightCorrection {
  /** To be added to the difference test minus reference, g. */
  correction: Decimal;
  /** Sensitivities of the correction. */
  sensitivities: {
    /** g per m. */
    heightDifference: number;
    /** g per 1/m. */
    relativeGradient: number;
  };
}

/**
 * The correction for centres of gravity at different heights: a weight whose centre lies higher is pulled less, so
 * the balance shows it too light by `m * gradient * height`.
 *
 * Source: JCGM GUM-6:2020, 6.7 (mass comparison; a gradient of -2.4e-7 per metre there).
 *
 * @param a.mass mass of either weight, g, more than zero
 * @param a.heightDifference centre of the test weight above that of the reference, m
 * @param a.relativeGradient (1/g) dg/dh at the balance, 1/m; negative, as gravity falls with height
 * @throws EngineError `not-finite` or `out-of-range`
 */
export function heightCorrection(a: {
  mass: Decimal;
  heightDifference: number;
  relativeGradient: number;
}): HeightCorrection {
  const mass = requireDecimal(a.mass, 'mass', 'positive');
  const height = requireNumber(a.heightDifference, 'heightDifference', { min: -2, max: 2, unit: 'm' });
  const gradient = requireNumber(a.relativeGradient, 'relativeGradient', { min: -1e-6, max: 1e-6 });
  const perMetre = mass.times(gradient).negated();
  return {
    correction: perMetre.times(height),
    sensitivities: {
      heightDifference: perMetre.toNumber(),
      relativeGradient: mass.times(height).negated().toNumber(),
    },
  };
}

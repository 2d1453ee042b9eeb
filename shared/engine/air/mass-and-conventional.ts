import { Decimal } from '#shared/decimal.ts';
import { EngineError } from '../errors.ts';
import { requireChoice, requireDecimal, requireNumber } from '../quantity/domain.ts';
import { AIR_DENSITY_BOUNDS, VOLUME_BOUNDS } from './buoyancy-correction.ts';
import {
  GRAM_PER_MILLIGRAM,
  MASS_KINDS,
  REFERENCE_AIR_DENSITY,
  REFERENCE_FACTOR,
  type MassKind,
} from './convention.ts';

/** Both values of one weight with the covariance they owe to the shared volume. */
export interface MassAndConventional {
  /** Mass, g. */
  mass: Decimal;
  /** Conventional mass, g. */
  conventional: Decimal;
  /** Covariance matrix in the order mass, conventional mass; g2. */
  covariance: [[number, number], [number, number]];
}

/** Room for rounding where an uncertainty consists of its volume part alone. */
const ROUNDING_ROOM = 1e-9;

/**
 * The value weighed in air carries `rho V` (mass) or `(rho - 1.2) V / 0.99985` (conventional mass), so the volume's
 * uncertainty is already in it; this is that factor, in g per cm3.
 */
function volumeFactor(kind: MassKind, airDensity: number): number {
  const air = new Decimal(airDensity);
  const factor = kind === 'mass' ? air : air.minus(REFERENCE_AIR_DENSITY).div(REFERENCE_FACTOR);
  return factor.times(GRAM_PER_MILLIGRAM).toNumber();
}

function requireEnough(standardUncertainty: number, volumePart: number): void {
  if (standardUncertainty >= volumePart * (1 - ROUNDING_ROOM)) return;
  throw new EngineError(
    'uncertainty-below-volume-part',
    'standardUncertainty',
    `${standardUncertainty} g`,
    `The volume alone brings ${volumePart} g. Give the whole uncertainty of the value, or the smaller uncertainty of the volume.`,
  );
}

/**
 * The mass and the conventional mass of a weight from one of them, with their covariance. The two differ by the
 * volume: `m = 0.99985 m_c + 1.2 V`. The value given was weighed in air, so it is itself correlated with the volume,
 * which is why an assumed density spoils the mass far more than the conventional mass.
 *
 * Source: OIML D 28:2004, clauses 4 and 5; JCGM 100:2008, 5.2 for the covariance.
 *
 * @param a.value value of the kind named, g, more than zero
 * @param a.kind whether the value is a mass or a conventional mass
 * @param a.standardUncertainty whole standard uncertainty of the value, its volume part included, g
 * @param a.volume volume at 20 degC, cm3
 * @param a.volumeUncertainty standard uncertainty of the volume, cm3
 * @param a.airDensity air density in which the value was found, kg/m3 (0 in a vacuum)
 * @throws EngineError `unknown-choice`, `not-finite`, `out-of-range`, or `uncertainty-below-volume-part`
 */
export function massAndConventional(a: {
  value: Decimal;
  kind: MassKind;
  standardUncertainty: number;
  volume: number;
  volumeUncertainty: number;
  airDensity: number;
}): MassAndConventional {
  const kind = requireChoice(a.kind, 'kind', MASS_KINDS);
  const value = requireDecimal(a.value, 'value', 'positive');
  const u = requireNumber(a.standardUncertainty, 'standardUncertainty', { min: 0, unit: 'g' });
  const uVolume = requireNumber(a.volumeUncertainty, 'volumeUncertainty', { min: 0, unit: 'cm3' });
  const volume = new Decimal(requireNumber(a.volume, 'volume', VOLUME_BOUNDS));
  const factor = volumeFactor(kind, requireNumber(a.airDensity, 'airDensity', AIR_DENSITY_BOUNDS));
  requireEnough(u, Math.abs(factor) * uVolume);

  const displaced = volume.times(REFERENCE_AIR_DENSITY).times(GRAM_PER_MILLIGRAM);
  const scale = kind === 'mass' ? 1 / REFERENCE_FACTOR.toNumber() : REFERENCE_FACTOR.toNumber();
  const perVolume = otherPerVolume(kind);
  const variance = u * u;
  // cov(value, V) = factor u2(V); the other value is scale * value + perVolume * V.
  const covarianceWithVolume = factor * uVolume * uVolume;
  const otherVariance =
    scale * scale * variance + 2 * scale * perVolume * covarianceWithVolume + (perVolume * uVolume) ** 2;
  const shared = scale * variance + perVolume * covarianceWithVolume;
  return kind === 'mass'
    ? {
        mass: value,
        conventional: value.minus(displaced).div(REFERENCE_FACTOR),
        covariance: [
          [variance, shared],
          [shared, otherVariance],
        ],
      }
    : {
        mass: value.times(REFERENCE_FACTOR).plus(displaced),
        conventional: value,
        covariance: [
          [otherVariance, shared],
          [shared, variance],
        ],
      };
}

/** How the value of the other kind changes with the volume at a fixed value of this kind, g per cm3. */
function otherPerVolume(kind: MassKind): number {
  const perVolume = REFERENCE_AIR_DENSITY.times(GRAM_PER_MILLIGRAM);
  return kind === 'mass' ? perVolume.negated().div(REFERENCE_FACTOR).toNumber() : perVolume.toNumber();
}

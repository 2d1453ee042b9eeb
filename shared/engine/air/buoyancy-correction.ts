import { Decimal } from '#shared/decimal.ts';
import { requireChoice, requireNumber } from '../quantity/domain.ts';
import { GRAM_PER_MILLIGRAM, MASS_KINDS, REFERENCE_AIR_DENSITY, type MassKind } from './convention.ts';

/** Bounds of a volume, cm3: a tonne of plastic is still inside. */
export const VOLUME_BOUNDS = { above: 0, max: 1e9, unit: 'cm3' } as const;

/** Bounds of an air density, kg/m3: zero is a vacuum. */
export const AIR_DENSITY_BOUNDS = { min: 0, max: 2, unit: 'kg/m3' } as const;

/** A buoyancy correction and how it changes with what it was computed from. */
export interface BuoyancyCorrection {
  /** To be added to the difference test minus reference that the balance shows, g. */
  correction: Decimal;
  /** Sensitivities of the correction. */
  sensitivities: {
    /** g per cm3. */
    referenceVolume: number;
    /** g per cm3. */
    testVolume: number;
    /** g per kg/m3. */
    airDensity: number;
  };
}

/**
 * The buoyancy correction of a comparison of two weights of the same nominal value: `rho (V_t - V_r)` for masses,
 * `(rho - 1.2) (V_t - V_r)` for conventional masses. Both values are of the one kind named; they are never mixed.
 *
 * Sources: OIML D 28:2004; A. Valcu, OIML Bulletin 2001, equation (1), for conventional masses. The factor 1.00015
 * between a balance's reading and a mass is left out, as it is there.
 *
 * @param a.kind kind of the reference's and the test weight's value
 * @param a.referenceVolume volume of the reference at the temperature of the weighing, cm3
 * @param a.testVolume volume of the test weight at that temperature, cm3
 * @param a.airDensity kg/m3
 * @throws EngineError `unknown-choice`, `not-finite` or `out-of-range`
 */
export function buoyancyCorrection(a: {
  kind: MassKind;
  referenceVolume: number;
  testVolume: number;
  airDensity: number;
}): BuoyancyCorrection {
  const kind = requireChoice(a.kind, 'kind', MASS_KINDS);
  const reference = new Decimal(requireNumber(a.referenceVolume, 'referenceVolume', VOLUME_BOUNDS));
  const test = new Decimal(requireNumber(a.testVolume, 'testVolume', VOLUME_BOUNDS));
  const air = new Decimal(requireNumber(a.airDensity, 'airDensity', AIR_DENSITY_BOUNDS));
  const effective = (kind === 'mass' ? air : air.minus(REFERENCE_AIR_DENSITY)).times(GRAM_PER_MILLIGRAM);
  const difference = test.minus(reference);
  return {
    correction: effective.times(difference),
    sensitivities: {
      referenceVolume: effective.negated().toNumber(),
      testVolume: effective.toNumber(),
      airDensity: difference.times(GRAM_PER_MILLIGRAM).toNumber(),
    },
  };
}

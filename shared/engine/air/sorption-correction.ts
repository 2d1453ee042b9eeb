import { Decimal } from '#shared/decimal.ts';
import { requireChoice, requireNumber } from '../quantity/domain.ts';

/** The two ways a weight goes between the conditions. */
export const TRANSFERS = ['vacuum-to-air', 'air-to-vacuum'] as const;

/** Way of a transfer. */
export type Transfer = (typeof TRANSFERS)[number];

/** A sorption correction and how it changes with the area and the coefficient. */
export interface SorptionCorrection {
  /** To be added to the mass found in the first condition, g. */
  correction: Decimal;
  /** Sensitivities of the correction. */
  sensitivities: {
    /** g per cm2. */
    surfaceArea: number;
    /** g per ug/cm2. */
    coefficient: number;
  };
}

const GRAM_PER_MICROGRAM = new Decimal('1e-6');

/**
 * The reversible change of mass of a weight between vacuum and air: in air it carries a film of water and gases, so
 * it is heavier by the coefficient times the area. Both come from the laboratory's own measurements.
 *
 * Source: definition of the surface sorption coefficient (common practice, no source).
 *
 * @param a.transfer from which condition to which
 * @param a.surfaceArea geometric area, cm2, more than zero
 * @param a.coefficient mass taken up in air per area, ug/cm2, -10 to 10
 * @throws EngineError `unknown-choice`, `not-finite` or `out-of-range`
 */
export function sorptionCorrection(a: {
  transfer: Transfer;
  surfaceArea: number;
  coefficient: number;
}): SorptionCorrection {
  const transfer = requireChoice(a.transfer, 'transfer', TRANSFERS);
  const area = new Decimal(requireNumber(a.surfaceArea, 'surfaceArea', { above: 0, max: 1e6, unit: 'cm2' }));
  const bounds = { min: -10, max: 10, unit: 'ug/cm2' };
  const coefficient = new Decimal(requireNumber(a.coefficient, 'coefficient', bounds));
  const signed = transfer === 'vacuum-to-air' ? GRAM_PER_MICROGRAM : GRAM_PER_MICROGRAM.negated();
  return {
    correction: area.times(coefficient).times(signed),
    sensitivities: {
      surfaceArea: coefficient.times(signed).toNumber(),
      coefficient: area.times(signed).toNumber(),
    },
  };
}

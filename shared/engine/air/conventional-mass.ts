import { Decimal } from '#shared/decimal.ts';
import { requireDecimal, requireNumber } from '../quantity/domain.ts';
import { REFERENCE_AIR_DENSITY, REFERENCE_FACTOR } from './convention.ts';

/** Densities of solids a weight may be made of, kg/m3; 8.0 (g/cm3) is outside and so is caught. */
const DENSITY_BOUNDS = { min: 100, max: 30_000, unit: 'kg/m3' } as const;

/** (1 - 1.2/rho) / (1 - 1.2/8000), exact to the digits of the decimal arithmetic. */
function conversionFactor(density: number): Decimal {
  const checked = requireNumber(density, 'density', DENSITY_BOUNDS);
  return new Decimal(1).minus(REFERENCE_AIR_DENSITY.div(checked)).div(REFERENCE_FACTOR);
}

/**
 * The conventional mass of a weight, in the unit of its mass.
 *
 * Source: OIML D 28:2004, clauses 4 and 5; restated in JCGM 101:2008, 9.3.1.2.
 *
 * @param a.mass mass, usually in g, more than zero
 * @param a.density density at 20 degC, kg/m3
 * @throws EngineError `not-finite` or `out-of-range`
 */
export function conventionalMass(a: { mass: Decimal; density: number }): Decimal {
  return requireDecimal(a.mass, 'mass', 'positive').times(conversionFactor(a.density));
}

/**
 * The mass of a weight whose conventional mass is known; undoes `conventionalMass`.
 *
 * @param a.conventionalMass conventional mass, usually in g, more than zero
 * @param a.density density at 20 degC, kg/m3
 * @throws EngineError `not-finite` or `out-of-range`
 */
export function massFromConventional(a: { conventionalMass: Decimal; density: number }): Decimal {
  return requireDecimal(a.conventionalMass, 'conventionalMass', 'positive').div(conversionFactor(a.density));
}

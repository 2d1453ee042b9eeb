import { requireNumber } from '../quantity/domain.ts';
import { compressibility, molarMassOfAir, MOLAR_MASS_OF_WATER, vapourFraction } from './moist-air.ts';

/** State of the air around a balance. */
export interface AirState {
  /** Temperature, degC. */
  temperature: number;
  /** Pressure, Pa. */
  pressure: number;
  /** Relative humidity, 0 to 1. */
  relativeHumidity: number;
  /** Mole fraction of carbon dioxide, 0.0004 unless measured. */
  carbonDioxide?: number;
}

/** Standard uncertainties of what was measured, and of the formula itself. */
export interface AirStateUncertainty {
  /** Of the temperature, K. */
  temperature: number;
  /** Of the pressure, Pa. */
  pressure: number;
  /** Of the relative humidity, as a fraction. */
  relativeHumidity: number;
  /** Of the mole fraction of carbon dioxide; 0 when left out. */
  carbonDioxide?: number;
  /** Relative, of the formula; 2.2e-5 when left out. */
  formula?: number;
}

/** Change of the air density, kg/m3, per unit of each quantity measured. */
export interface AirDensitySensitivities {
  /** kg/m3 per K. */
  temperature: number;
  /** kg/m3 per Pa. */
  pressure: number;
  /** kg/m3 per unit of relative humidity (0 to 1). */
  relativeHumidity: number;
  /** kg/m3 per unit of mole fraction. */
  carbonDioxide: number;
}

/** Molar gas constant, J/(mol K), as the formula was published with it (CODATA 2006). */
const GAS_CONSTANT = 8.314472;

/** Mole fraction of carbon dioxide assumed when it is not measured. */
const USUAL_CARBON_DIOXIDE = 0.0004;

/** Relative standard uncertainty of the formula (from memory). */
export const CIPM2007_FORMULA_UNCERTAINTY = 2.2e-5;

/** Checks a state of the air against the range the formula was published for. */
function requireAirState(a: AirState): Required<AirState> {
  return {
    temperature: requireNumber(a.temperature, 'temperature', { min: 15, max: 27, unit: 'degC' }),
    pressure: requireNumber(a.pressure, 'pressure', { min: 60_000, max: 110_000, unit: 'Pa' }),
    relativeHumidity: requireNumber(a.relativeHumidity, 'relativeHumidity', { min: 0, max: 1 }),
    carbonDioxide: requireNumber(a.carbonDioxide ?? USUAL_CARBON_DIOXIDE, 'carbonDioxide', {
      min: 0,
      max: 0.01,
    }),
  };
}

/** The formula without its range, so that a derivative may be taken at the edge of it. */
function densityOf(a: Required<AirState>): number {
  const thermodynamic = a.temperature + 273.15;
  const fraction = vapourFraction(a.temperature, a.pressure, a.relativeHumidity);
  const z = compressibility(a.temperature, a.pressure, fraction);
  const molarMass = molarMassOfAir(a.carbonDioxide);
  const dry = (a.pressure * molarMass) / (z * GAS_CONSTANT * thermodynamic);
  return dry * (1 - fraction * (1 - MOLAR_MASS_OF_WATER / molarMass));
}

/**
 * The density of moist air, kg/m3.
 *
 * Source: Picard, Davis, Glaeser, Fujii, Metrologia 45 (2008) 149-155, doi 10.1088/0026-1394/45/2/004, equations
 * (1) to (8) (CIPM-2007; constants from memory, held against independent published points in the tests). Holds from
 * 600 hPa to 1100 hPa and from 15 degC to 27 degC.
 *
 * @throws EngineError `not-finite` or `out-of-range`, naming the quantity
 */
export function airDensityCipm2007(a: AirState): number {
  return densityOf(requireAirState(a));
}

/** Steps of the central differences: large against rounding, small against the curvature of the formula. */
const STEPS = { temperature: 0.01, pressure: 10, relativeHumidity: 1e-3, carbonDioxide: 1e-5 } as const;

/**
 * How the CIPM-2007 air density changes with each quantity measured, by central differences of the formula at the
 * state given; correct to better than a part in 1e6.
 *
 * Source: as `airDensityCipm2007`.
 *
 * @throws EngineError `not-finite` or `out-of-range`, naming the quantity
 */
export function airDensitySensitivities(a: AirState): AirDensitySensitivities {
  const state = requireAirState(a);
  const slope = (quantity: keyof AirState): number => {
    const step = STEPS[quantity];
    const above = densityOf({ ...state, [quantity]: state[quantity] + step });
    const below = densityOf({ ...state, [quantity]: state[quantity] - step });
    return (above - below) / (2 * step);
  };
  return {
    temperature: slope('temperature'),
    pressure: slope('pressure'),
    relativeHumidity: slope('relativeHumidity'),
    carbonDioxide: slope('carbonDioxide'),
  };
}

/**
 * The standard uncertainty of the CIPM-2007 air density, kg/m3: the measured quantities through their
 * sensitivities, and the formula's own relative uncertainty.
 *
 * Source: as `airDensityCipm2007`; the formula's 2.2e-5 is from memory. The quantities are taken as uncorrelated.
 *
 * @param a state of the air
 * @param u standard uncertainties, none negative
 * @throws EngineError `not-finite` or `out-of-range`; uncertainties are named `u.pressure` and so on
 */
export function airDensityUncertainty(a: AirState, u: AirStateUncertainty): number {
  const sensitivity = airDensitySensitivities(a);
  const positive = (value: number, field: string): number => requireNumber(value, `u.${field}`, { min: 0 });
  return Math.hypot(
    sensitivity.temperature * positive(u.temperature, 'temperature'),
    sensitivity.pressure * positive(u.pressure, 'pressure'),
    sensitivity.relativeHumidity * positive(u.relativeHumidity, 'relativeHumidity'),
    sensitivity.carbonDioxide * positive(u.carbonDioxide ?? 0, 'carbonDioxide'),
    airDensityCipm2007(a) * positive(u.formula ?? CIPM2007_FORMULA_UNCERTAINTY, 'formula'),
  );
}

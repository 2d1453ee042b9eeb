import { requireNumber } from '../quantity/domain.ts';

/*
 * The parts of the CIPM-2007 formula that describe water vapour and the departure from an ideal gas. Source of all:
 * Picard et al., Metrologia 45 (2008) 149-155, Appendix A (constants from memory, every printed digit).
 */

/** Molar mass of water, kg/mol. */
export const MOLAR_MASS_OF_WATER = 0.01801528;

/** Molar mass of dry air with a mole fraction of carbon dioxide, kg/mol. */
export function molarMassOfAir(carbonDioxide: number): number {
  return 0.02896546 + 0.012011 * (carbonDioxide - 0.0004);
}

/** Saturation vapour pressure of water at a temperature in degC, Pa. */
function saturationPressure(temperature: number): number {
  const t = temperature + 273.15;
  return Math.exp(1.2378847e-5 * t * t - 1.9121316e-2 * t + 33.93711047 - 6343.1645 / t);
}

/** Enhancement factor, which takes account of the air beside the vapour: a pure number near 1.004. */
function enhancement(temperature: number, pressure: number): number {
  return 1.00062 + 3.14e-8 * pressure + 5.6e-7 * temperature * temperature;
}

/**
 * Mole fraction of water vapour.
 *
 * @param temperature degC
 * @param pressure Pa
 * @param relativeHumidity 0 to 1
 */
export function vapourFraction(temperature: number, pressure: number, relativeHumidity: number): number {
  return (relativeHumidity * enhancement(temperature, pressure) * saturationPressure(temperature)) / pressure;
}

/**
 * Compressibility factor of moist air, a pure number a little below 1.
 *
 * @param temperature degC
 * @param pressure Pa
 * @param fraction mole fraction of water vapour
 */
export function compressibility(temperature: number, pressure: number, fraction: number): number {
  const t = temperature;
  const perKelvin = pressure / (temperature + 273.15);
  const dryPart = 1.58123e-6 - 2.9331e-8 * t + 1.1043e-10 * t * t;
  const mixedPart = (5.707e-6 - 2.051e-8 * t) * fraction;
  const vapourPart = (1.9898e-4 - 2.376e-6 * t) * fraction * fraction;
  const second = 1.83e-11 - 7.65e-9 * fraction * fraction;
  return 1 - perKelvin * (dryPart + mixedPart + vapourPart) + perKelvin * perKelvin * second;
}

/**
 * The relative humidity, 0 to 1, that a dew point stands for, for those who measure it with a chilled mirror.
 *
 * Source: Picard et al. 2008, appendix A1 (from memory): both give the same mole fraction of water vapour.
 *
 * @param a.dewPoint degC, at most the temperature
 * @param a.temperature degC
 * @param a.pressure Pa
 * @throws EngineError `not-finite` or `out-of-range`, naming the quantity
 */
export function relativeHumidityFromDewPoint(a: {
  dewPoint: number;
  temperature: number;
  pressure: number;
}): number {
  const temperature = requireNumber(a.temperature, 'temperature', { min: 15, max: 27, unit: 'degC' });
  const pressure = requireNumber(a.pressure, 'pressure', { min: 60_000, max: 110_000, unit: 'Pa' });
  const dewPoint = requireNumber(a.dewPoint, 'dewPoint', { min: -40, max: temperature, unit: 'degC' });
  const vapour = enhancement(dewPoint, pressure) * saturationPressure(dewPoint);
  return vapour / (enhancement(temperature, pressure) * saturationPressure(temperature));
}

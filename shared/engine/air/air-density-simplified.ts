import { requireNumber } from '../quantity/domain.ts';

/**
 * The density of moist air by the approximate formula, kg/m3, within about 2 parts in 1e4 of the full one. Holds
 * from 900 hPa to 1100 hPa, from 10 degC to 30 degC and up to 80 % relative humidity.
 *
 * Source: OIML R 111-1:2004, annex E.3, equation E.3-1 (formula and limits from memory).
 *
 * @param a.temperature degC
 * @param a.pressure Pa
 * @param a.relativeHumidity 0 to 1
 * @throws EngineError `not-finite` or `out-of-range`, naming the quantity
 */
export function airDensitySimplified(a: {
  temperature: number;
  pressure: number;
  relativeHumidity: number;
}): number {
  const t = requireNumber(a.temperature, 'temperature', { min: 10, max: 30, unit: 'degC' });
  const hectopascal = requireNumber(a.pressure, 'pressure', { min: 90_000, max: 110_000, unit: 'Pa' }) / 100;
  const percent = requireNumber(a.relativeHumidity, 'relativeHumidity', { min: 0, max: 0.8 }) * 100;
  return (0.34848 * hectopascal - 0.009 * percent * Math.exp(0.061 * t)) / (273.15 + t);
}

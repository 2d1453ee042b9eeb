import { requireNumber } from '../quantity/domain.ts';
import { VOLUME_BOUNDS } from './buoyancy-correction.ts';

/** A volume at the temperature of a weighing and how it changes with what it was computed from. */
export interface VolumeAtTemperature {
  /** cm3. */
  volume: number;
  /** Sensitivities of that volume. */
  sensitivities: {
    /** cm3 per cm3. */
    volume: number;
    /** cm3 per K. */
    temperature: number;
    /** cm3 per 1/K. */
    expansion: number;
  };
}

/** Temperature at which volumes and densities of weights are stated, degC (OIML D 28:2004, 4). */
const REFERENCE_TEMPERATURE = 20;

/**
 * The volume of a weight at the temperature of a weighing: `V (1 + alpha (t - 20))`.
 *
 * Source: definition of the coefficient of cubic expansion; the reference temperature is that of OIML D 28:2004.
 *
 * @param a.volume volume at 20 degC, cm3
 * @param a.temperature temperature of the weighing, degC, 0 to 50
 * @param a.expansion coefficient of cubic expansion, 1/K (about 4.8e-5 for austenitic steel: common practice, no source)
 * @throws EngineError `not-finite` or `out-of-range`
 */
export function volumeAtTemperature(a: {
  volume: number;
  temperature: number;
  expansion: number;
}): VolumeAtTemperature {
  const volume = requireNumber(a.volume, 'volume', VOLUME_BOUNDS);
  const t = requireNumber(a.temperature, 'temperature', { min: 0, max: 50, unit: 'degC' });
  const expansion = requireNumber(a.expansion, 'expansion', { min: -1e-3, max: 1e-3, unit: '1/K' });
  const difference = t - REFERENCE_TEMPERATURE;
  const factor = 1 + expansion * difference;
  return {
    volume: volume * factor,
    sensitivities: { volume: factor, temperature: volume * expansion, expansion: volume * difference },
  };
}

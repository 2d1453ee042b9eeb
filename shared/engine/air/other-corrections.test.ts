import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { heightCorrection } from './height-correction.ts';
import { sorptionCorrection } from './sorption-correction.ts';
import { volumeAtTemperature } from './volume-at-temperature.ts';

describe('heightCorrection', () => {
  const steelAgainstPlatinum = {
    mass: new Decimal(1000),
    heightDifference: 0.0125,
    relativeGradient: -2.4e-7,
  };

  it('GUM6-height: steel against platinum-iridium, an effect of about -3 ug, corrected by +3 ug', () => {
    // JCGM GUM-6:2020, 6.7, read in the document, one digit; 12.5 mm recomputed beside the check.
    expect(heightCorrection(steelAgainstPlatinum).correction.toFixed()).toBe('0.000003');
    expect(heightCorrection({ ...steelAgainstPlatinum, heightDifference: 0.01 }).correction.toFixed()).toBe(
      '0.0000024',
    );
  });

  it('has the sensitivities of a product', () => {
    const { sensitivities } = heightCorrection(steelAgainstPlatinum);
    expect(sensitivities.heightDifference).toBeCloseTo(2.4e-4, 15);
    expect(sensitivities.relativeGradient).toBeCloseTo(-12.5, 12);
  });

  it('refuses a height in millimetres, a gradient in m/s2 per m and a mass of zero', () => {
    expect(() => heightCorrection({ ...steelAgainstPlatinum, heightDifference: 12.5 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'heightDifference' }),
    );
    expect(() => heightCorrection({ ...steelAgainstPlatinum, relativeGradient: -3e-6 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'relativeGradient' }),
    );
    expect(() => heightCorrection({ ...steelAgainstPlatinum, mass: new Decimal(0) })).toThrow(
      expect.objectContaining({ field: 'mass' }),
    );
  });
});

describe('volumeAtTemperature', () => {
  it('grows with temperature from 20 degC on', () => {
    // Steel, 4.8e-5 per kelvin (common practice, no source): exact arithmetic.
    expect(volumeAtTemperature({ volume: 125, temperature: 20, expansion: 4.8e-5 }).volume).toBe(125);
    expect(volumeAtTemperature({ volume: 125, temperature: 22, expansion: 4.8e-5 }).volume).toBeCloseTo(
      125.012,
      12,
    );
    expect(volumeAtTemperature({ volume: 125, temperature: 19, expansion: 4.8e-5 }).volume).toBeCloseTo(
      124.994,
      12,
    );
  });

  it('has the sensitivities of its formula', () => {
    const { sensitivities } = volumeAtTemperature({ volume: 125, temperature: 22, expansion: 4.8e-5 });
    expect(sensitivities.volume).toBeCloseTo(1.000096, 12);
    expect(sensitivities.temperature).toBeCloseTo(0.006, 12);
    expect(sensitivities.expansion).toBe(250);
  });

  it('refuses a temperature in kelvin, an expansion in 1e-6 and a volume of zero', () => {
    const a = { volume: 125, temperature: 22, expansion: 4.8e-5 };
    expect(() => volumeAtTemperature({ ...a, temperature: 295 })).toThrow(
      expect.objectContaining({ field: 'temperature' }),
    );
    expect(() => volumeAtTemperature({ ...a, expansion: 48 })).toThrow(
      expect.objectContaining({ field: 'expansion' }),
    );
    expect(() => volumeAtTemperature({ ...a, volume: 0 })).toThrow(
      expect.objectContaining({ field: 'volume' }),
    );
  });
});

describe('sorptionCorrection', () => {
  const sphere = { surfaceArea: 275, coefficient: 0.05 };

  it('adds what the surface takes up in air, and takes it off on the way back', () => {
    expect(sorptionCorrection({ ...sphere, transfer: 'vacuum-to-air' }).correction.toFixed()).toBe(
      '0.00001375',
    );
    expect(sorptionCorrection({ ...sphere, transfer: 'air-to-vacuum' }).correction.toFixed()).toBe(
      '-0.00001375',
    );
  });

  it('has the sensitivities of a product', () => {
    const { sensitivities } = sorptionCorrection({ ...sphere, transfer: 'air-to-vacuum' });
    expect(sensitivities.surfaceArea).toBeCloseTo(-5e-8, 20);
    expect(sensitivities.coefficient).toBeCloseTo(-2.75e-4, 15);
  });

  it('refuses an unknown way, an area of zero and a coefficient in g/cm2', () => {
    expect(() => sorptionCorrection({ ...sphere, transfer: 'both' as 'air-to-vacuum' })).toThrow(
      expect.objectContaining({ code: 'unknown-choice', field: 'transfer' }),
    );
    expect(() => sorptionCorrection({ ...sphere, surfaceArea: 0, transfer: 'air-to-vacuum' })).toThrow(
      expect.objectContaining({ field: 'surfaceArea' }),
    );
    expect(() => sorptionCorrection({ ...sphere, coefficient: 50, transfer: 'air-to-vacuum' })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'coefficient' }),
    );
  });
});

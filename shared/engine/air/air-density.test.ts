import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { randomSource } from '../uncertainty/random.ts';
import {
  airDensityCipm2007,
  airDensitySensitivities,
  airDensityUncertainty,
} from './air-density-cipm2007.ts';
import { airDensitySimplified } from './air-density-simplified.ts';
import {
  compressibility,
  molarMassOfAir,
  MOLAR_MASS_OF_WATER,
  relativeHumidityFromDewPoint,
  vapourFraction,
} from './moist-air.ts';

const usual = { temperature: 20, pressure: 101_325, relativeHumidity: 0.5 };

describe('CIPM-2007 constants', () => {
  // CIPM-const. Picard et al., Metrologia 45 (2008) 149-155, from memory.
  it('CIPM-const: the short form of the formula comes out of the constants', () => {
    expect(molarMassOfAir(0.0004) / 8.314472).toBeCloseTo(3.48374e-3, 9);
    expect((molarMassOfAir(1.0004) - molarMassOfAir(0.0004)) / 8.314472).toBeCloseTo(1.4446e-3, 7);
    expect(1 - MOLAR_MASS_OF_WATER / molarMassOfAir(0.0004)).toBeCloseTo(0.378, 4);
  });

  it('CIPM-Z0: compressibility of dry air at 15 degC, 101 325 Pa', () => {
    // Ciddor, Appl. Opt. 35 (1996) 1566, list of constants, second-hand: 0.999 592 211 5, tolerance 1e-10.
    expect(Math.abs(compressibility(15, 101_325, 0) - 0.9995922115)).toBeLessThan(1e-10);
  });

  it('CIPM-vap: density of pure water vapour at 20 degC, 1333 Pa, with the gas constant of that time', () => {
    // Ciddor 1996, second-hand: 0.009 859 38 kg/m3, tolerance 1e-8.
    const density = (1333 * 0.018015) / (compressibility(20, 1333, 1) * 8.31451 * 293.15);
    expect(Math.abs(density - 0.00985938)).toBeLessThan(1e-8);
  });
});

describe('airDensityCipm2007', () => {
  const table: [number, number[]][] = [
    [15, [1.085, 1.11, 1.134, 1.158, 1.182, 1.206, 1.222, 1.266]],
    [20, [1.065, 1.088, 1.112, 1.136, 1.16, 1.184, 1.199, 1.243]],
    [25, [1.045, 1.068, 1.091, 1.115, 1.138, 1.162, 1.177]],
  ];

  it.each(table)('AIR-table: %s degC, 50 %%, eight pressures', (temperature, printed) => {
    // Table of a density meter's manual, appendix H (formula of Spieweck and Bettin), read in a reproduction:
    // an independent formula, 0.001 kg/m3, save two
    // cells (15 degC, 920 and 940 hPa: 0.0012 and 0.00103) that the half digit of the print covers.
    const pressures = [90_000, 92_000, 94_000, 96_000, 98_000, 100_000, 101_325, 105_000];
    printed.forEach((expected, i) => {
      const pressure = pressures[i] ?? NaN;
      const density = airDensityCipm2007({
        temperature,
        pressure,
        relativeHumidity: 0.5,
        carbonDioxide: 0.00033,
      });
      const isOddCell = temperature === 15 && (pressure === 92_000 || pressure === 94_000);
      expect(Math.abs(density - expected)).toBeLessThan(isOddCell ? 0.0015 : 0.001);
    });
  });

  it('CIPM-vs-81: lies 7.19e-5 above the formula of 1981/91', () => {
    // Computed with the constants of 1981/91 beside the check (abstract of Picard et al. in reproduction): 2e-7.
    const fraction = vapourFraction(20, 101_325, 0.5);
    const shorten = (molarMass: number, water: number, gas: number) =>
      (molarMass / gas) * (1 - fraction * (1 - water / molarMass));
    const ratio =
      shorten(molarMassOfAir(0.0004), MOLAR_MASS_OF_WATER, 8.314472) / shorten(0.0289635, 0.018015, 8.31451) -
      1;
    expect(Math.abs(ratio - 7.19e-5)).toBeLessThan(2e-7);
    expect(Math.abs(airDensityCipm2007(usual) - 1.1993139)).toBeLessThan(2e-7);
  });

  it.each([
    ['temperature', 14.99],
    ['temperature', 27.01],
    ['pressure', 1013.25],
    ['pressure', 110_001],
    ['relativeHumidity', 50],
    ['relativeHumidity', -0.01],
    ['carbonDioxide', 400],
  ])('refuses %s = %s', (field, value) => {
    expect(() => airDensityCipm2007({ ...usual, [field]: value })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field }),
    );
    expect(() => airDensityCipm2007({ ...usual, [field]: NaN })).toThrow(
      expect.objectContaining({ code: 'not-finite', field }),
    );
  });

  const state = fc.record({
    temperature: fc.double({ min: 15, max: 26.9, noNaN: true }),
    pressure: fc.double({ min: 60_000, max: 109_000, noNaN: true }),
    relativeHumidity: fc.double({ min: 0, max: 0.99, noNaN: true }),
  });

  it('rises with pressure and carbon dioxide, falls with temperature and humidity', () => {
    fc.assert(
      fc.property(state, (a) => {
        const density = airDensityCipm2007(a);
        expect(airDensityCipm2007({ ...a, pressure: a.pressure + 100 })).toBeGreaterThan(density);
        expect(airDensityCipm2007({ ...a, carbonDioxide: 0.0005 })).toBeGreaterThan(density);
        expect(airDensityCipm2007({ ...a, temperature: a.temperature + 0.1 })).toBeLessThan(density);
        expect(airDensityCipm2007({ ...a, relativeHumidity: a.relativeHumidity + 0.01 })).toBeLessThan(
          density,
        );
      }),
    );
  });
});

describe('airDensitySensitivities', () => {
  it('CIPM-sens: relative sensitivities near 20 degC, 101 325 Pa, 50 %', () => {
    // Picard et al. 2008, Table 3, from memory (+1e-5/Pa, -4e-3/K, -9e-3, +0.4); recomputed to four digits, 0.2 %.
    const density = airDensityCipm2007(usual);
    const sensitivity = airDensitySensitivities(usual);
    expect(sensitivity.pressure / density / 9.916e-6).toBeCloseTo(1, 3);
    expect(sensitivity.temperature / density / -0.003692).toBeCloseTo(1, 3);
    expect(sensitivity.relativeHumidity / density / -0.00873).toBeCloseTo(1, 3);
    expect(sensitivity.carbonDioxide / density / 0.4117).toBeCloseTo(1, 3);
  });

  it('CIPM-sens: the dew point, -2.942e-4/K relative', () => {
    const humidity = (dewPoint: number) => relativeHumidityFromDewPoint({ ...usual, dewPoint });
    const density = (dewPoint: number) =>
      airDensityCipm2007({ ...usual, relativeHumidity: humidity(dewPoint) });
    // The dew point of 50 % at 20 degC is 9.27 degC.
    expect(humidity(9.27)).toBeCloseTo(0.5, 3);
    const slope = (density(9.28) - density(9.26)) / 0.02 / density(9.27);
    expect(slope / -2.942e-4).toBeCloseTo(1, 2);
  });

  it('works at the very edge of the range', () => {
    const edge = { temperature: 15, pressure: 60_000, relativeHumidity: 0 };
    expect(airDensitySensitivities(edge).temperature).toBeLessThan(0);
    expect(Object.values(airDensitySensitivities(edge)).every(Number.isFinite)).toBe(true);
  });

  it('predicts a small change of any one quantity', () => {
    const sensitivity = airDensitySensitivities(usual);
    const moved = airDensityCipm2007({ ...usual, temperature: 20.02 }) - airDensityCipm2007(usual);
    expect(moved / (0.02 * sensitivity.temperature)).toBeCloseTo(1, 3);
  });
});

describe('relativeHumidityFromDewPoint', () => {
  it('is 1 at the dew point itself and refuses one above the temperature', () => {
    expect(relativeHumidityFromDewPoint({ ...usual, dewPoint: 20 })).toBe(1);
    expect(() => relativeHumidityFromDewPoint({ ...usual, dewPoint: 20.1 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'dewPoint' }),
    );
  });
});

describe('airDensityUncertainty', () => {
  const u = { temperature: 0.05, pressure: 10, relativeHumidity: 0.01, carbonDioxide: 0.00005 };

  it('is the formula alone when everything is measured exactly', () => {
    const none = { temperature: 0, pressure: 0, relativeHumidity: 0 };
    expect(airDensityUncertainty(usual, none) / airDensityCipm2007(usual)).toBeCloseTo(2.2e-5, 12);
    expect(airDensityUncertainty(usual, { ...none, formula: 0 })).toBe(0);
  });

  it('adds the squares of what each quantity brings', () => {
    const one = (name: keyof typeof u) =>
      airDensityUncertainty(usual, {
        temperature: 0,
        pressure: 0,
        relativeHumidity: 0,
        carbonDioxide: 0,
        formula: 0,
        [name]: u[name],
      });
    const parts = Math.hypot(
      one('temperature'),
      one('pressure'),
      one('relativeHumidity'),
      one('carbonDioxide'),
    );
    expect(airDensityUncertainty(usual, { ...u, formula: 0 }) / parts).toBeCloseTo(1, 12);
    expect(one('pressure') / (10 * airDensitySensitivities(usual).pressure)).toBeCloseTo(1, 12);
  });

  it('agrees with draws of the measured quantities', () => {
    const random = randomSource(5);
    const trials = 40_000;
    let sum = 0;
    let squares = 0;
    const centre = airDensityCipm2007(usual);
    for (let i = 0; i < trials; i += 1) {
      const drawn = airDensityCipm2007({
        temperature: 20 + 0.05 * random.normal(),
        pressure: 101_325 + 10 * random.normal(),
        relativeHumidity: 0.5 + 0.01 * random.normal(),
        carbonDioxide: 0.0004 + 0.00005 * random.normal(),
      });
      const error = drawn * (1 + 2.2e-5 * random.normal()) - centre;
      sum += error;
      squares += error * error;
    }
    const deviation = Math.sqrt((squares - (sum * sum) / trials) / (trials - 1));
    // Four standard deviations of a standard deviation from 40 000 draws are 1.4 %.
    expect(Math.abs(deviation / airDensityUncertainty(usual, u) - 1)).toBeLessThan(0.015);
  });

  it('refuses an uncertainty below zero and names it', () => {
    expect(() => airDensityUncertainty(usual, { ...u, pressure: -1 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'u.pressure' }),
    );
  });
});

describe('airDensitySimplified', () => {
  it.each([
    // R111-E3. OIML R 111-1:2004, annex E.3, equation E.3-1, from memory; arithmetic to 1e-6.
    [20, 0.5, 1.1992943, -1.6e-5],
    [20, 0, 1.2044938, -5.3e-5],
    [23, 0.5, 1.1861119, 2.3e-5],
    [15, 0.5, 1.2214951, -1.11e-4],
  ])('R111-E3: %s degC, 1013.25 hPa, humidity %s', (temperature, relativeHumidity, expected, apart) => {
    const state = { temperature, pressure: 101_325, relativeHumidity };
    expect(Math.abs(airDensitySimplified(state) - expected)).toBeLessThan(1e-6);
    expect(Math.abs(airDensitySimplified(state) / airDensityCipm2007(state) - 1 - apart)).toBeLessThan(1e-6);
  });

  it('R111-E3: stays within 2e-4 of the full formula where both hold', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 15, max: 27, noNaN: true }),
        fc.double({ min: 90_000, max: 110_000, noNaN: true }),
        fc.double({ min: 0, max: 0.8, noNaN: true }),
        (temperature, pressure, relativeHumidity) => {
          const state = { temperature, pressure, relativeHumidity };
          expect(Math.abs(airDensitySimplified(state) / airDensityCipm2007(state) - 1)).toBeLessThan(2e-4);
        },
      ),
    );
  });

  it.each([
    ['temperature', 9.9],
    ['temperature', 30.1],
    ['pressure', 89_999],
    ['pressure', 110_001],
    ['relativeHumidity', 0.81],
  ])('refuses %s = %s', (field, value) => {
    expect(() => airDensitySimplified({ ...usual, [field]: value })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field }),
    );
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { randomSource } from '../uncertainty/random.ts';
import { conventionalMass } from './conventional-mass.ts';
import { massAndConventional } from './mass-and-conventional.ts';

describe('massAndConventional', () => {
  const steel = {
    value: new Decimal('1000.0005'),
    kind: 'conventional' as const,
    standardUncertainty: 0.00025,
    volume: 125.8,
    volumeUncertainty: 0.5,
    airDensity: 1.17,
  };

  it('gives the mass that belongs to the volume', () => {
    const { mass, conventional } = massAndConventional(steel);
    expect(conventional).toEqual(steel.value);
    // 0.99985 x 1000.0005 g + 1.2 kg/m3 x 125.8 cm3, exactly.
    expect(mass.toFixed()).toBe('1000.001459925');
    // The same by the density: the volume is the mass over the density.
    const byDensity = conventionalMass({ mass, density: mass.times(1000).div('125.8').toNumber() });
    expect(byDensity.minus(conventional).abs().lt('1e-12')).toBe(true);
  });

  it('an assumed density: large for the mass, small for the conventional mass, and nearly one variable', () => {
    // Real 20 kg weight of assumed density (7950 +- 140) kg/m3, k = 2 (figures carried over second-hand):
    // U(mass) 53 mg, U(conventional) 3.1 mg, r(m, V) = 0.9983. Air of 1.19 kg/m3 assumed here.
    const volume = 20_000_000 / 7950;
    const volumeUncertainty = (volume * 70) / 7950;
    const { covariance } = massAndConventional({
      value: new Decimal('20000.0073'),
      kind: 'conventional',
      standardUncertainty: 0.00155,
      volume,
      volumeUncertainty,
      airDensity: 1.19,
    });
    expect(2000 * Math.sqrt(covariance[0][0])).toBeCloseTo(53, 0);
    expect(2000 * Math.sqrt(covariance[1][1])).toBeCloseTo(3.1, 9);
    // cov(m, V) = 0.99985 cov(m_c, V) + 1.2 u2(V), of which the first is (rho - 1.2) u2(V).
    const correlation = (1.19e-3 * volumeUncertainty) / Math.sqrt(covariance[0][0]);
    expect(correlation).toBeCloseTo(0.9983, 3);
  });

  it('agrees with draws of the weighing and the volume', () => {
    const random = randomSource(3);
    const trials = 100_000;
    const rho = steel.airDensity;
    const uVolume = steel.volumeUncertainty;
    const factor = ((rho - 1.2) / 0.99985) * 1e-3;
    const rest = Math.sqrt(steel.standardUncertainty ** 2 - (factor * uVolume) ** 2);
    let mm = 0;
    let mc = 0;
    let cc = 0;
    for (let i = 0; i < trials; i += 1) {
      const dV = uVolume * random.normal();
      const dc = rest * random.normal() + factor * dV;
      const dm = 0.99985 * dc + 1.2e-3 * dV;
      mm += dm * dm;
      mc += dm * dc;
      cc += dc * dc;
    }
    const { covariance } = massAndConventional(steel);
    expect(Math.abs(mm / trials / covariance[0][0] - 1)).toBeLessThan(0.02);
    expect(Math.abs(cc / trials / covariance[1][1] - 1)).toBeLessThan(0.02);
    expect(Math.abs(mc / trials - covariance[0][1])).toBeLessThan(
      0.02 * Math.sqrt(covariance[0][0] * covariance[1][1]),
    );
  });

  const input = fc.record({
    volume: fc.double({ min: 1, max: 5000, noNaN: true }),
    volumeUncertainty: fc.double({ min: 0, max: 5, noNaN: true }),
    airDensity: fc.double({ min: 0, max: 1.4, noNaN: true }),
    extra: fc.double({ min: 1e-6, max: 0.01, noNaN: true }),
  });

  it('from mass to conventional mass and back gives the same values and the same covariance', () => {
    fc.assert(
      fc.property(input, ({ volume, volumeUncertainty, airDensity, extra }) => {
        const value = new Decimal(volume).times(8).toDecimalPlaces(9);
        const standardUncertainty = Math.hypot(airDensity * volumeUncertainty * 1e-3, extra);
        const shared = { volume, volumeUncertainty, airDensity };
        const there = massAndConventional({ value, kind: 'mass', standardUncertainty, ...shared });
        const back = massAndConventional({
          value: there.conventional,
          kind: 'conventional',
          standardUncertainty: Math.sqrt(there.covariance[1][1]),
          ...shared,
        });
        expect(back.mass.minus(value).abs().lt('1e-50')).toBe(true);
        const scale = there.covariance[0][0] + (1.2e-3 * volumeUncertainty) ** 2;
        [0, 1].forEach((i) =>
          [0, 1].forEach((j) => {
            const one = there.covariance[i as 0 | 1][j as 0 | 1];
            const other = back.covariance[i as 0 | 1][j as 0 | 1];
            expect(Math.abs(one - other)).toBeLessThanOrEqual(1e-6 * scale);
          }),
        );
        const [[mm, mc], [, cc]] = there.covariance;
        expect(mm * cc - mc * mc).toBeGreaterThanOrEqual(-1e-9 * scale * scale);
      }),
    );
  });

  it('with an exact volume both have the relative uncertainty of the one given', () => {
    const { covariance } = massAndConventional({ ...steel, volumeUncertainty: 0 });
    expect(Math.sqrt(covariance[0][0])).toBeCloseTo(0.99985 * 0.00025, 15);
    expect(covariance[0][1] / Math.sqrt(covariance[0][0] * covariance[1][1])).toBeCloseTo(1, 12);
  });

  it('refuses an uncertainty smaller than its volume part, and names the way out', () => {
    const refuse = () => massAndConventional({ ...steel, kind: 'mass', standardUncertainty: 0.0001 });
    expect(refuse).toThrow(
      expect.objectContaining({ code: 'uncertainty-below-volume-part', field: 'standardUncertainty' }),
    );
    expect(refuse).toThrow('smaller uncertainty of the volume');
    // Exactly the volume part is allowed.
    const exactly = { ...steel, kind: 'mass' as const, standardUncertainty: 1.17 * 0.5 * 1e-3 };
    expect(massAndConventional(exactly).covariance[0][0]).toBeGreaterThan(0);
  });

  it.each([
    ['kind', 'apparent'],
    ['standardUncertainty', -1],
    ['volume', 0],
    ['volumeUncertainty', NaN],
    ['airDensity', 3],
    ['value', new Decimal(0)],
  ])('refuses %s = %s', (field, value) => {
    expect(() => massAndConventional({ ...steel, [field]: value })).toThrow(
      expect.objectContaining({ field }),
    );
  });
});

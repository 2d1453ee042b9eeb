import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { buoyancyCorrection } from './buoyancy-correction.ts';
import { conventionalMass, massFromConventional } from './conventional-mass.ts';

describe('buoyancyCorrection', () => {
  it('VALCU-y: conventional masses, exactly', () => {
    // A. Valcu, OIML Bulletin 2001, equation (1), formula read in a reproduction: 0.1 mg + 0.033 mg, 1e-12.
    const { correction } = buoyancyCorrection({
      kind: 'conventional',
      testVolume: 124.8,
      referenceVolume: 125.9,
      airDensity: 1.17,
    });
    expect(new Decimal('0.0001').plus(correction).toFixed()).toBe('0.000133');
  });

  const cases: [number, number, number, number, number][] = [
    [1.1, 7000, 8050, 100001.047605, 100001.047662],
    [1.3, 9000, 7950, 100001.087204, 100001.087248],
    [1.16, 7850, 8000, 100001.224443, 100001.224446],
    [0.95, 8400, 7950, 100001.40251, 100001.402466],
  ];

  it.each(cases)(
    'JCGM101-eq23-24: air %s, test %s, reference %s kg/m3',
    (air, test, reference, exact, approximate) => {
      // JCGM 101:2008, 9.3.1.3, equations (23) and (24), read in the document; recomputed, 2e-6 mg.
      const conventional = new Decimal('100.001234');
      const { correction } = buoyancyCorrection({
        kind: 'conventional',
        referenceVolume: 100001.234 / reference,
        testVolume: 100001.234 / test,
        airDensity: air,
      });
      expect(Math.abs(conventional.plus(correction).times(1000).toNumber() - approximate)).toBeLessThan(2e-6);

      const massOfReference = massFromConventional({ conventionalMass: conventional, density: reference });
      const massOfTest = massOfReference.times(1 - air / reference).div(1 - air / test);
      const exactValue = conventionalMass({ mass: massOfTest, density: test }).times(1000).toNumber();
      expect(Math.abs(exactValue - exact)).toBeLessThan(2e-6);
    },
  );

  it('is nothing at 1.2 kg/m3 for conventional masses, and in a vacuum for masses', () => {
    const volumes = { referenceVolume: 46.5, testVolume: 127.4 };
    expect(
      buoyancyCorrection({ kind: 'conventional', ...volumes, airDensity: 1.2 }).correction.toFixed(),
    ).toBe('0');
    expect(buoyancyCorrection({ kind: 'mass', ...volumes, airDensity: 0 }).correction.toFixed()).toBe('0');
  });

  it('CONV-vs-TRUE: a density uncertainty spoils the mass, not the conventional mass', () => {
    // Flicker and Tran, technical note on conventional mass (abstract, in reproduction); numbers derived, exact.
    // 1 kg, (8000 +- 30) kg/m3, air of 1.15 kg/m3: u(V) = 1e6 g / 8000^2 * 30 in cm3.
    const uVolume = (1e6 / 8000 ** 2) * 30;
    const a = { referenceVolume: 125, testVolume: 125, airDensity: 1.15 };
    const ofMass = buoyancyCorrection({ kind: 'mass', ...a }).sensitivities.testVolume * uVolume * 1000;
    const ofConventional =
      buoyancyCorrection({ kind: 'conventional', ...a }).sensitivities.testVolume * uVolume * 1000;
    expect(Math.abs(ofMass - 0.5390625)).toBeLessThan(1e-9);
    expect(Math.abs(Math.abs(ofConventional) - 0.0234375)).toBeLessThan(1e-9);
    expect(ofConventional).toBeLessThan(0);
  });

  it('R111-C6: the shared volume of the reference gives the third term of C.6.3-1, negative or not', () => {
    // OIML R 111-1:2004, annex C.6.3, equation C.6.3-1, from memory: (rho_a - rho_0)[(rho_a - rho_0) - 2(rho_a1 - rho_0)].
    // The reference's value came with + (rho_a1 - 1.2), this use of it brings - (rho_a - 1.2).
    const sensitivity = (airDensity: number) =>
      buoyancyCorrection({ kind: 'conventional', referenceVolume: 125, testVolume: 125, airDensity })
        .sensitivities;
    for (const [now, then] of [
      [1.15, 1.1],
      [1.15, 1.19],
      [1.3, 1.1],
    ] as const) {
      const carried = sensitivity(then).testVolume;
      const both = carried + sensitivity(now).referenceVolume;
      const third = (now - 1.2) * (now - 1.2 - 2 * (then - 1.2)) * 1e-6;
      expect(both ** 2 - carried ** 2).toBeCloseTo(third, 15);
    }
    // The first case is negative: the two uses of one volume cancel in part.
    expect((sensitivity(1.1).testVolume + sensitivity(1.15).referenceVolume) ** 2).toBeLessThan(
      sensitivity(1.1).testVolume ** 2,
    );
  });

  const volume = fc.double({ min: 0.01, max: 5000, noNaN: true });
  const air = fc.double({ min: 0, max: 2, noNaN: true });
  const kinds = fc.constantFrom('mass' as const, 'conventional' as const);

  it('changes sign when the weights change places', () => {
    fc.assert(
      fc.property(kinds, volume, volume, air, (kind, one, other, airDensity) => {
        const there = buoyancyCorrection({ kind, referenceVolume: one, testVolume: other, airDensity });
        const back = buoyancyCorrection({ kind, referenceVolume: other, testVolume: one, airDensity });
        expect(there.correction.plus(back.correction).isZero()).toBe(true);
      }),
    );
  });

  it('is exactly linear: its sensitivities predict any change', () => {
    fc.assert(
      fc.property(kinds, volume, volume, air, (kind, one, other, airDensity) => {
        const base = buoyancyCorrection({ kind, referenceVolume: one, testVolume: other, airDensity });
        const moved = (change: object) =>
          buoyancyCorrection({ kind, referenceVolume: one, testVolume: other, airDensity, ...change })
            .correction.minus(base.correction)
            .toNumber();
        expect(moved({ testVolume: other + 1 })).toBeCloseTo(base.sensitivities.testVolume, 12);
        expect(moved({ referenceVolume: one + 1 })).toBeCloseTo(base.sensitivities.referenceVolume, 12);
        expect(moved({ airDensity: airDensity / 2 })).toBeCloseTo(
          (-airDensity / 2) * base.sensitivities.airDensity,
          9,
        );
      }),
    );
  });

  it('refuses an unknown kind, a volume of zero and an air density that is none', () => {
    const a = { kind: 'mass' as const, referenceVolume: 125, testVolume: 125, airDensity: 1.2 };
    expect(() => buoyancyCorrection({ ...a, kind: 'apparent' as 'mass' })).toThrow(
      expect.objectContaining({ code: 'unknown-choice', field: 'kind' }),
    );
    expect(() => buoyancyCorrection({ ...a, testVolume: 0 })).toThrow(
      expect.objectContaining({ field: 'testVolume' }),
    );
    expect(() => buoyancyCorrection({ ...a, referenceVolume: NaN })).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'referenceVolume' }),
    );
    expect(() => buoyancyCorrection({ ...a, airDensity: 1200 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'airDensity' }),
    );
  });
});

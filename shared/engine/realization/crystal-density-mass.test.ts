import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { item } from '../linear/entries.ts';
import {
  crystalDensityMass,
  type CrystalSphere,
  type CrystalUncertainties,
  electronMass,
} from './crystal-density-mass.ts';

// CODATA 2018: R and m(e) seen in a reproduction of the listing; alpha, A(e), a(Si) and V(Si) from memory.
const constants = {
  rydberg: 10973731.56816,
  fineStructure: 7.2973525693e-3,
  electronRelativeMass: 5.48579909065e-4,
};

// Relative atomic masses of the isotopes of silicon: Atomic Mass Evaluation 2016, from memory. Made-up enrichment.
const sphere: CrystalSphere = {
  volume: 4.30891e-4,
  latticeParameter: 5.430996e-10,
  isotopes: [
    { fraction: 0.99998, relativeAtomicMass: 27.97692653465 },
    { fraction: 0.000015, relativeAtomicMass: 28.97649466491 },
    { fraction: 0.000005, relativeAtomicMass: 29.973770136 },
  ],
  surfaceLayer: 80e-9,
  pointDefects: 4e-9,
  constants,
};
const none: CrystalUncertainties = {
  volume: 0,
  latticeParameter: 0,
  isotopes: sphere.isotopes.map(() => ({ fraction: 0, relativeAtomicMass: 0 })),
  surfaceLayer: 0,
  pointDefects: 0,
};

describe('electronMass', () => {
  it('gives the published electron mass (CODATA 2018) within its uncertainty', () => {
    const published = 9.1093837015e-31;
    const uncertainty = 0.0000000028e-31;
    expect(Math.abs(electronMass(constants).toNumber() - published)).toBeLessThan(uncertainty);
  });
});

describe('crystalDensityMass', () => {
  it('gives the mass that the published molar volume of natural silicon asks for', () => {
    // CODATA 2018 (from memory): a = 543.1020511(89) pm, V = 12.05883199(60) cm3/mol. A mole of cells' share in
    // that volume has N(A) atoms; with one isotope of relative mass 1 it is 1 g/mol within 5e-8 + 3 * 1.6e-8.
    const { mass } = crystalDensityMass(
      {
        ...sphere,
        volume: 12.05883199e-6,
        latticeParameter: 5.431020511e-10,
        isotopes: [{ fraction: 1, relativeAtomicMass: 1 }],
        surfaceLayer: 0,
        pointDefects: 0,
      },
      { ...none, isotopes: [{ fraction: 0, relativeAtomicMass: 0 }] },
    );
    expect(Math.abs(mass.toNumber() / 1e-3 - 1)).toBeLessThan(1e-7);
  });

  it('closes the loop: the volume that 1 kg would need gives 1 kg back', () => {
    fc.assert(
      fc.property(fc.integer({ min: 500, max: 2000 }), fc.integer({ min: 0, max: 400 }), (grams, layer) => {
        const wanted = new Decimal(grams).div(1000);
        const perVolume = crystalDensityMass(
          { ...sphere, volume: 1, surfaceLayer: 0, pointDefects: 0 },
          none,
        ).mass;
        const surfaceLayer = layer * 1e-9;
        const volume = wanted.plus(sphere.pointDefects).minus(surfaceLayer).div(perVolume).toNumber();
        const { mass } = crystalDensityMass({ ...sphere, volume, surfaceLayer }, none);
        expect(Math.abs(mass.minus(wanted).toNumber())).toBeLessThan(1e-14);
      }),
    );
  });

  it('is close to a kilogram for a sphere of the usual size', () => {
    expect(crystalDensityMass(sphere, none).mass.toNumber()).toBeCloseTo(0.9997, 3);
  });

  it('has the sensitivities of its own formula', () => {
    const { mass, budget } = crystalDensityMass(sphere, none);
    const withIsotope = (
      i: number,
      change: Partial<CrystalSphere['isotopes'][number]>,
      takenFromMain = 0,
    ): CrystalSphere => ({
      ...sphere,
      isotopes: sphere.isotopes.map((isotope, j) => {
        if (j === i) return { ...isotope, ...change };
        return j === 0 ? { ...isotope, fraction: isotope.fraction - takenFromMain } : isotope;
      }),
    });
    const moved: [string, (delta: number) => CrystalSphere, number][] = [
      ['volume of the core', (d) => ({ ...sphere, volume: sphere.volume + d }), 1e-10],
      ['lattice parameter', (d) => ({ ...sphere, latticeParameter: sphere.latticeParameter + d }), 1e-17],
      [
        'Rydberg constant',
        (d) => ({ ...sphere, constants: { ...constants, rydberg: constants.rydberg + d } }),
        1,
      ],
      [
        'fine-structure constant',
        (d) => ({ ...sphere, constants: { ...constants, fineStructure: constants.fineStructure + d } }),
        1e-10,
      ],
      ['relative atomic mass of the electron', (d) => ({ ...sphere, constants: { ...constants, electronRelativeMass: constants.electronRelativeMass + d } }), 1e-11], // prettier-ignore
      [
        'relative atomic mass of isotope 28',
        (d) => withIsotope(0, { relativeAtomicMass: 27.97692653465 + d }),
        1e-6,
      ],
      ['fraction of isotope 29', (d) => withIsotope(1, { fraction: 0.000015 + d }, d), 1e-7],
      [
        'relative atomic mass of isotope 29',
        (d) => withIsotope(1, { relativeAtomicMass: 28.97649466491 + d }),
        1e-3,
      ],
      ['fraction of isotope 30', (d) => withIsotope(2, { fraction: 0.000005 + d }, d), 1e-7],
      [
        'relative atomic mass of isotope 30',
        (d) => withIsotope(2, { relativeAtomicMass: 29.973770136 + d }),
        1e-3,
      ],
      ['surface layer', (d) => ({ ...sphere, surfaceLayer: sphere.surfaceLayer + d }), 1e-9],
      ['point defects', (d) => ({ ...sphere, pointDefects: sphere.pointDefects + d }), 1e-9],
    ];
    expect(budget.map(({ name }) => name)).toEqual(moved.map(([name]) => name));
    moved.forEach(([name, change, delta], i) => {
      const slope = crystalDensityMass(change(delta), none).mass.minus(mass).div(delta).toNumber();
      expect(Math.abs(item(budget, i).sensitivity / slope - 1), name).toBeLessThan(2e-6);
    });
  });

  it('does not depend on the order of the isotopes', () => {
    const uncertain: CrystalUncertainties = {
      ...none,
      volume: 4.3e-12,
      isotopes: [
        { fraction: 1e-8, relativeAtomicMass: 4e-10 },
        { fraction: 2e-8, relativeAtomicMass: 5e-10 },
        { fraction: 3e-8, relativeAtomicMass: 2e-8 },
      ],
      constants: { rydberg: 2e-5, fineStructure: 1.1e-12, electronRelativeMass: 1.6e-14 },
    };
    const result = crystalDensityMass(sphere, uncertain);
    const turned = crystalDensityMass(
      { ...sphere, isotopes: [...sphere.isotopes].reverse() },
      { ...uncertain, isotopes: [...uncertain.isotopes].reverse() },
    );
    expect(turned.mass.minus(result.mass).abs().toNumber()).toBeLessThan(1e-40);
    expect(turned.standardUncertainty).toBeCloseTo(result.standardUncertainty, 20);
    expect(result.standardUncertainty).toBeCloseTo(
      Math.hypot(...result.budget.map(({ contribution }) => contribution)),
      20,
    );
    // The volume, 1e-8 of itself, is the largest line.
    expect(Math.max(...result.budget.map(({ contribution }) => Math.abs(contribution)))).toBeCloseTo(
      0.9997 * (4.3e-12 / 4.30891e-4),
      11,
    );
  });

  it.each<[string, Partial<CrystalSphere>, string, string]>([
    ['no volume', { volume: 0 }, 'out-of-range', 'volume'],
    ['no lattice', { latticeParameter: Number.NaN }, 'not-finite', 'latticeParameter'],
    ['no isotopes', { isotopes: [] }, 'too-few-values', 'isotopes'],
    [
      'fractions that miss 1',
      { isotopes: [{ fraction: 0.9, relativeAtomicMass: 28 }] },
      'fractions-not-one',
      'isotopes',
    ],
    [
      'a negative fraction',
      { isotopes: [{ fraction: -0.1, relativeAtomicMass: 28 }] },
      'out-of-range',
      'isotopes[0].fraction',
    ],
    [
      'an isotope without mass',
      { isotopes: [{ fraction: 1, relativeAtomicMass: 0 }] },
      'out-of-range',
      'isotopes[0].relativeAtomicMass',
    ],
    ['a layer that is no number', { surfaceLayer: Number.NaN }, 'not-finite', 'surfaceLayer'],
    ['defects that are no number', { pointDefects: Number.POSITIVE_INFINITY }, 'not-finite', 'pointDefects'],
    [
      'no constants',
      { constants: { ...constants, fineStructure: 0 } },
      'out-of-range',
      'constants.fineStructure',
    ],
    [
      'uncertainties of fewer isotopes',
      { isotopes: [{ fraction: 1, relativeAtomicMass: 28 }] },
      'size-mismatch',
      'u.isotopes',
    ],
  ])('refuses %s', (_, change, code, field) => {
    expect(() => crystalDensityMass({ ...sphere, ...change }, none)).toThrow(
      expect.objectContaining({ code, field }),
    );
  });

  it('refuses an uncertainty that is none', () => {
    expect(() => crystalDensityMass(sphere, { ...none, volume: -1 })).toThrow(
      expect.objectContaining({ field: 'u.volume' }),
    );
    expect(() => crystalDensityMass(sphere, { ...none, surfaceLayer: Number.NaN })).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'u.surfaceLayer' }),
    );
  });
});

import { Decimal } from '#shared/decimal.ts';
import { EngineError } from '../errors.ts';
import { item } from '../linear/entries.ts';
import { requireNumber, requireSize } from '../quantity/domain.ts';
import { type BudgetEntry, realized, type RealizedMass } from './budget.ts';
import { PLANCK_CONSTANT, SPEED_OF_LIGHT } from './constants.ts';

/** Share of the atoms and relative atomic mass of one isotope. */
export type Isotope = { fraction: number; relativeAtomicMass: number };

/** Measured constants of nature that the electron mass comes from (h and c are exact). */
export type ElectronConstants = {
  /** Rydberg constant in 1/m, fine-structure constant, relative atomic mass of the electron. */
  rydberg: number;
  fineStructure: number;
  electronRelativeMass: number;
};

/** A silicon sphere as measured. */
export type CrystalSphere = {
  /** Volume of the silicon core in m3 and lattice parameter in m, at the same temperature and in vacuum. */
  volume: number;
  latticeParameter: number;
  /** Isotopes in any order; the fractions sum to 1. */
  isotopes: Isotope[];
  /** Mass of oxide and other surface layers in kg. */
  surfaceLayer: number;
  /** Mass in kg that the core lacks to a perfect lattice: positive for vacancies. */
  pointDefects: number;
  constants: ElectronConstants;
};

/** Standard uncertainties in the units of the sphere. */
export type CrystalUncertainties = {
  volume: number;
  latticeParameter: number;
  /** In the order of the isotopes. That of the most abundant fraction follows from the others and is not used. */
  isotopes: Isotope[];
  surfaceLayer: number;
  pointDefects: number;
  /** Left out: exact, for instance where the constants enter every realization alike. */
  constants?: Partial<ElectronConstants>;
};

/** Atoms in the cubic unit cell of silicon. */
const ATOMS_PER_CELL = 8;

/**
 * Mass in kg of a silicon sphere by counting its atoms: cells times eight, times the mean mass of an atom, which
 * is the electron mass `2 h R / (c alpha2)` times the ratio of relative atomic masses; less what point defects
 * lack, plus the surface layer. The most abundant isotope takes up what the others leave, so an uncertain small
 * fraction counts with the difference of the two atomic masses only.
 *
 * Source: mise en pratique for the definition of the kilogram, section 2.2 (from memory).
 * @throws EngineError `not-finite`, `out-of-range`, `too-few-values`, `fractions-not-one`, `size-mismatch`
 */
export function crystalDensityMass(a: CrystalSphere, u: CrystalUncertainties): RealizedMass {
  checkSphere(a, u);
  const electron = electronMass(a.constants);
  const atoms = new Decimal(ATOMS_PER_CELL).times(a.volume).div(new Decimal(a.latticeParameter).pow(3));
  const perRelativeMass = electron.times(atoms).div(a.constants.electronRelativeMass);
  const meanRelativeMass = a.isotopes.reduce(
    (sum, isotope) => sum.plus(new Decimal(isotope.fraction).times(isotope.relativeAtomicMass)),
    new Decimal(0),
  );
  const core = perRelativeMass.times(meanRelativeMass);
  const mass = core.minus(a.pointDefects).plus(a.surfaceLayer);
  return realized(mass, [
    ...factorLines(a, u, core.toNumber()),
    ...isotopeLines(a, u, perRelativeMass.toNumber()),
    {
      name: 'surface layer',
      value: a.surfaceLayer,
      unit: 'kg',
      standardUncertainty: u.surfaceLayer,
      sensitivity: 1,
      field: 'u.surfaceLayer',
    },
    {
      name: 'point defects',
      value: a.pointDefects,
      unit: 'kg',
      standardUncertainty: u.pointDefects,
      sensitivity: -1,
      field: 'u.pointDefects',
    },
  ]);
}

/**
 * Mass of the electron in kg: `2 h R / (c alpha2)`. Source: definition of the Rydberg constant; h and c exact.
 * @throws EngineError `not-finite` or `out-of-range`
 */
export function electronMass(a: Pick<ElectronConstants, 'rydberg' | 'fineStructure'>): Decimal {
  requireNumber(a.rydberg, 'constants.rydberg', { above: 0, unit: '1/m' });
  requireNumber(a.fineStructure, 'constants.fineStructure', { above: 0 });
  return PLANCK_CONSTANT.times(2)
    .times(a.rydberg)
    .div(SPEED_OF_LIGHT.times(new Decimal(a.fineStructure).pow(2)));
}

function checkSphere(a: CrystalSphere, u: CrystalUncertainties): void {
  requireNumber(a.volume, 'volume', { above: 0, unit: 'm3' });
  requireNumber(a.latticeParameter, 'latticeParameter', { above: 0, unit: 'm' });
  requireNumber(a.surfaceLayer, 'surfaceLayer', { unit: 'kg' });
  requireNumber(a.pointDefects, 'pointDefects', { unit: 'kg' });
  requireNumber(a.constants.electronRelativeMass, 'constants.electronRelativeMass', { above: 0 });
  if (a.isotopes.length === 0) {
    throw new EngineError('too-few-values', 'isotopes', 'no isotope', 'At least one is needed.');
  }
  a.isotopes.forEach((isotope, i) => {
    requireNumber(isotope.fraction, `isotopes[${i}].fraction`, { min: 0, max: 1 });
    requireNumber(isotope.relativeAtomicMass, `isotopes[${i}].relativeAtomicMass`, { above: 0 });
  });
  const sum = a.isotopes.reduce((total, { fraction }) => total.plus(fraction), new Decimal(0));
  // Fractions are printed to ten digits; a mass good to 1e-9 needs their sum to hold that far.
  if (sum.minus(1).abs().gt(1e-9)) {
    throw new EngineError(
      'fractions-not-one',
      'isotopes',
      `fractions that sum to ${sum.toFixed()}`,
      'A sum of 1 is expected.',
    );
  }
  requireSize(u.isotopes.length, a.isotopes.length, 'u.isotopes', 'isotopes');
}

/** Quantities the core is a product of powers of. */
function factorLines(a: CrystalSphere, u: CrystalUncertainties, core: number): BudgetEntry[] {
  const { rydberg, fineStructure, electronRelativeMass } = a.constants;
  const factors: [
    name: string,
    field: string,
    value: number,
    unit: string,
    u: number | undefined,
    power: number,
  ][] = [
    ['volume of the core', 'volume', a.volume, 'm3', u.volume, 1],
    ['lattice parameter', 'latticeParameter', a.latticeParameter, 'm', u.latticeParameter, -3],
    ['Rydberg constant', 'constants.rydberg', rydberg, '1/m', u.constants?.rydberg, 1],
    [
      'fine-structure constant',
      'constants.fineStructure',
      fineStructure,
      '1',
      u.constants?.fineStructure,
      -2,
    ],
    ['relative atomic mass of the electron', 'constants.electronRelativeMass', electronRelativeMass, '1', u.constants?.electronRelativeMass, -1], // prettier-ignore
  ];
  return factors.map(([name, field, value, unit, standardUncertainty, power]) => ({
    name,
    value,
    unit,
    standardUncertainty: standardUncertainty ?? 0,
    sensitivity: (power * core) / value,
    field: `u.${field}`,
  }));
}

function isotopeLines(a: CrystalSphere, u: CrystalUncertainties, perRelativeMass: number): BudgetEntry[] {
  const largest = Math.max(...a.isotopes.map(({ fraction }) => fraction));
  const main = a.isotopes.findIndex(({ fraction }) => fraction === largest);
  const mainMass = item(a.isotopes, main).relativeAtomicMass;
  return a.isotopes.flatMap((isotope, i) => {
    const uncertain = item(u.isotopes, i);
    const label = `isotope ${Math.round(isotope.relativeAtomicMass)}`;
    const mass: BudgetEntry = {
      name: `relative atomic mass of ${label}`,
      value: isotope.relativeAtomicMass,
      unit: '1',
      standardUncertainty: uncertain.relativeAtomicMass,
      sensitivity: perRelativeMass * isotope.fraction,
      field: `u.isotopes[${i}].relativeAtomicMass`,
    };
    if (i === main) return [mass];
    const fraction: BudgetEntry = {
      name: `fraction of ${label}`,
      value: isotope.fraction,
      unit: '1',
      standardUncertainty: uncertain.fraction,
      sensitivity: perRelativeMass * (isotope.relativeAtomicMass - mainMass),
      field: `u.isotopes[${i}].fraction`,
    };
    return [fraction, mass];
  });
}

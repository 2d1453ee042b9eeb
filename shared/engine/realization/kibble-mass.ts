import { Decimal } from '#shared/decimal.ts';
import { requireNumber, requireWhole } from '../quantity/domain.ts';
import { type BudgetEntry, realized, type RealizedMass } from './budget.ts';
import { PLANCK_CONSTANT } from './constants.ts';
import { correctionLines, type KibbleCorrections } from './kibble-corrections.ts';

/** A voltage as a Josephson array shows it: so many junctions on their first step at one frequency in Hz. */
export type JosephsonVoltage = { junctions: number; frequency: number };

/** One run of a Kibble balance: weighing phase, moving phase, and where it stands. */
export type KibbleRun = {
  /** Voltage across the resistor while the coil current holds the weight. */
  weighing: JosephsonVoltage;
  /** Voltage induced in the coil while it moves. */
  moving: JosephsonVoltage;
  /** Quantum Hall plateau number, and the resistor as a multiple of that plateau's resistance. */
  resistance: { plateau: number; ratio: number };
  /** Coil velocity in m/s and acceleration of free fall in m/s2 at the weight. */
  velocity: number;
  gravity: number;
  corrections?: KibbleCorrections;
};

/** Standard uncertainties in the units of the run. One left out is taken as negligible and shows as 0 in the budget. */
export type KibbleUncertainties = {
  weighing?: { frequency?: number };
  moving?: { frequency?: number };
  resistance?: { ratio?: number };
  velocity: number;
  gravity: number;
};

/**
 * Mass in kg, in vacuum, out of one run of a Kibble balance. With U = n f h/(2e) for both voltages and
 * R = ratio (h/e2)/plateau the elementary charge drops out:
 * `m = h n1 f1 n2 f2 plateau / (4 ratio v g)`, times the corrections. h is exact and brings no uncertainty.
 *
 * Domain: every quantity above 0 (signs of current and velocity are a matter of wiring), counts whole.
 * Source: mise en pratique for the definition of the kilogram, section 2.1 (from memory); SI Brochure, 9th
 * edition, for the constants.
 * @throws EngineError `not-whole`, `out-of-range`, `not-finite`
 */
export function kibbleMass(a: KibbleRun, u: KibbleUncertainties): RealizedMass {
  checkRun(a);
  const corrections = correctionLines(a.corrections ?? {}, a.gravity);
  const factor = corrections.reduce(
    (product, { relative }) => product.times(relative.plus(1)),
    new Decimal(1),
  );
  const mass = uncorrectedMass(a).times(factor);
  const perMass = mass.toNumber();
  const lines: BudgetEntry[] = [
    line(
      'frequency of the weighing voltage',
      a.weighing.frequency,
      'Hz',
      u.weighing?.frequency,
      perMass,
      'weighing.frequency',
    ),
    line(
      'frequency of the moving voltage',
      a.moving.frequency,
      'Hz',
      u.moving?.frequency,
      perMass,
      'moving.frequency',
    ),
    line('resistance ratio', a.resistance.ratio, '1', u.resistance?.ratio, -perMass, 'resistance.ratio'),
    line('velocity', a.velocity, 'm/s', u.velocity, -perMass, 'velocity'),
    line('acceleration of free fall', a.gravity, 'm/s2', u.gravity, -perMass, 'gravity'),
  ];
  const correctionBudget = corrections.flatMap(({ relative, entries }) =>
    entries.map((entry) => ({
      ...entry,
      sensitivity: (entry.sensitivity * perMass) / (1 + relative.toNumber()),
    })),
  );
  return realized(mass, [...lines, ...correctionBudget]);
}

function checkRun(a: KibbleRun): void {
  for (const phase of ['weighing', 'moving'] as const) {
    requireWhole(a[phase].junctions, `${phase}.junctions`, { min: 1 });
    requireNumber(a[phase].frequency, `${phase}.frequency`, { above: 0, unit: 'Hz' });
  }
  requireWhole(a.resistance.plateau, 'resistance.plateau', { min: 1 });
  requireNumber(a.resistance.ratio, 'resistance.ratio', { above: 0 });
  requireNumber(a.velocity, 'velocity', { above: 0, unit: 'm/s' });
  requireNumber(a.gravity, 'gravity', { above: 0, unit: 'm/s2' });
}

function uncorrectedMass(a: KibbleRun): Decimal {
  const steps = new Decimal(a.weighing.junctions)
    .times(a.weighing.frequency)
    .times(a.moving.junctions)
    .times(a.moving.frequency);
  const divisor = new Decimal(4).times(a.resistance.ratio).times(a.velocity).times(a.gravity);
  return PLANCK_CONSTANT.times(steps).times(a.resistance.plateau).div(divisor);
}

/** A factor or divisor of the mass: its relative uncertainty is the mass's. */
function line(
  name: string,
  value: number,
  unit: string,
  standardUncertainty: number | undefined,
  perMass: number,
  field: string,
): BudgetEntry {
  return {
    name,
    value,
    unit,
    standardUncertainty: standardUncertainty ?? 0,
    sensitivity: perMass / value,
    field: `u.${field}`,
  };
}

import { Decimal } from '#shared/decimal.ts';
import { requireNumber } from '../quantity/domain.ts';
import type { BudgetEntry } from './budget.ts';

/** A correction as a relative change of the mass, with its standard uncertainty. */
export type RelativeCorrection = { relative: number; standardUncertainty: number };

/** Corrections of a Kibble balance run; each left out is left out of the budget too. */
export type KibbleCorrections = {
  /** Horizontal forces and torques, coil and beam out of line. */
  alignment?: RelativeCorrection;
  /** Field changed by the weighing current: its effect on the force that does not cancel. */
  magnetNonLinearity?: RelativeCorrection;
  /** Refractive index along the interferometer, where the velocity is stated for vacuum wavelength. */
  airIndex?: { refractiveIndex: number; standardUncertainty: number };
  /** Where `gravity` holds at another height: gradient in s-2 (about -3e-6), weight above that point in m. */
  gravityGradient?: {
    gradient: number;
    gradientUncertainty: number;
    height: number;
    heightUncertainty: number;
  };
};

/** A correction with the lines it adds to the budget; sensitivities are relative to the uncorrected mass. */
export type CorrectionLine = { relative: Decimal; entries: BudgetEntry[] };

/**
 * The corrections given, as factors 1 + relative.
 * - refractive index n: fringes are shorter than counted, the true velocity is v/n and the mass larger by n - 1;
 * - gradient of g: at the weight g is g + gradient height, and the mass g/(g + gradient height) times as large.
 * @throws EngineError `not-finite`, `out-of-range`
 */
export function correctionLines(a: KibbleCorrections, gravity: number): CorrectionLine[] {
  const lines: CorrectionLine[] = [];
  if (a.alignment) lines.push(relativeLine('alignment', a.alignment, 'corrections.alignment'));
  if (a.magnetNonLinearity) {
    lines.push(
      relativeLine('non-linearity of the magnet', a.magnetNonLinearity, 'corrections.magnetNonLinearity'),
    );
  }
  if (a.airIndex) lines.push(airIndexLine(a.airIndex));
  if (a.gravityGradient) lines.push(gravityGradientLine(a.gravityGradient, gravity));
  return lines;
}

function relativeLine(name: string, a: RelativeCorrection, path: string): CorrectionLine {
  requireNumber(a.relative, `${path}.relative`, { above: -1 });
  return {
    relative: new Decimal(a.relative),
    entries: [entry(name, a.relative, '1', a.standardUncertainty, 1, `${path}.standardUncertainty`)],
  };
}

function airIndexLine(a: { refractiveIndex: number; standardUncertainty: number }): CorrectionLine {
  const path = 'corrections.airIndex';
  requireNumber(a.refractiveIndex, `${path}.refractiveIndex`, { min: 1, max: 1.001 });
  return {
    relative: new Decimal(a.refractiveIndex).minus(1),
    entries: [
      entry(
        'refractive index of the air',
        a.refractiveIndex,
        '1',
        a.standardUncertainty,
        1,
        `${path}.standardUncertainty`,
      ),
    ],
  };
}

function gravityGradientLine(
  a: NonNullable<KibbleCorrections['gravityGradient']>,
  gravity: number,
): CorrectionLine {
  const path = 'corrections.gravityGradient';
  requireNumber(a.gradient, `${path}.gradient`, { min: -1e-4, max: 1e-4, unit: 's-2' });
  requireNumber(a.height, `${path}.height`, { min: -100, max: 100, unit: 'm' });
  const there = new Decimal(a.gradient).times(a.height).plus(gravity);
  const factor = new Decimal(gravity).div(there);
  const slope = -factor.div(there).toNumber();
  return {
    relative: factor.minus(1),
    entries: [
      entry(
        'vertical gradient of free fall',
        a.gradient,
        's-2',
        a.gradientUncertainty,
        slope * a.height,
        `${path}.gradientUncertainty`,
      ),
      entry(
        'height of the weight',
        a.height,
        'm',
        a.heightUncertainty,
        slope * a.gradient,
        `${path}.heightUncertainty`,
      ),
    ],
  };
}

function entry(
  name: string,
  value: number,
  unit: string,
  standardUncertainty: number,
  sensitivity: number,
  field: string,
): BudgetEntry {
  return { name, value, unit, standardUncertainty, sensitivity, field };
}

import { Decimal } from '#shared/decimal.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import type { WeightClass } from '#shared/engine/conformity/r111-2004.ts';
import { PIECES } from './pieces.ts';

/** What a step of the country's chains delivers. */
export interface Grade {
  class: WeightClass | null;
  quantity: 'mass' | 'conventional mass';
  /** U at 1 kg in mg where there is no class, else the part of a third of the class limit that U takes. */
  size: number;
  intervalMonths: number;
  /** U of the density, kg/m3, k = 2. */
  densityU: number;
}

/**
 * The fourteen steps, the root first. Each is large enough beside the one above that U covers what is carried, and
 * small enough that U allows the class. Sizes and intervals are common practice, no source.
 */
export const GRADES: readonly Grade[] = [
  grade(null, 0.02, 240, 10),
  grade(null, 0.028, 48, 10),
  grade(null, 0.04, 24, 10),
  grade('E1', 0.3, 24, 10),
  grade('E1', 0.55, 24, 10),
  grade('E1', 0.95, 48, 10),
  grade('E2', 0.7, 24, 20),
  grade('E2', 0.95, 48, 20),
  grade('F1', 0.45, 24, 60),
  grade('F1', 0.85, 48, 60),
  grade('F2', 0.4, 24, 140),
  grade('F2', 0.8, 24, 140),
  grade('M1', 0.4, 24, 140),
  grade('M1', 0.9, 12, 140),
];

/** Numbers of one piece at one step, in grams. */
export interface Figures {
  /** As printed. */
  expandedU: number;
  expandedUText: string;
  u: number;
  /** Decimals of value and U in the reported unit, mg. */
  decimals: number;
  /** Maximum permissible error; where there is no class, ten times U. */
  limit: number;
}

/** Figures by step and piece. */
export const FIGURES: readonly (readonly Figures[])[] = GRADES.map((one) =>
  PIECES.map((piece) => figuresOf(one, piece.nominal)),
);

function grade(
  weightClass: WeightClass | null,
  size: number,
  intervalMonths: number,
  densityU: number,
): Grade {
  const quantity = weightClass === null ? 'mass' : 'conventional mass';
  return { class: weightClass, quantity, size, intervalMonths, densityU };
}

function figuresOf({ class: weightClass, size }: Grade, nominal: string): Figures {
  const grams = Number(nominal);
  const limit =
    weightClass === null
      ? (10 * size * grams) / 1000
      : maximumPermissibleError(weightClass, new Decimal(nominal))!.toNumber();
  const wanted = weightClass === null ? (size * grams) / 1000 : (size * limit) / 3;
  // Two significant digits, and at most whole milligrams.
  const decimals = Math.max(0, 1 - Math.floor(Math.log10(wanted) + 1e-9));
  const step = 10 ** (Math.floor(Math.log10(wanted) + 1e-9) - 1);
  const expandedU = (Math.round(wanted / step) * step) / 1000;
  return { expandedU, expandedUText: expandedU.toFixed(12), u: expandedU / 2, decimals, limit: limit / 1000 };
}

import type { Decimal } from '#shared/decimal.ts';
import { requireNumber } from '../quantity/domain.ts';

/** One line of an uncertainty budget; `contribution` is sensitivity times standard uncertainty, in kg, with sign. */
export type BudgetLine = {
  name: string;
  value: number;
  unit: string;
  standardUncertainty: number;
  /** Change of the mass in kg for a unit of the quantity. */
  sensitivity: number;
  contribution: number;
};

/** A realized mass in kg with its budget; the lines are uncorrelated. */
export type RealizedMass = { mass: Decimal; standardUncertainty: number; budget: BudgetLine[] };

/** A line before its contribution is worked out; `field` names the uncertainty for messages. */
export type BudgetEntry = Omit<BudgetLine, 'contribution'> & { field: string };

/**
 * Works out the contributions and their root sum of squares.
 * @throws EngineError `not-finite`, `out-of-range` naming the uncertainty that is none
 */
export function realized(mass: Decimal, entries: readonly BudgetEntry[]): RealizedMass {
  const budget = entries.map(({ field, ...line }) => {
    requireNumber(line.standardUncertainty, field, { min: 0 });
    return { ...line, contribution: line.sensitivity * line.standardUncertainty };
  });
  return { mass, standardUncertainty: Math.hypot(...budget.map(({ contribution }) => contribution)), budget };
}

import { Decimal } from '#shared/decimal.ts';
import { roundResult } from '#shared/engine/quantity/round-result.ts';

type Unit = 'g' | 'mg' | 'ug';

/** A result as its certificate prints it: U to two significant digits, the value to the same place. */
export interface Printed {
  /** g, as text for the register and as numbers for the plan. */
  deviationText: string;
  expandedUText: string;
  deviation: number;
  expandedU: number;
  unit: Unit;
  decimals: number;
  /** Half of the last printed digit of the value, g. */
  halfDigit: number;
}

const EXPONENT: Record<Unit, number> = { g: 0, mg: -3, ug: -6 };

/** @param deviation g; @param expandedU g, k = 2 */
export function printed(deviation: number, expandedU: number): Printed {
  const unit: Unit = expandedU < 2e-6 ? 'ug' : expandedU < 1 ? 'mg' : 'g';
  const scale = new Decimal(10).pow(-EXPONENT[unit]);
  const { value, expandedUncertainty } = roundResult({
    value: new Decimal(deviation).times(scale),
    expandedUncertainty: scale.times(expandedU).toNumber(),
  });
  return asPrinted(value, expandedUncertainty, unit);
}

/** The same result printed a factor of 1000 too large or too small, deviation and U alike. */
export function printedInWrongUnit(result: Printed, factor: 1000 | 0.001): Printed {
  const scale = new Decimal(10).pow(-EXPONENT[result.unit]);
  const at = (text: string) => new Decimal(text).times(scale).times(factor);
  const decimals = factor === 1000 ? Math.max(0, result.decimals - 3) : result.decimals + 3;
  return asPrinted(
    at(result.deviationText).toFixed(decimals),
    at(result.expandedUText).toFixed(decimals),
    result.unit,
  );
}

/** The same with the other sign. */
export function printedWithOtherSign(result: Printed): Printed {
  const text = new Decimal(result.deviationText).negated().toFixed();
  return { ...result, deviationText: text, deviation: -result.deviation };
}

function asPrinted(value: string, expandedU: string, unit: Unit): Printed {
  const grams = (text: string) => new Decimal(text).times(new Decimal(10).pow(EXPONENT[unit]));
  const decimals = expandedU.split('.')[1]?.length ?? 0;
  return {
    deviationText: grams(value).toFixed(),
    expandedUText: grams(expandedU).toFixed(),
    deviation: grams(value).toNumber(),
    expandedU: grams(expandedU).toNumber(),
    unit,
    decimals,
    halfDigit: 0.5 * 10 ** (EXPONENT[unit] - decimals),
  };
}

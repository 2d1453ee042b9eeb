import type { MassUnit } from '#shared/contracts/common.ts';
import { unitOfText } from '#shared/engine/quantity/units.ts';

const MASS_UNITS: readonly MassUnit[] = ['kg', 'g', 'mg', 'ug'];

/** The number of a cell and the unit that holds for it. */
export interface NumberInUnit {
  text: string;
  unit: MassUnit;
}

/**
 * Parts an entry such as "80 g" into its number and its unit; without a unit beside the number the chosen one
 * holds. Text that is no number with a mass unit comes back as it is, for the field to say why.
 */
export function ownUnit(entry: string, chosen: MassUnit): NumberInUnit {
  const [, number, symbol] =
    /^\s*([-+\u2212]?[\d.,][\d.,\s]*?)\s*([a-z\u00b5\u03bc]+)\s*$/i.exec(entry) ?? [];
  const unit = MASS_UNITS.find((one) => one === unitOfText(symbol ?? ''));
  return number !== undefined && unit ? { text: number, unit } : { text: entry, unit: chosen };
}

import { Decimal } from '#shared/decimal.ts';

const UNITS = [
  { unit: 'g', grams: '1' },
  { unit: 'mg', grams: '0.001' },
  { unit: 'ug', grams: '0.000001' },
] as const;

/**
 * An amount to two significant digits in the unit that suits it: "0.21 mg". Down for a distance, so that what is said
 * is never more than there is; up for an uncertainty.
 * @param grams 0 or more
 */
export function shortText(grams: number, rounding: 'down' | 'up'): string {
  const amount = new Decimal(grams);
  const { unit, grams: size } =
    UNITS.find((each) => amount.gte(new Decimal(each.grams).times('0.1'))) ?? UNITS[2];
  const shown = amount.div(size);
  const rounded = shown.toSignificantDigits(2, rounding === 'down' ? Decimal.ROUND_DOWN : Decimal.ROUND_UP);
  return `${rounded.toFixed()} ${unit === 'ug' ? 'µg' : unit}`;
}

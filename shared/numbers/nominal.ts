import { Decimal } from '#shared/decimal.ts';
import type { DecimalMark } from '#shared/engine/quantity/read-number.ts';
import { quantityLine, quantityText } from './quantity-text.ts';

/** The unit a nominal is engraved in: mg below 1 g, g below 1 kg, kg from there on (OIML R 111-1:2004, 13). */
export function nominalUnit(grams: string): 'kg' | 'g' | 'mg' {
  const value = new Decimal(grams);
  if (value.gte(1000)) return 'kg';
  return value.gte(1) ? 'g' : 'mg';
}

/** A nominal as one says it: "1 kg", "500 mg". */
export function nominalText(grams: string, decimalMark: DecimalMark = '.'): string {
  const style = { decimalMark, uncertainty: 'plus-minus' as const };
  return quantityLine(quantityText({ value: grams, shownIn: nominalUnit(grams) }, style));
}

import { THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';
import { formatDecimal } from './format-decimal.ts';
import type { DecimalMark } from '#shared/engine/quantity/read-number.ts';

/** A share of the variance as people read it: "56.0 %"; one decimal, so that a column adds up by eye. */
export function shareText(share: number, decimalMark: DecimalMark = '.', decimals = 1): string {
  const percent = share * 100;
  if (percent !== 0 && Math.abs(percent) < 0.05) return `<${THIN_SPACE}0${decimalMark}1${THIN_SPACE}%`;
  return `${formatDecimal(percent.toFixed(decimals), { decimalMark, decimals })}${THIN_SPACE}%`;
}

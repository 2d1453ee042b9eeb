import { formatDecimal } from './format-decimal.ts';

/** A count as it is read: digits in groups of three, "1 230". */
export function countText(count: number): string {
  return formatDecimal(String(count));
}

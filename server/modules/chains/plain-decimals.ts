import { decimalText } from '#shared/decimal.ts';

interface Decimals {
  deviation: string;
  expandedU: string | null;
  k: string | null;
}

/** The column's zeros removed ("2.0000" is k = 2): sentences and drawings quote these texts. */
export function plainDecimals(row: Decimals): Decimals {
  return {
    deviation: decimalText(row.deviation),
    expandedU: row.expandedU === null ? null : decimalText(row.expandedU),
    k: row.k === null ? null : decimalText(row.k),
  };
}

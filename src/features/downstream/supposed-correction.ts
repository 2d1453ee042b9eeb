import type { WhatIfChange } from '#shared/contracts/downstream.ts';
import { Decimal, decimalText } from '#shared/decimal.ts';

/** What a certificate would say if the supposition were true; grams. */
export interface SupposedCorrection {
  deviation: string;
  expandedU: string | null;
}

/** U is stated to two significant digits, rounded up. */
const U_DIGITS = 2;

/** The certificate's own numbers with what is supposed of the value: what a correction begins with. */
export function supposedCorrection(
  change: WhatIfChange,
  value: { deviation: string; expandedU: string | null; k: string | null },
): SupposedCorrection {
  if (change.kind === 'shift') {
    const deviation = new Decimal(value.deviation).plus(change.shift);
    return { deviation: decimalText(deviation.toDecimalPlaces(12)), expandedU: value.expandedU };
  }
  if (change.kind !== 'raise' || value.expandedU === null || value.k === null) {
    return { deviation: value.deviation, expandedU: value.expandedU };
  }
  const grown = new Decimal(value.expandedU)
    .pow(2)
    .plus(new Decimal(change.addedU).times(value.k).pow(2))
    .sqrt();
  return {
    deviation: value.deviation,
    expandedU: decimalText(grown.toSignificantDigits(U_DIGITS, Decimal.ROUND_UP)),
  };
}

/** The same for several suppositions about one value, one after the other. */
export function supposedTogether(
  changes: readonly WhatIfChange[],
  value: { deviation: string; expandedU: string | null; k: string | null },
): SupposedCorrection {
  return changes.reduce<SupposedCorrection>(
    (supposed, change) => supposedCorrection(change, { ...supposed, k: value.k }),
    { deviation: value.deviation, expandedU: value.expandedU },
  );
}

import { Decimal, decimalText } from '#shared/decimal.ts';
import type { WeightClass } from '#shared/contracts/common.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { nominalText } from '#shared/numbers/nominal.ts';
import { isGrams } from '../nominal.ts';

interface ErrorLimitNoteProps {
  weightClass: WeightClass | null;
  /** Grams as text, or whatever is being typed. */
  nominal: string;
}

/** What a class asks of a weight of this nominal, as one chooses them (OIML R 111-1:2004, Table 1). */
export function ErrorLimitNote({ weightClass, nominal }: ErrorLimitNoteProps) {
  if (weightClass === null || !isGrams(nominal)) {
    return (
      <p className="text-ink-2">Choose a class and a nominal to see the error limit that goes with them.</p>
    );
  }
  const limit = errorLimit(weightClass, nominal);
  if (limit === null) {
    return (
      <p className="text-ink-2">
        OIML R 111-1:2004, Table 1 sets no error limit for class {weightClass} at {nominalText(nominal)}.
      </p>
    );
  }
  return (
    <p>
      <span className="font-serif">±</span>
      <Quantity value={limit} shownIn={limitUnit(limit)} /> for conventional mass at {nominalText(nominal)},
      class {weightClass}; U of its calibration at most a third of it.
      <span className="block text-sm text-ink-3">OIML R 111-1:2004, 5.1, 5.2 and Table 1</span>
    </p>
  );
}

/** Maximum permissible error in grams as text; null where the table has none or the nominal is no number yet. */
export function errorLimit(weightClass: WeightClass | null, nominal: string): string | null {
  if (weightClass === null || !isGrams(nominal)) return null;
  const limit = maximumPermissibleError(weightClass, new Decimal(nominal));
  return limit && decimalText(limit.div(1000));
}

/** Limits are read in mg, as the table prints them, and in g once they are that large. */
export function limitUnit(limit: string): 'mg' | 'g' {
  return Number(limit) < 1 ? 'mg' : 'g';
}

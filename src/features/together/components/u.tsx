import { Decimal } from '#shared/decimal.ts';
import { Quantity } from '#src/components/ui/quantity.tsx';

/** A standard uncertainty to two digits, in the unit that suits it; grams. */
export function U({ grams }: { grams: number | null }) {
  if (grams === null) return <span className="text-ink-3">not known</span>;
  if (grams === 0) return <>0</>;
  return <Quantity value={new Decimal(grams).toSignificantDigits(2).toFixed()} shownIn="auto" />;
}

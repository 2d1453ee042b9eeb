import { Quantity } from '#src/components/ui/quantity.tsx';
import { nominalUnit } from '#shared/numbers/nominal.ts';

/** A nominal in the unit engraved on the weight. */
export function Nominal({ grams }: { grams: string }) {
  return <Quantity value={grams} shownIn={nominalUnit(grams)} />;
}
